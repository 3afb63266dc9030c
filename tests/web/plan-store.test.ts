import { effect } from "@preact/signals";
import { describe, expect, test } from "vitest";
import type { PlanDocument } from "../../web/state/plan-document.ts";
import { setPlanText } from "../../web/state/plan-edits.ts";
import { createPlanStore } from "../../web/state/plan-store.ts";
import { deleteRoute } from "../../web/state/route-edits.ts";
import { appendWaypoint, deleteWaypoint, placeWaypoint } from "../../web/state/waypoint-edits.ts";

const PLAN: PlanDocument = {
  format: "legwork-plan/1",
  departure: "2027-05-04T06:00:00Z",
  craft: {},
  routes: [
    {
      name: "A",
      waypoints: [
        { lat: 1, lon: 1 },
        { lat: 2, lon: 2 },
      ],
    },
    { name: "B", waypoints: [{ lat: 3, lon: 3 }] },
  ],
};

describe("the plan store", () => {
  test("tells its watchers once an edit", () => {
    const store = createPlanStore(PLAN);
    const titles: (string | undefined)[] = [];
    const stop = effect(() => {
      titles.push(store.plan.value.title);
    });
    store.edit("Title", (plan) => setPlanText(plan, "title", "One"));
    store.edit("Nothing", (plan) => plan);
    store.undo();
    stop();
    expect(titles).toEqual([undefined, "One", undefined]);
  });

  test("undoes a drag as one, and shows again what was chosen then", () => {
    const store = createPlanStore(PLAN);
    store.select({ route: 1, waypoint: 0 });
    for (let step = 1; step <= 5; step += 1) {
      store.edit("Move waypoint", (plan) => placeWaypoint(plan, 0, 1, 2, 2 + step), {
        merge: "move 0 1",
        select: { route: 0, waypoint: 1 },
      });
    }
    store.settle();
    expect(store.plan.value.routes[0]?.waypoints[1]?.lon).toBe(7);
    expect(store.selection.value).toEqual({ route: 0, waypoint: 1 });
    store.undo();
    expect(store.plan.value).toBe(PLAN);
    expect(store.selection.value).toEqual({ route: 1, waypoint: 0 });
    expect(store.undoLabel.value).toBeNull();
    expect(store.redoLabel.value).toBe("Move waypoint");
  });

  test("keeps the selection on what exists", () => {
    const store = createPlanStore(PLAN);
    store.select({ route: 0, waypoint: 1 });
    store.edit("Delete", (plan) => deleteWaypoint(plan, 0, 1));
    expect(store.selection.value).toEqual({ route: 0, waypoint: 0 });
    store.select({ route: 5, waypoint: 5 });
    expect(store.selection.value).toEqual({ route: 1, waypoint: null });
    store.edit("Delete", (plan) => deleteRoute(deleteRoute(plan, 0), 0));
    expect(store.selection.value).toEqual({ route: 0, waypoint: null });
  });

  test("knows whether the plan differs from what was saved, undo included", () => {
    const store = createPlanStore(PLAN);
    expect(store.unsaved.value).toBe(false);
    store.edit("Add", (plan) => appendWaypoint(plan, 1, { lat: 4, lon: 4 }));
    expect(store.unsaved.value).toBe(true);
    store.undo();
    expect(store.unsaved.value).toBe(false);
    store.redo();
    store.markSaved();
    expect(store.unsaved.value).toBe(false);
    store.undo();
    expect(store.unsaved.value).toBe(true);
  });

  test("opens another plan as an edit that can be undone, and restarts without one", () => {
    const store = createPlanStore(PLAN);
    const other = { ...PLAN, title: "Other" };
    store.open(other, "Open other.plan.json");
    expect(store.plan.value).toBe(other);
    expect(store.unsaved.value).toBe(false);
    store.undo();
    expect(store.plan.value).toBe(PLAN);
    store.restart(other);
    expect(store.undoLabel.value).toBeNull();
  });
});
