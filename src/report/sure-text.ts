import type { TrialCounts } from "../choose/cell-trials.ts";
import type { PaceBound } from "../choose/pace-bound.ts";
import type { Sure } from "../choose/sure.ts";
import type { FindingCode } from "../estimate/result.ts";
import { askedText } from "./percent-text.ts";
import { plainText } from "./plain-text.ts";

/**
 * What the bests were tried in, as a departure holds: `in all 7 members and 3 what-ifs, and with a probability of 90 % under the stated
 * error`; `null` where the plan names nothing that decides.
 */
export function triedText({ members, whatIfs, confidence }: TrialCounts): string | null {
  const counts = [
    ...(members === 0 ? [] : [`${members} members`]),
    ...(whatIfs === 0 ? [] : [`${whatIfs} what-if${whatIfs === 1 ? "" : "s"}`]),
  ];
  const all = members + whatIfs === 1 ? "in the what-if" : `in all ${counts.join(" and ")}`;
  const parts = [
    ...(counts.length === 0 ? [] : [all]),
    ...(confidence === undefined
      ? []
      : [`with a probability of ${askedText(confidence)} under the stated error`]),
  ];
  return parts.length === 0 ? null : parts.join(", and ");
}

/** What becomes of a departure that does not hold, as `breaks its reserve`. */
const FATES: Partial<Record<FindingCode, string>> = {
  "cannot-hold-track": "cannot hold its track",
  "outside-area": "leaves the area of the forecast",
  "outside-time": "outlasts the forecast",
  gap: "meets a gap in the forecast",
  "outside-power-table": "leaves the craft's power model",
  "store-empty": "runs out of store",
  "reserve-broken": "breaks its reserve",
  "wind-limit": "meets more wind than its limit",
  "gust-limit": "meets stronger gusts than its limit",
  "arrival-missed": "arrives too late",
};

/** What keeps a choice of speed from going on, as `a slower one outlasts the forecast`. */
export function boundText({ beyond, stop }: PaceBound): string {
  if (stop === null) return `the craft's ${beyond === "slower" ? "slowest" : "fastest"}`;
  return `a ${beyond} one ${FATES[stop.code] ?? "is not to be done"}`;
}

/** `breaks its reserve in the what-if "Gale" (and 2 more)` */
export function fateText({ worst, decidedBy, asBad }: Sure): string {
  const { member, whatIf, error } = decidedBy;
  if (error === true) return `is too unsure: ${worst?.message ?? ""}`;
  const isEarly = worst?.code === "arrival-missed" && worst.message.includes(" too early;");
  const fate = isEarly ? "arrives too early" : (FATES[worst?.code ?? "gap"] ?? "does not hold");
  const where = member === null ? `the what-if "${plainText(whatIf ?? "")}"` : `member ${member}`;
  return `${fate} in ${where}${asBad === 0 ? "" : ` (and ${asBad} more)`}`;
}
