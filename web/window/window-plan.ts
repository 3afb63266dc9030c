import type { PlanDocument, WindowDocument } from "../state/plan-document.ts";

/**
 * What a window's cells rest on, as one text: while it stays the same, so do the cells. The departure, the title and what is
 * decided on top of an estimate leave them as they are.
 */
export function windowKey(plan: PlanDocument, window: WindowDocument, landPending: boolean): string {
  const { craft, pace, reserve, fields = [], routes } = plan;
  const used = fields.map(({ error: _error, ...field }) => field);
  return JSON.stringify({ craft, pace, reserve, fields: used, routes, window, landPending });
}
