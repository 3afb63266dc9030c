/*
 * Rings: closed lines of positions in degrees, kept flat (lon₀, lat₀, lon₁, lat₁, …) and closed from the last to the first.
 */
import type { Position as LonLat } from "geojson";

/**
 * The rings of a polygon on the globe as rings in a plane of continuous longitude: a step of more than half a turn is a
 * crossing of the antimeridian, and a ring that goes round a pole is closed over it.
 *
 * @param ring positions [lon, lat] in degrees, the last equal to the first
 * @returns longitudes continuous from the first position's own, which may leave -180..180
 */
export function unrolledRing(ring: readonly LonLat[]): number[] {
  const flat: number[] = [];
  let turns = 0;
  let before = ring[0]?.[0] ?? 0;
  for (const [lon = 0, lat = 0] of ring) {
    turns -= Math.round((lon - before) / 360);
    before = lon;
    flat.push(lon + 360 * turns, lat);
  }
  if (turns !== 0) closeOverPole(flat);
  return flat;
}

function closeOverPole(flat: number[]): void {
  const [firstLon = 0, firstLat = 0] = flat;
  const pole = firstLat < 0 ? -90 : 90;
  flat.push(flat[flat.length - 2] ?? 0, pole, firstLon, pole);
}

/**
 * The parts of a ring in each of the strips between parallel grid lines, by strip: Sutherland & Hodgman's reentrant clip
 * (Comm. ACM 17, 1974, 32-42) against both edges of every strip, in one walk around the ring. Parts of one strip are
 * joined along its edges by stretches that run there and back, which enclose nothing.
 *
 * @param axis 0 for strips of longitude, 1 of latitude
 * @param origin where strip 0 begins, degrees
 * @param size width of a strip, degrees
 */
export function slicedRing(
  ring: readonly number[],
  axis: 0 | 1,
  origin: number,
  size: number,
): Map<number, number[]> {
  const strips = new Map<number, number[]>();
  const put = (strip: number, x: number, y: number) => {
    const part = strips.get(strip);
    if (part === undefined) strips.set(strip, [x, y]);
    else part.push(x, y);
  };
  const stripOf = (i: number) => Math.floor(((ring[i + axis] ?? 0) - origin) / size);
  let last = ring.length - 2;
  let lastStrip = stripOf(last);
  for (let i = 0; i < ring.length; i += 2) {
    const strip = stripOf(i);
    if (strip !== lastStrip) {
      const step = strip > lastStrip ? 1 : -1;
      for (let at = lastStrip; at !== strip; at += step) {
        const line = origin + (step > 0 ? at + 1 : at) * size;
        const [x, y] = onLine(ring, last, i, axis, line);
        put(at, x, y);
        put(at + step, x, y);
      }
    }
    put(strip, ring[i] ?? 0, ring[i + 1] ?? 0);
    last = i;
    lastStrip = strip;
  }
  return strips;
}

/** Where the edge between two positions of a ring meets a grid line. */
function onLine(
  ring: readonly number[],
  from: number,
  to: number,
  axis: 0 | 1,
  line: number,
): [number, number] {
  const other = 1 - axis;
  const a = ring[from + axis] ?? 0;
  const b = ring[to + axis] ?? 0;
  const c = ring[from + other] ?? 0;
  const d = ring[to + other] ?? 0;
  const across = c + ((d - c) * (line - a)) / (b - a);
  return axis === 0 ? [line, across] : [across, line];
}
