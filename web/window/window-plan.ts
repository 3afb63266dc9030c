import type { PlanDocument, WindowDocument } from "../state/plan-document.ts";

/**
 * What a window rests on, as one text: while it stays the same, so do the cells and how sure the bests are. The departure, the title and
 * the alternates leave them as they are.
 */
export function windowKey(plan: PlanDocument, window: WindowDocument, landPending: boolean): string {
  const { craft, pace, reserve, fields = [], routes, whatIf = [] } = plan;
  return JSON.stringify({ craft, pace, reserve, fields, routes, whatIf, window, landPending });
}
