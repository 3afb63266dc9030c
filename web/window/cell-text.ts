import type { WindowCell } from "../core.ts";
import { clockSince, clockText, durationText, zoneText } from "../format/time-text.ts";
import { inUnit, shownUnit, storeUnit } from "../format/units.ts";
import type { PageState } from "../state/page-state.ts";
import type { WindowShape } from "../worker/protocol.ts";

/** A cell in words and figures: when, which route, what it comes to, and what speaks against it. */
export function cellText(
  { view }: PageState,
  cell: WindowCell,
  { storeUnit: unit, usable, speeds }: Pick<WindowShape, "storeUnit" | "usable" | "speeds">,
): string {
  const zone = view.zone.value;
  const speed = shownUnit(view.units.value, "speed");
  const when = `${clockText(cell.departure, zone, true)} ${zoneText(cell.departure, zone)}`;
  const at =
    cell.speed_m_s === null || speeds === null ? "" : ` at ${inUnit(cell.speed_m_s, speed)} ${speed.symbol}`;
  const head = `${when}, ${cell.route}${at}: `;
  const amount = storeUnit(unit, usable);
  const figures =
    cell.arrival === null
      ? ""
      : `${durationText(cell.passage_s)}, arrives ${clockSince(cell.arrival, cell.departure, zone)}, uses ${inUnit(cell.use, amount)} ${amount.symbol}, ${inUnit(cell.remaining, amount)} left`;
  if (cell.worst === null || cell.status === "clear") return head + figures;
  const against = `${cell.status === "stop" ? "cannot be done: " : "caution: "}${cell.worst.message}`;
  return head + (figures === "" ? against : `${figures}; ${against}`);
}
