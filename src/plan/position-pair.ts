import { InputError } from "../errors.ts";
import { foundText } from "../found.ts";
import type { Position } from "../geodesy/track.ts";
import { parseCoordinate } from "./position.ts";

/** Ways in which one text holds latitude and longitude, each with one group for either. */
const PAIRS: readonly RegExp[] = [
  // Letters after: 50°21.5'N 4°09.05'W; letters before: N50°21.5' W4°09.05'.
  /^([^NSEW]*[NS])[\s,;/]*([^NSEW]*[EW])$/i,
  /^([NS][^NSEW]*?)[\s,;/]*([EW][^NSEW]*)$/i,
  // A comma or semicolon between: 50.358, -4.151.
  /^([^,;]+)[,;]([^,;]+)$/,
  // ISO 6709, annex H, in decimal degrees: +50.358-004.151/.
  /^([+-]\d{2}(?:\.\d+)?)([+-]\d{3}(?:\.\d+)?)\/?$/,
  // A blank between two decimal numbers: 50.358 -4.151.
  /^([+-]?\d+(?:\.\d+)?)\s+([+-]\d+(?:\.\d+)?|\d+\.\d+)$/,
];

/**
 * Reads a position from one text, latitude first, each coordinate in any notation of `parseCoordinate`.
 *
 * @returns degrees: latitude -90..90, longitude -180..360
 * @throws InputError where the text does not part into two coordinates, or one of them is refused
 * @example
 * parsePosition("50°30'N 4°15'W") // → { lat: 50.5, lon: -4.25 }
 * parsePosition("50.5, -4.25") // → { lat: 50.5, lon: -4.25 }
 */
export function parsePosition(text: string): Position {
  for (const pattern of PAIRS) {
    const match = pattern.exec(text.trim());
    if (match !== null)
      return { lat: parseCoordinate(match[1], "lat"), lon: parseCoordinate(match[2], "lon") };
  }
  throw new InputError(
    `a position takes latitude and longitude, as "50°21.5'N 4°09.05'W" or "50.358, -4.151"; found ${foundText(text)}`,
  );
}
