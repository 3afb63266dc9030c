import type { Preview } from "./desk.ts";
import type { PlanDocument } from "./plan-document.ts";
import { setDeparture, setPace } from "./plan-edits.ts";

/** A plan at another departure, and at another speed where one belongs to it. */
export function departingAt(plan: PlanDocument, { departure, speed, through }: Preview): PlanDocument {
  const later = setDeparture(plan, departure);
  if (speed === null) return later;
  const { pace } = plan;
  const hold = through !== true && pace !== undefined && "hold" in pace ? pace.hold : "through-speed";
  return setPace(later, { hold, speed });
}
