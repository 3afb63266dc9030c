import { askedText, fateText, percentText, type Sure, type SureWindow, triedText } from "../core.ts";
import { SeverityShape } from "../ledger/StatusMark.tsx";
import "./sure.css";

interface SureMarkProps {
  readonly sure: Sure;
  /** What it was tried in. */
  readonly of: SureWindow;
}

/** What a departure comes to in every member and what-if of the plan: a shape, and words that say it too. */
export function SureMark({ sure, of }: SureMarkProps) {
  return (
    <span class={`sure ${sure.status}`}>
      <SeverityShape severity={sure.status} /> {sureText(sure, of)}
    </span>
  );
}

/** `stop: breaks its reserve in member 3 (and 1 more)`, `clear in all 7 members and 3 what-ifs; under the stated error …` */
function sureText(sure: Sure, of: SureWindow): string {
  const { status, decidedBy, reserveHolds } = sure;
  const { members, whatIfs, confidence } = of;
  const tried = triedText({ members, whatIfs });
  const asked = confidence === undefined ? "" : `, ${askedText(confidence)} asked for`;
  const chance =
    reserveHolds === null
      ? ""
      : `; under the stated error the reserve holds with a probability of ${percentText(reserveHolds)}${asked}`;
  if (decidedBy.error === true) return `stop: ${fateText(sure)}`;
  if (status === "stop") return `stop: ${fateText(sure)}${chance}`;
  const where = tried === null ? "" : `holds ${tried}`;
  const isPlain = decidedBy.member === null && decidedBy.whatIf === null;
  const why = isPlain || sure.worst === null ? "" : `, with a caution ${variantText(sure)}`;
  return `${status}: ${where}${why}${chance}`.replace(": ;", ":");
}

function variantText({ decidedBy: { member, whatIf }, worst }: Sure): string {
  return `in ${member === null ? `the what-if "${whatIf}"` : `member ${member}`}: ${worst?.message ?? ""}`;
}
