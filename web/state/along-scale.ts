import { roundLimit } from "../format/palette.ts";
import type { Answer } from "./answers.ts";

/** Where the scale of along-track colours ends, m/s, round in the shown unit of speed: one scale for all routes, so that equal colours mean equal flow. */
export function alongLimit(answer: Answer, unit: number): number {
  let most = 0;
  for (const drawing of answer.drawings) {
    for (const along of drawing?.profile?.along_m_s ?? []) most = Math.max(most, Math.abs(along));
  }
  return roundLimit(most, unit);
}
