import type { Profile } from "../core.ts";
import { alongClass } from "../format/palette.ts";

/** A stretch of a ribbon in one colour class, between two values of the ribbon's axis. */
export interface Run {
  readonly from: number;
  readonly to: number;
  readonly classNumber: number;
}

/** Joins neighbouring samples of one class of along-track component; stays, which have no length, are left out. */
export function ribbonRuns(profile: Profile, axis: Float64Array, limit: number): Run[] {
  const runs: Run[] = [];
  const { along_m_s: along } = profile;
  for (let at = 0; at + 1 < along.length; at += 1) {
    const from = axis[at] ?? 0;
    const to = axis[at + 1] ?? from;
    if (!(to > from) || profile.distance_m[at] === profile.distance_m[at + 1]) continue;
    const classNumber = alongClass(((along[at] ?? 0) + (along[at + 1] ?? 0)) / 2, limit);
    const last = runs.at(-1);
    if (last && last.classNumber === classNumber && last.to === from) runs[runs.length - 1] = { ...last, to };
    else runs.push({ from, to, classNumber });
  }
  return runs;
}
