import wmm2025 from "geomagnetism/data/wmm-2025.json" with { type: "json" };
import Model from "geomagnetism/lib/model.js";
import { normaliseCourse } from "../geodesy/angle.ts";
import type { Position } from "../geodesy/track.ts";

/** Span of WMM2025 in the library: from its publication to the day after which the library has no model (ms since 1970). */
const FROM = Date.UTC(2024, 10, 13, 3);
const TO = Date.UTC(2029, 10, 13, 3);

/**
 * Magnetic variation (declination) in degrees, east positive, by the World Magnetic Model 2025; `null` outside its dates.
 *
 * @param height_m above the surface, taken as the height above the ellipsoid
 * @param time ms since 1970-01-01T00:00Z
 * @see NOAA NCEI and BGS, The US/UK World Magnetic Model for 2025-2030
 * @example
 * magneticVariation({ lat: 80, lon: 0 }, 0, Date.UTC(2025, 0, 1))?.toFixed(2) // → "1.28"
 */
export function magneticVariation(position: Position, height_m: number, time: number): number | null {
  if (!(time >= FROM && time <= TO)) return null;
  const lon = position.lon > 180 ? position.lon - 360 : position.lon;
  return new Model(wmm2025).getTimedModel(new Date(time)).point([position.lat, lon, height_m / 1000]).decl;
}

/**
 * Magnetic course from a true one and the variation: variation east, magnetic least. Degrees clockwise, 0 <= c < 360.
 *
 * @param trueCourse degrees clockwise from true north
 * @param variation degrees, east positive
 *
 * @example
 * magneticCourse(2, 5) // → 357
 */
export function magneticCourse(trueCourse: number, variation: number): number {
  return normaliseCourse(trueCourse - variation);
}
