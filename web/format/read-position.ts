import { type Position, parseCoordinate } from "../core.ts";

/** Reads a position of a plan file. @throws InputError where it is none */
export function readPosition(lat: number | string, lon: number | string): Position {
  return { lat: parseCoordinate(lat, "lat"), lon: parseCoordinate(lon, "lon") };
}
