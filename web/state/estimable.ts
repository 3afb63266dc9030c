import type { PlanDocument } from "./plan-document.ts";

/** The part of a plan that can be estimated, and which of the page's routes each of its routes is. */
export interface Estimable {
  readonly plan: PlanDocument;
  readonly routes: readonly number[];
}

/** Leaves out routes still being drawn (fewer than two waypoints); `null` where nothing remains. */
export function estimable(plan: PlanDocument): Estimable | null {
  const routes = plan.routes.flatMap((route, index) => (route.waypoints.length >= 2 ? [index] : []));
  if (routes.length === 0) return null;
  if (routes.length === plan.routes.length) return { plan, routes };
  return { plan: { ...plan, routes: plan.routes.filter((_, index) => routes.includes(index)) }, routes };
}
