import { withinTurn } from "../format/position-text.ts";

/** A position rounded to what a pixel can tell at a zoom, so that plans stay readable. */
export function rounded(lat: number, lon: number, zoom: number): { lat: number; lon: number } {
  const decimals = Math.min(Math.max(Math.ceil(Math.log10((256 * 2 ** zoom) / 360)), 2), 6);
  const round = (value: number): number => Number(value.toFixed(decimals));
  return { lat: round(Math.min(Math.max(lat, -90), 90)), lon: round(withinTurn(lon)) };
}
