import type { Profile } from "../core.ts";
import { type LinearScale, linearScale } from "../format/linear-scale.ts";
import { placeAtTime } from "../state/along-route.ts";
import type { Answer } from "../state/answers.ts";

const MARGIN = 8;

/** The end of the axis that all routes share: metres, or seconds since departure. */
export function farthest({ drawings }: Answer, byTime: boolean): number {
  return Math.max(
    0,
    ...drawings.map((drawing) =>
      byTime ? (drawing?.profile?.time_s.at(-1) ?? 0) : (drawing?.distance_m.at(-1) ?? 0),
    ),
  );
}

/** From metres or seconds to px of a strip. */
export function alongScale(end: number, width: number): LinearScale {
  return linearScale([0, Math.max(end, 1e-9)], [MARGIN, Math.max(width - MARGIN, MARGIN + 1)]);
}

/** Where each sample of a profile stands on the axis. */
export function axisOf(profile: Profile, byTime: boolean): Float64Array {
  return byTime ? profile.time_s : profile.distance_m;
}

/** The distance along the route that a value of the axis stands for. */
export function distanceAt(profile: Profile, byTime: boolean, value: number): number | null {
  const held = Math.min(Math.max(value, 0), axisOf(profile, byTime).at(-1) ?? 0);
  return byTime ? (placeAtTime(profile, held)?.distance_m ?? null) : held;
}
