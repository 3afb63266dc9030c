import type { Position } from "../core.ts";

/** Reads a position of a plan file. @throws Error where it is none */
export function readPosition(lat: number | string, lon: number | string): Position {
  return { lat: degrees(lat, "latitude"), lon: degrees(lon, "longitude") };
}

function degrees(value: number | string, what: string): number {
  if (typeof value === "number") return value;
  const [, d, m = "0", s = "0", side = ""] =
    /^\s*(-?\d+(?:\.\d+)?)[°\s]*(?:(\d+(?:\.\d+)?)['′\s]*)?(?:(\d+(?:\.\d+)?)["″\s]*)?([NSEW]?)\s*$/i.exec(
      value,
    ) ?? [];
  if (d === undefined) throw new Error(`${what} is degrees or degrees and minutes; found "${value}"`);
  const size = Number(d) + Number(m) / 60 + Number(s) / 3600;
  return /[SW]/i.test(side) ? -size : size;
}
