import type { DecidedRoute } from "../core.ts";

/* What shows decisions on the ribbons is loaded once there is one. */

export const loadRibbonDecided = () =>
  import("./RibbonDecided.tsx").then(({ RibbonDecided }) => RibbonDecided);
export const loadRibbonSpread = () => import("./RibbonSpread.tsx").then(({ RibbonSpread }) => RibbonSpread);
export const loadSpreadLegend = () => import("./SpreadLegend.tsx").then(({ SpreadLegend }) => SpreadLegend);

/** Whether it is known how sure a route is. */
export function isSpread({ spread, ensemble }: DecidedRoute): boolean {
  return spread != null || ensemble !== undefined;
}

/** Whether anything was decided of a route that its ribbon shows. */
export function isDecided(route: DecidedRoute): boolean {
  return isSpread(route) || route.turnBack !== undefined;
}
