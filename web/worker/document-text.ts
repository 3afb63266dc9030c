import type { CraftDocument, PlanDocument } from "../state/plan-document.ts";
import { serializeCraft, serializePlan } from "./core.ts";

/** The text of a plan's file. */
export function planText(plan: PlanDocument): string {
  return serializePlan(plan as Parameters<typeof serializePlan>[0]);
}

/** The text of a craft's file. */
export function craftText(craft: CraftDocument): string {
  return serializeCraft(craft as Parameters<typeof serializeCraft>[0]);
}
