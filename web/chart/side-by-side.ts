import type { RouteDrawing } from "../worker/protocol.ts";

interface Point {
  readonly x: number;
  readonly y: number;
}

/** Degrees within which two waypoints are one place: some 10 cm. */
const SAME = 1e-6;

/** The legs, from 1, that run back over another leg of their route, as out and back. */
export function retracedLegs({ lat, lon, waypoints }: RouteDrawing): ReadonlySet<number> {
  const ends = Array.from(waypoints, (sample) => ({ lat: lat[sample] ?? 0, lon: lon[sample] ?? 0 }));
  const same = (one: number, other: number): boolean => {
    const [a, b] = [ends[one], ends[other]];
    return !!a && !!b && Math.abs(a.lat - b.lat) < SAME && Math.abs(a.lon - b.lon) < SAME;
  };
  const retraced = new Set<number>();
  for (let leg = 1; leg < ends.length; leg += 1) {
    for (let other = leg + 1; other < ends.length; other += 1) {
      if (same(leg - 1, other) && same(leg, other - 1)) retraced.add(leg).add(other);
    }
  }
  return retraced;
}

/** Points on the screen (y downward), moved to the right of the line's own direction, so that there and back lie side by side. */
export function toTheRight(points: readonly Point[], px: number): Point[] {
  return points.map((point, at) => {
    const from = points[at - 1] ?? point;
    const to = points[at + 1] ?? point;
    const length = Math.hypot(to.x - from.x, to.y - from.y);
    if (length === 0) return point;
    return {
      x: point.x - (px * (to.y - from.y)) / length,
      y: point.y + (px * (to.x - from.x)) / length,
    };
  });
}
