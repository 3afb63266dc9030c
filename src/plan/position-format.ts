import type { Axis } from "./position.ts";

/** `minutes`: degrees and decimal minutes with hemisphere, as at sea and in the air. `decimal`: signed decimal degrees. */
export type PositionStyle = "minutes" | "decimal";

/** Decimals of a style: 0.01′ of latitude is 19 m, 0.00001° is 1.1 m. */
const DECIMALS = { minutes: 2, decimal: 5 } as const;

/**
 * Writes a position, latitude first (ISO 6709). Longitude is brought into -180..180. A rounded minute never reads 60.
 *
 * @param lat degrees, north positive, -90..90
 * @param lon degrees, east positive, any turn
 * @param decimals of the minutes or of the degrees; 2 and 5 unless given
 * @throws RangeError where a coordinate is no finite number
 * @example
 * formatPosition(50.5, -4.25, "minutes") // → "50°30.00'N 004°15.00'W"
 * formatPosition(50.5, -4.25, "decimal") // → "50.50000, -4.25000"
 */
export function formatPosition(
  lat: number,
  lon: number,
  style: PositionStyle,
  decimals: number = DECIMALS[style],
): string {
  const separator = style === "minutes" ? " " : ", ";
  return `${formatCoordinate(lat, "lat", style, decimals)}${separator}${formatCoordinate(lon, "lon", style, decimals)}`;
}

/**
 * Writes one coordinate, as {@link formatPosition} does; `parseCoordinate` reads it back.
 *
 * @throws RangeError where the coordinate is no finite number
 * @example
 * formatCoordinate(-0.99999999, "lat", "minutes") // → "01°00.00'S"
 */
export function formatCoordinate(
  degrees: number,
  axis: Axis,
  style: PositionStyle,
  decimals: number = DECIMALS[style],
): string {
  if (!Number.isFinite(degrees)) throw new RangeError(`a coordinate is a finite number; found ${degrees}`);
  const reduced = axis === "lat" ? degrees : withinHalfTurn(degrees);
  if (style === "decimal") {
    const text = reduced.toFixed(decimals);
    return Number(text) === 0 ? text.replace("-", "") : text;
  }
  // Rounded before it is split, so that 59.999′ carries into the degree.
  const scale = 10 ** decimals;
  const units = Math.round(Math.abs(reduced) * 60 * scale);
  const whole = Math.floor(units / (60 * scale));
  const minutes = ((units - whole * 60 * scale) / scale).toFixed(decimals);
  const width = decimals === 0 ? 2 : decimals + 3;
  const letter = hemisphere(axis, units === 0 ? 0 : reduced);
  return `${String(whole).padStart(axis === "lat" ? 2 : 3, "0")}°${minutes.padStart(width, "0")}'${letter}`;
}

function hemisphere(axis: Axis, degrees: number): string {
  if (axis === "lat") return degrees < 0 ? "S" : "N";
  return degrees < 0 ? "W" : "E";
}

/** -180 ≤ λ ≤ 180; both ends stay as they are. */
function withinHalfTurn(lon: number): number {
  if (lon >= -180 && lon <= 180) return lon;
  const turned = lon % 360;
  if (turned > 180) return turned - 360;
  return turned < -180 ? turned + 360 : turned;
}
