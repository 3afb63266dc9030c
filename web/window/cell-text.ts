import { type Clock, clockFor, type WindowCell } from "../core.ts";
import { clockSince, clockText, durationText, zoneText } from "../format/time-text.ts";
import { inUnit, shownUnit, storeUnit } from "../format/units.ts";
import type { PageState } from "../state/page-state.ts";
import type { WindowShape } from "../worker/protocol.ts";

interface Told {
  readonly shape: Pick<WindowShape, "storeUnit" | "usable" | "speeds">;
  /** Longest passage of the window, s: as in the command's table, it says whether arrivals have seconds. */
  readonly longest_s: number;
}

/** A cell in words and figures: when, which route, what it comes to, and what speaks against it. */
export function cellText(
  { view }: PageState,
  cell: WindowCell,
  { shape: { storeUnit: unit, usable, speeds }, longest_s }: Told,
): string {
  const zone = view.zone.value;
  const speed = shownUnit(view.units.value, "speed");
  const when = `${clockText(cell.departure, zone, true, clockOfDeparture(cell))} ${zoneText(cell.departure, zone)}`;
  const at =
    cell.speed_m_s === null || speeds === null ? "" : ` at ${inUnit(cell.speed_m_s, speed)} ${speed.symbol}`;
  const head = `${when}, ${cell.route}${at}: `;
  const amount = storeUnit(unit, usable);
  const clock = clockFor(longest_s);
  const figures =
    cell.arrival === null
      ? ""
      : `${durationText(cell.passage_s, clock)}, arrives ${clockSince(cell.arrival, cell.departure, zone, clock)}, uses ${inUnit(cell.use, amount)} ${amount.symbol}, ${inUnit(cell.remaining, amount)} left`;
  if (cell.worst === null || cell.status === "clear") return head + figures;
  const against = `${cell.status === "stop" ? "cannot be done: " : "caution: "}${cell.worst.message}`;
  return head + (figures === "" ? against : `${figures}; ${against}`);
}

/** A departure between whole minutes would else look like another. */
function clockOfDeparture({ departure }: WindowCell): Clock {
  return Date.parse(departure) % 60_000 === 0 ? "minute" : "second";
}
