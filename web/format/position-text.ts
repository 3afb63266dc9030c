/** Latitude in degrees and decimal minutes with its hemisphere, as on a chart: `58°06.19′N`. */
export function latText(lat: number, decimals = 2): string {
  return degreesMinutes(lat, 2, decimals, "N", "S");
}

/** Longitude in degrees and decimal minutes, reduced to the turn around Greenwich: `006°23.23′W`. */
export function lonText(lon: number, decimals = 2): string {
  return degreesMinutes(withinTurn(lon), 3, decimals, "E", "W");
}

/** The same meridian in -180..180. */
export function withinTurn(lon: number): number {
  const reduced = ((((lon + 180) % 360) + 360) % 360) - 180;
  return reduced === -180 && lon > 0 ? 180 : reduced;
}

function degreesMinutes(value: number, width: number, decimals: number, plus: string, minus: string): string {
  // Rounded as a whole, so that 59.996′ becomes the next degree and not 60.00′.
  const scale = 60 * 10 ** decimals;
  const units = Math.round(Math.abs(value) * scale);
  const degrees = Math.floor(units / scale);
  const minutes = ((units - degrees * scale) / 10 ** decimals).toFixed(decimals);
  const padded = minutes.padStart(decimals === 0 ? 2 : decimals + 3, "0");
  const side = units === 0 || value >= 0 ? plus : minus;
  return `${String(degrees).padStart(width, "0")}°${padded}′${side}`;
}
