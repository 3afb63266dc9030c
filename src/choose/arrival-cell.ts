import { routeFinding } from "../estimate/findings.ts";
import type { PreparedRoute } from "../estimate/prepare.ts";
import { arrivalSpeed, missedText } from "./arrival-answer.ts";
import type { ArrivalTestsAt } from "./arrival-tests.ts";
import type { ArrivalWindow } from "./arrival-window.ts";
import { findArrival } from "./held-arrival.ts";
import { speedRange } from "./speed-range.ts";
import type { PacelessConditions } from "./speed-trials.ts";
import { cellFinding, type WindowCell, windowCell } from "./window-cell.ts";

/**
 * A route at one departure and the through-speed found for its arrival, as `findArrival` has it; where there is none, at the speed of the
 * nearest arrival, as a stop that says so.
 */
export function arrivalCell(
  prepared: PreparedRoute,
  conditions: PacelessConditions,
  wanted: ArrivalWindow,
  testsAt: ArrivalTestsAt | null,
): WindowCell {
  const { answer } = findArrival(prepared, conditions, wanted, testsAt);
  const speed = arrivalSpeed(answer) ?? speedRange(conditions.craft).max;
  const pace = { hold: "through-speed", speed_m_s: speed } as const;
  const cell = windowCell(prepared, { ...conditions, pace }, conditions.departure, speed);
  if (answer.chosen !== null) return cell;
  const missed = cellFinding(routeFinding("arrival-missed", missedText(answer)));
  return { ...cell, status: "stop", worst: cell.arrival === null ? cell.worst : missed };
}
