import type { Sure } from "../choose/sure.ts";
import type { SureWindow } from "../choose/sure-window.ts";
import type { FindingCode } from "../estimate/result.ts";
import { plainText } from "./plain-text.ts";

/** What the bests were tried in: `all 7 members and 3 what-ifs`; `null` where the plan names neither. */
export function triedText({ members, whatIfs }: Pick<SureWindow, "members" | "whatIfs">): string | null {
  const counts = [
    ...(members === 0 ? [] : [`${members} members`]),
    ...(whatIfs === 0 ? [] : [`${whatIfs} what-if${whatIfs === 1 ? "" : "s"}`]),
  ];
  if (counts.length === 0) return null;
  return members + whatIfs === 1 ? "the what-if" : `all ${counts.join(" and ")}`;
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

/** `breaks its reserve in the what-if "Gale" (and 2 more)` */
export function fateText({ worst, decidedBy, asBad }: Sure): string {
  const fate = FATES[worst?.code ?? "gap"] ?? "does not hold";
  const { member, whatIf } = decidedBy;
  const where = member === null ? `the what-if "${plainText(whatIf ?? "")}"` : `member ${member}`;
  return `${fate} in ${where}${asBad === 0 ? "" : ` (and ${asBad} more)`}`;
}
