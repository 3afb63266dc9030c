import { fullTimeText } from "../format/time-text.ts";
import type { WindowDocument } from "../state/plan-document.ts";

/** A window in a sentence, as a print has it in place of its fields. */
export function windowWords({ from, to, every, speeds, arriveBy }: WindowDocument, zone: string): string {
  const time = (text: string): string => {
    const instant = Date.parse(text);
    return Number.isNaN(instant) ? text : fullTimeText(instant, zone);
  };
  const at = speeds === undefined ? "" : `, at ${speeds.join(", ")}`;
  const keep = arriveBy === undefined ? "" : `, to arrive by ${time(arriveBy)}`;
  return `Departures from ${time(from)} to ${time(to)}, every ${every}${at}${keep}.`;
}
