import type { PlanDocument } from "./plan-document.ts";

/** What there is before anything is opened. */
export const EMPTY_PLAN: PlanDocument = {
  format: "legwork-plan/1",
  departure: "2027-05-04T06:00:00Z",
  craft: {},
  routes: [],
};
