import { expect, test } from "vitest";
import { changeAlternate, deleteAlternate } from "../../web/state/decide-edits.ts";
import { estimatesAlike } from "../../web/state/decisions.ts";
import type { PlanDocument } from "../../web/state/plan-document.ts";
import { setDeparture, setPlanText } from "../../web/state/plan-edits.ts";
import { placeWaypoint } from "../../web/state/waypoint-edits.ts";

const PLAN: PlanDocument = {
  format: "legwork-plan/1",
  departure: "2027-05-04T11:00Z",
  craft: { file: "boat.craft.json" },
  alternates: [{ name: "Quay", lat: 1, lon: 2 }],
  routes: [
    {
      name: "East",
      waypoints: [
        { lat: 0, lon: 0 },
        { lat: 0, lon: 1 },
      ],
    },
  ],
};

test("plans that differ by their alternates alone have the same estimates, others have not", () => {
  expect(estimatesAlike(PLAN, PLAN)).toBe(true);
  expect(estimatesAlike(PLAN, changeAlternate(PLAN, 0, { lat: 3 }))).toBe(true);
  expect(estimatesAlike(deleteAlternate(PLAN, 0), PLAN)).toBe(true);
  expect(estimatesAlike(PLAN, setDeparture(PLAN, "2027-05-04T12:00Z"))).toBe(false);
  expect(estimatesAlike(PLAN, setPlanText(PLAN, "reserve", "20 %"))).toBe(false);
  expect(estimatesAlike(setPlanText(PLAN, "reserve", "20 %"), PLAN)).toBe(false);
  expect(estimatesAlike(PLAN, placeWaypoint(PLAN, 0, 1, 0, 2))).toBe(false);
});
