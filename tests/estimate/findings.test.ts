import { describe, expect, test } from "vitest";
import type { Craft } from "../../src/craft/craft.ts";
import { cubePower } from "../../src/craft/cube.ts";
import { estimate } from "../../src/estimate/estimate.ts";
import { WGS84 } from "../../src/geodesy/ellipsoid.ts";
import { geodesicInverse } from "../../src/geodesy/geodesic.ts";
import { craftOf, DEPARTURE, estimateOf, gridField, routeOf, spaced, waypoint } from "./fixtures.ts";

const box = { lon: spaced(-2, 12, 14), lat: spaced(-2, 2, 4) };
const one = routeOf(waypoint("A", 0, 0), waypoint("B", 0, 10));
const two = routeOf(waypoint("A", 0, 0), waypoint("B", 0, 5), waypoint("C", 0, 10));
const degree = geodesicInverse(WGS84, { lat: 0, lon: 0 }, { lat: 0, lon: 1 }).distance;
const quiet = craftOf().limits;

describe("limits", () => {
  test("wind above the craft's limit is a stop with its extent and its peak, and leaves the figures standing", () => {
    const craft = craftOf({ limits: { ...quiet, wind_m_s: 5 } });
    // u rises by 1 m/s a degree: above 5 m/s from 5° on, up to 10 m/s at B.
    const { estimate: route } = estimateOf(two, {
      craft,
      fields: [gridField("wind", box, (lon) => [lon, 0])],
    });
    const found = route.findings.filter(({ code }) => code === "wind-limit");
    expect(found).toHaveLength(1);
    expect(found[0]).toMatchObject({ severity: "stop", leg: 2 });
    expect(found[0]?.at_m).toBeCloseTo(0, 3);
    expect(found[0]?.to_m).toBeCloseTo(5 * degree, 3);
    expect(found[0]?.message).toContain("10.0 m/s (19.4 kn)");
    expect(route.status).toBe("stop");
    expect(route.totals.time_s).not.toBeNull();
    expect(route.reached).toBeUndefined();
  });

  test("repeats on one leg merge into one finding that counts them", () => {
    const craft = craftOf({ limits: { ...quiet, wind_m_s: 3 } });
    const bumps = gridField("wind", box, (lon) => [lon % 2 === 0 ? 0 : 4, 0]);
    const found = estimateOf(one, { craft, fields: [bumps] }).estimate.findings;
    expect(found).toHaveLength(1);
    expect(found[0]?.message).toContain("5 times");
    // Above 3 m/s on half a degree around each odd meridian.
    expect(found[0]?.at_m).toBeCloseTo(0.75 * degree, 2);
    expect(found[0]?.to_m).toBeCloseTo(9.25 * degree, 2);
  });

  test("gusts are held against their own limit, and their absence is told", () => {
    const craft = craftOf({ limits: { ...quiet, gust_m_s: 12 } });
    const gusts = [Float64Array.from(box.lat.flatMap(() => box.lon.map((lon) => 10 + lon / 2)))];
    const gusty = estimateOf(one, {
      craft,
      fields: [gridField("wind", box, () => [1, 0], { gusts })],
    }).estimate;
    expect(gusty.findings.map(({ code }) => code)).toEqual(["gust-limit"]);
    expect(gusty.findings[0]?.at_m).toBeCloseTo(4 * degree, 2);
    const plain = estimateOf(one, { craft, fields: [gridField("wind", box, () => [1, 0])] }).estimate;
    expect(plain.status).toBe("clear");
    expect(plain.findings[0]?.message).toContain("gust limit is not checked");
  });

  test("slow over ground, with the least speed", () => {
    const craft = craftOf({ limits: { ...quiet, groundSpeed_m_s: 6 } });
    const { estimate: route } = estimateOf(one, {
      craft,
      fields: [gridField("wind", box, (lon) => [-lon / 2, 0])],
    });
    expect(route.findings[0]).toMatchObject({ code: "slow-over-ground", severity: "caution" });
    expect(route.findings[0]?.at_m).toBeCloseTo(8 * degree, 2);
    expect(route.findings[0]?.message).toContain("down to 5.0 m/s");
  });

  test("a flow that overtakes an ordered ground speed is told", () => {
    const { estimate: route } = estimateOf(one, {
      pace: { hold: "ground-speed", speed_m_s: 4 },
      fields: [gridField("wind", box, (lon) => [lon, 0])],
    });
    expect(route.findings[0]).toMatchObject({ code: "stems-flow", severity: "caution" });
    expect(route.findings[0]?.at_m).toBeCloseTo(4 * degree, 2);
  });
});

describe("wind against current", () => {
  const boat = craftOf({
    moves: "water",
    power: cubePower({ referenceSpeed_m_s: 5, referencePower_W: 10_000 }),
  });
  const current = gridField("current", box, () => [1, 0]);
  const ask = (u: number, v: number, drift = 1) =>
    estimateOf(one, {
      craft: boat,
      fields: [
        drift === 1 ? current : gridField("current", box, () => [drift, 0]),
        gridField("wind", box, () => [u, v]),
      ],
    }).estimate.findings.map(({ code }) => code);

  test("is within 60° of dead against the set, above both speeds (common practice)", () => {
    const at = (angle: number, speed: number) => {
      const off = (angle * Math.PI) / 180;
      return ask(-speed * Math.cos(off), speed * Math.sin(off));
    };
    expect(at(0, 9)).toEqual(["wind-against-current"]);
    expect(at(59, 9)).toEqual(["wind-against-current"]);
    expect(at(61, 9)).toEqual([]);
    expect(at(180, 9)).toEqual([]);
    expect(at(0, 7.9)).toEqual([]);
    expect(ask(-9, 0, 0.4)).toEqual([]);
  });
});

describe("the store", () => {
  test("falls below the reserve and to nothing at the places that the rate says, once a leg", () => {
    // 1 kW at 10 m/s is 100 J/m; the store holds 8 degrees, the reserve 2 of them.
    const usable = 800 * degree;
    const craft = craftOf({ store: { unit: "J", usable } });
    const { estimate: route } = estimateOf(two, { craft, reserve: { kind: "share", share: 0.25 } });
    expect(route.reserve).toBeCloseTo(usable / 4, 3);
    expect(route.findings.map(({ code, leg }) => [code, leg])).toEqual([
      ["reserve-broken", 2],
      ["store-empty", 2],
    ]);
    expect(route.findings[0]?.at_m).toBeCloseTo(degree, 2);
    expect(route.findings[1]?.at_m).toBeCloseTo(3 * degree, 2);
    expect(route.totals.remaining).toBeCloseTo(-200 * degree, 2);
    expect(route.legs[1]?.remaining).toBeCloseTo(-200 * degree, 2);
  });

  test("a reserve as time counts the final leg's own rate under way", () => {
    const { estimate: route } = estimateOf(two, { reserve: { kind: "time", time_s: 1800 } });
    expect(route.reserve).toBeCloseTo(1_800_000, 3);
  });

  test("a reserve as an amount stands as it is", () => {
    expect(estimateOf(two, { reserve: { kind: "amount", amount: 5 } }).estimate.reserve).toBe(5);
  });

  test("what is spent while staying may break the reserve at the waypoint", () => {
    const craft = craftOf({
      moves: "water",
      hotelPerSecond: 500,
      store: { unit: "J", usable: 150 * 5 * degree + 3600 * 250 },
    });
    const stay = routeOf(waypoint("A", 0, 0), waypoint("B", 0, 5, { stay_s: 3600 }), waypoint("C", 0, 10));
    const { estimate: route } = estimateOf(stay, { craft });
    expect(route.findings[0]).toMatchObject({ code: "store-empty", leg: 1 });
    expect(route.findings[0]?.at_m).toBeCloseTo(5 * degree, 6);
    expect(route.findings[0]?.message).toContain("at B");
    expect(route.legs[0]?.use).toBeCloseTo(150 * 5 * degree + 3600 * 500, 3);
  });
});

describe("notes", () => {
  const base = {
    title: "T",
    departure: DEPARTURE,
    pace: { hold: "through-speed", speed_m_s: 10 } as const,
    reserve: null,
    routes: [one],
    land: null,
  };

  test("a plan without fields is a still-medium estimate, with a note", () => {
    const answer = estimate({ ...base, craft: craftOf(), fields: [] }).estimate;
    expect(answer.routes[0]?.status).toBe("clear");
    expect(answer.routes[0]?.findings).toMatchObject([{ code: "no-field", severity: "note", leg: null }]);
  });

  test("a current in the plan of a craft in the air is left out, with a note", () => {
    const fields = [gridField("current", box, () => [50, 0]), gridField("wind", box, () => [0, 0])];
    const answer = estimate({ ...base, craft: craftOf(), fields }).estimate;
    expect(answer.routes[0]?.findings).toMatchObject([{ code: "field-unused" }]);
    expect(answer.routes[0]?.legs[0]?.current).toBeNull();
    expect(answer.routes[0]?.legs[0]?.time_s).toBeCloseTo(degree, 5);
  });

  test("a wind that a boat without windage does not feel is told", () => {
    const wind = gridField("wind", box, () => [3, 0]);
    const stream = gridField("current", box, () => [0.5, 0]);
    const notesOf = (windage: Craft["windage"]) =>
      estimate({
        title: "",
        departure: DEPARTURE,
        craft: craftOf({ name: "Launch", moves: "water", windage }),
        pace: { hold: "through-speed", speed_m_s: 10 },
        reserve: null,
        fields: [stream, wind],
        routes: [two],
        land: null,
      }).estimate.routes[0]?.findings.filter(({ code }) => code === "field-unused");
    expect(notesOf(null)).toMatchObject([
      {
        severity: "note",
        leg: null,
        message:
          "the wind changes neither time nor use: Launch names no windage; it is read for limits and cautions alone",
      },
    ]);
    const windage = { frontalArea_m2: 7, dragCoefficient: 0.9, efficiency: 0.6, airDensity_kg_m3: 1.225 };
    expect(notesOf(windage)).toEqual([]);
  });

  test("beyond 85° of latitude is told, with the distance", () => {
    const polar = routeOf(waypoint("A", 84, 0), waypoint("B", 84, 90));
    const { estimate: route } = estimateOf(polar);
    expect(route.findings).toMatchObject([{ code: "near-pole", severity: "note", leg: 1 }]);
  });

  test("outside the magnetic model's dates the course is empty, with one note", () => {
    const { estimate: route } = estimateOf(two, { departure: Date.UTC(2031, 0, 1) });
    expect(route.legs.map(({ magneticCourse_deg }) => magneticCourse_deg)).toEqual([null, null]);
    expect(route.findings.map(({ code }) => code)).toEqual(["no-variation"]);
  });
});

describe("heights", () => {
  const levels = { ...box, height: [10, 60, 120] };
  const shear = gridField("wind", levels, (_lon, _lat, _hours, height) => [height / 20, 0]);

  test("the wind is linear between levels, and the level lines are kinks", () => {
    const climbing = routeOf(waypoint("A", 0, 0, { height_m: 10 }), waypoint("B", 0, 1, { height_m: 110 }));
    const { estimate: route } = estimateOf(climbing, { fields: [shear] });
    // u = h/20 with h from 10 to 110 m along the leg: T = L/(g1 - g0) ln(g1/g0).
    const exact = (degree / 5) * Math.log(15.5 / 10.5);
    // Just above the 2.7e-13 that the rule of degree 7 leaves of 1/g over two long panels; a halved one leaves 1e-15.
    expect(Math.abs((route.legs[0]?.time_s ?? 0) - exact) / exact).toBeLessThan(5e-13);
    expect(Math.abs((route.legs[0]?.time_s ?? 0) - exact)).toBeLessThan(route.legs[0]?.error?.time_s ?? 0);
  });

  test("outside the levels the nearest holds, told but covered", () => {
    const high = routeOf(waypoint("A", 0, 0, { height_m: 200 }), waypoint("B", 0, 1, { height_m: 200 }));
    const { estimate: route } = estimateOf(high, { fields: [shear] });
    expect(route.findings).toMatchObject([{ code: "height-outside-field", severity: "caution" }]);
    expect(route.legs[0]?.wind?.covered).toBe(1);
    expect(route.legs[0]?.time_s).toBeCloseTo(degree / 16, 6);
  });

  test("a route without heights is at the lowest level", () => {
    const { estimate: route } = estimateOf(routeOf(waypoint("A", 0, 0), waypoint("B", 0, 1)), {
      fields: [shear],
    });
    expect(route.findings).toEqual([]);
    expect(route.legs[0]?.time_s).toBeCloseTo(degree / 10.5, 6);
  });
});
