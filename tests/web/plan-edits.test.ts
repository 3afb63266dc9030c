import fc from "fast-check";
import { describe, expect, test } from "vitest";
import type { PlanDocument, WaypointDocument } from "../../web/state/plan-document.ts";
import {
  addField,
  changeField,
  deleteField,
  moveField,
  setDeparture,
  setPace,
  setPlanText,
} from "../../web/state/plan-edits.ts";
import {
  addRoute,
  deleteRoute,
  duplicateRoute,
  freeName,
  importRoutes,
  moveRoute,
  renameRoute,
  reverseRoute,
} from "../../web/state/route-edits.ts";
import {
  appendWaypoint,
  deleteWaypoint,
  insertWaypoint,
  moveWaypoint,
  placeWaypoint,
  setWaypointPath,
  setWaypointText,
} from "../../web/state/waypoint-edits.ts";

const PLAN: PlanDocument = {
  format: "legwork-plan/1",
  title: "Round the head",
  departure: "2027-05-04T06:00:00Z",
  craft: { file: "tender.craft.json" },
  routes: [
    {
      name: "Outer",
      waypoints: [
        { name: "Quay", lat: 58.1, lon: -6.4 },
        { name: "Head", lat: "58°15.2'N", lon: "6°41.0'W", stay: "5 min", speed: "9 kn" },
        { name: "Skerrin", lat: 58.4, lon: -7.05, path: "rhumb", speed: "8 kn", height: "60 m" },
      ],
    },
    { name: "Inner", waypoints: [] },
  ],
};

const waypoints = (plan: PlanDocument, route = 0): readonly WaypointDocument[] =>
  plan.routes[route]?.waypoints ?? [];
const names = (plan: PlanDocument, route = 0) => waypoints(plan, route).map(({ name }) => name);

describe("edits of the plan", () => {
  test("set and take away its texts as they are written", () => {
    expect(setPlanText(PLAN, "reserve", "30 min").reserve).toBe("30 min");
    expect(setPlanText(PLAN, "title", "  ")).not.toHaveProperty("title");
    expect(setDeparture(PLAN, "2027-05-04T06:00:00+02:00").departure).toBe("2027-05-04T06:00:00+02:00");
  });

  test("keep only the keys that a pace takes", () => {
    const all = { speed: "12 kn", power: "40 kW" };
    expect(setPace(PLAN, { hold: "power", ...all }).pace).toEqual({ hold: "power", power: "40 kW" });
    expect(setPace(PLAN, { hold: "ground-speed", ...all }).pace).toEqual({
      hold: "ground-speed",
      speed: "12 kn",
    });
    expect(setPace(PLAN, { hold: "least-energy", ...all }).pace).toEqual({ hold: "least-energy" });
    expect(setPace(PLAN, { hold: "through-speed", speed: "" }).pace).toEqual({ hold: "through-speed" });
  });

  test("add, order, change and take out fields", () => {
    const two = addField(addField(PLAN, { role: "wind", file: "a.csv" }), { role: "wind", file: "b.csv" });
    expect(moveField(two, 1, 0).fields?.map(({ file }) => file)).toEqual(["b.csv", "a.csv"]);
    expect(changeField(two, 1, { gaps: "zero" }).fields?.[1]).toEqual({
      role: "wind",
      file: "b.csv",
      gaps: "zero",
    });
    expect(deleteField(deleteField(two, 0), 0)).not.toHaveProperty("fields");
    expect(moveField(two, 9, 0)).toBe(two);
  });
});

describe("edits of routes", () => {
  test("give every route a name of its own", () => {
    expect(freeName(PLAN, "Outer")).toBe("Outer 2");
    expect(freeName(duplicateRoute(PLAN, 0), "Outer 2")).toBe("Outer 3");
    expect(freeName(PLAN, "West")).toBe("West");
    expect(importRoutes(PLAN, [{ name: "Inner", waypoints: [] }]).routes.at(-1)?.name).toBe("Inner 2");
    expect(addRoute(PLAN, "Outer").routes.at(-1)).toEqual({ name: "Outer 2", waypoints: [] });
  });

  test("put a copy beside its original", () => {
    const plan = duplicateRoute(PLAN, 0);
    expect(plan.routes.map(({ name }) => name)).toEqual(["Outer", "Outer 2", "Inner"]);
    expect(waypoints(plan, 1)).toEqual(waypoints(PLAN));
  });

  test("rename, order and delete", () => {
    expect(renameRoute(PLAN, 1, "Sound").routes[1]?.name).toBe("Sound");
    expect(moveRoute(PLAN, 1, 0).routes.map(({ name }) => name)).toEqual(["Inner", "Outer"]);
    expect(deleteRoute(PLAN, 0).routes.map(({ name }) => name)).toEqual(["Inner"]);
  });

  test("reverse a route so that each stretch keeps its path and its ordered speed", () => {
    expect(waypoints(reverseRoute(PLAN, 0))).toEqual([
      { name: "Skerrin", lat: 58.4, lon: -7.05, height: "60 m" },
      { name: "Head", lat: "58°15.2'N", lon: "6°41.0'W", stay: "5 min", path: "rhumb", speed: "8 kn" },
      { name: "Quay", lat: 58.1, lon: -6.4, speed: "9 kn" },
    ]);
  });

  test("reverse heights that were kept from an earlier waypoint into heights of their own", () => {
    const climbing = {
      ...PLAN,
      routes: [
        {
          name: "Survey",
          waypoints: [
            { lat: 1, lon: 1, height: "50 m" },
            { lat: 2, lon: 2 },
            { lat: 3, lon: 3, height: "90 m" },
          ],
        },
      ],
    };
    expect(waypoints(reverseRoute(climbing, 0)).map(({ height }) => height)).toEqual([
      "90 m",
      "50 m",
      "50 m",
    ]);
  });

  test("reversed twice is the same route where every height is written", () => {
    const text = fc.option(fc.constantFrom("8 kn", "9 kn"), { nil: undefined });
    const waypoint = fc
      .record({
        lat: fc.integer({ min: -80, max: 80 }),
        lon: fc.integer({ min: -180, max: 180 }),
        speed: text,
        path: fc.option(fc.constantFrom("geodesic" as const, "rhumb" as const), { nil: undefined }),
        height: fc.constantFrom("10 m", "20 m"),
      })
      .map(({ lat, lon, speed, path, height }) => ({
        lat,
        lon,
        height,
        ...(speed === undefined ? {} : { speed }),
        ...(path === undefined ? {} : { path }),
      }));
    fc.assert(
      fc.property(fc.array(waypoint, { minLength: 1, maxLength: 8 }), (list) => {
        // What the first waypoint says of an arrival is of no leg, and is not kept.
        const [{ lat, lon, height } = { lat: 0, lon: 0, height: "" }, ...rest] = list;
        const plan = { ...PLAN, routes: [{ name: "R", waypoints: [{ lat, lon, height }, ...rest] }] };
        expect(reverseRoute(reverseRoute(plan, 0), 0)).toEqual(plan);
      }),
      { numRuns: 100 },
    );
  });

  test("of a route that does not exist change nothing", () => {
    expect(renameRoute(PLAN, 7, "x")).toBe(PLAN);
    expect(duplicateRoute(PLAN, 7)).toBe(PLAN);
    expect(reverseRoute(PLAN, -1)).toBe(PLAN);
  });
});

describe("edits of waypoints", () => {
  test("append and insert, the split leg keeping its path and speed on both halves", () => {
    const place = { lat: 58.3, lon: -6.9 };
    expect(waypoints(appendWaypoint(PLAN, 1, place), 1)).toEqual([place]);
    const split = waypoints(insertWaypoint(PLAN, 0, 2, place));
    expect(split[2]).toEqual({ ...place, path: "rhumb", speed: "8 kn" });
    expect(split[3]).toEqual(waypoints(PLAN)[2]);
    expect(waypoints(insertWaypoint(PLAN, 0, 0, place))[0]).toEqual(place);
  });

  test("keep positions as they are written", () => {
    const plan = placeWaypoint(PLAN, 0, 1, "58 15.2 N", 353.3);
    expect(waypoints(plan)[1]).toMatchObject({ name: "Head", lat: "58 15.2 N", lon: 353.3, stay: "5 min" });
  });

  test("set, change and take away texts", () => {
    expect(waypoints(setWaypointText(PLAN, 0, 0, "height", "30 m"))[0]?.height).toBe("30 m");
    expect(waypoints(setWaypointText(PLAN, 0, 1, "stay", ""))[1]).not.toHaveProperty("stay");
    expect(waypoints(setWaypointPath(PLAN, 0, 1, "rhumb"))[1]?.path).toBe("rhumb");
  });

  test("delete and reorder", () => {
    expect(names(deleteWaypoint(PLAN, 0, 1))).toEqual(["Quay", "Skerrin"]);
    expect(names(moveWaypoint(PLAN, 0, 2, 0))).toEqual(["Skerrin", "Quay", "Head"]);
    expect(names(moveWaypoint(PLAN, 0, 9, 0))).toEqual(["Quay", "Head", "Skerrin"]);
  });

  test("never change the plan that they were given", () => {
    const before = JSON.stringify(PLAN);
    deleteWaypoint(PLAN, 0, 0);
    moveWaypoint(PLAN, 0, 0, 2);
    insertWaypoint(PLAN, 0, 1, { lat: 0, lon: 0 });
    reverseRoute(PLAN, 0);
    expect(JSON.stringify(PLAN)).toBe(before);
  });
});
