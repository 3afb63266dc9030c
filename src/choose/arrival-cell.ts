import { routeFinding } from "../estimate/findings.ts";
import type { PreparedRoute } from "../estimate/prepare.ts";
import { arrivalSpeed, missedText } from "./arrival-answer.ts";
import type { ArrivalWindow } from "./arrival-window.ts";
import { solveArrival } from "./arrive.ts";
import { speedRange } from "./speed-range.ts";
import type { PacelessConditions } from "./speed-trials.ts";
import { cellFinding, type WindowCell, windowCell } from "./window-cell.ts";

/**
 * A route at one departure and the cheapest through-speed that arrives when it should; where there is none, at the speed of the
 * nearest arrival, as a stop that says so.
 */
export function arrivalCell(
  prepared: PreparedRoute,
  conditions: PacelessConditions,
  wanted: ArrivalWindow,
): WindowCell {
  const answer = solveArrival(prepared, conditions, wanted);
  const speed = arrivalSpeed(answer) ?? speedRange(conditions.craft).max;
  const pace = { hold: "through-speed", speed_m_s: speed } as const;
  const cell = windowCell(prepared, { ...conditions, pace }, conditions.departure, speed);
  if (answer.chosen !== null) return cell;
  const missed = cellFinding(routeFinding("arrival-missed", missedText(answer)));
  return { ...cell, status: "stop", worst: cell.arrival === null ? cell.worst : missed };
}
