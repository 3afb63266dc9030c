import fc from "fast-check";
import { describe, expect, test } from "vitest";
import type { ArrivalWindow } from "../../src/choose/arrival-window.ts";
import { solveArrival } from "../../src/choose/arrive.ts";
import { estimateArriving } from "../../src/choose/arriving-estimate.ts";
import { latestDeparture } from "../../src/choose/latest-departure.ts";
import { windowCell } from "../../src/choose/window-cell.ts";
import type { Craft } from "../../src/craft/craft.ts";
import { cubePower } from "../../src/craft/cube.ts";
import { type EstimateInput, estimate, prepareRoutes } from "../../src/estimate/estimate.ts";
import { prepareRoute } from "../../src/estimate/prepare.ts";
import type { ArrivalAnswer } from "../../src/estimate/result.ts";
import type { Route } from "../../src/estimate/route.ts";
import type { Field } from "../../src/field/field.ts";
import { WGS84 } from "../../src/geodesy/ellipsoid.ts";
import { geodesicInverse } from "../../src/geodesy/geodesic.ts";
import { craftOf, DEPARTURE, gridField, HOUR, routeOf, spaced, waypoint } from "../estimate/fixtures.ts";

const KNOT = 1852 / 3600;
const PERIOD = 12.42;
const FIVE_MINUTES = 300_000;
const boat = craftOf({
  moves: "water",
  power: cubePower({ referenceSpeed_m_s: 5, referencePower_W: 20_000 }),
  speeds: { min: 1, max: 12 },
});
const east = routeOf(waypoint("A", 0, 0), waypoint("B", 0, 1));
const distance = geodesicInverse(WGS84, { lat: 0, lon: 0 }, { lat: 0, lon: 1 }).distance;
const box = { lon: spaced(-2, 3, 10), lat: spaced(-2, 2, 8) };

/** A stream along the equator, sinusoidal in time, given in steps of so many hours. */
function tide(amplitude: number, phase = 0, step = 1): Field {
  const timed = { ...box, hours: spaced(-2, 120, Math.round(122 / step)) };
  return gridField("current", timed, (_lon, _lat, hours) => [
    amplitude * Math.sin((2 * Math.PI * hours) / PERIOD + phase),
    0,
  ]);
}

function answerOf(
  wanted: ArrivalWindow,
  fields: readonly Field[],
  {
    route = east,
    craft = boat,
    departure = DEPARTURE,
  }: { route?: Route; craft?: Craft; departure?: number } = {},
): ArrivalAnswer {
  return solveArrival(prepareRoute(route, fields), { departure, craft, reserve: null, fields }, wanted);
}

function at(hours: number): ArrivalWindow {
  const time = DEPARTURE + hours * HOUR;
  return { notBefore: time, notAfter: time };
}

describe("the through-speed that arrives at a time", () => {
  test("in a uniform stream is D/T - a", () => {
    for (const stream of [-2, -0.5, 0, 1.5]) {
      const fields = [gridField("current", box, () => [stream, 0])];
      const { solutions, chosen, reason } = answerOf(at(6), fields);
      expect(solutions).toHaveLength(1);
      expect(chosen).toBe(0);
      expect(reason).toBeNull();
      expect(solutions[0]?.speed_m_s).toBeCloseTo(distance / (6 * 3600) - stream, 9);
      expect(solutions[0]?.arrival).toBe(new Date(DEPARTURE + 6 * HOUR).toISOString());
    }
  });

  test("across a uniform stream is sqrt((D/T)² + c²)", () => {
    const fields = [gridField("current", box, () => [0, 1.2])];
    const [solution] = answerOf(at(5), fields).solutions;
    expect(solution?.speed_m_s).toBeCloseTo(Math.hypot(distance / (5 * 3600), 1.2), 9);
  });

  test("in a sinusoidal stream is (D - ∫ a dt)/T, by LINE-09's relation D = V T + (A P/2π)(1 - cos(2πT/P))", () => {
    const amplitude = 2.5 * KNOT;
    const seconds = PERIOD * 3600;
    for (const hours of [4, 6.5, 9, 11.975068383698806]) {
      const time = hours * 3600;
      const set = ((amplitude * seconds) / (2 * Math.PI)) * (1 - Math.cos((2 * Math.PI * time) / seconds));
      const speed = (distance - set) / time;
      // Above the amplitude, so that the stream never stands against the craft, which the relation does not know.
      expect(speed).toBeGreaterThan(2);
      const craft = { ...boat, speeds: { min: 2, max: 12 } };
      const [solution] = answerOf(at(hours), [tide(amplitude, 0, 0.25)], { craft }).solutions;
      // The field is linear between quarter hours: off by A (2π/P)² h²/12 in the mean, 0.13 % of the stream.
      expect(Math.abs((solution?.speed_m_s ?? 0) - speed)).toBeLessThan(0.0013 * amplitude);
    }
  });

  test("arrives within 0.1 s of the time asked, and once only, as trying all speeds shows", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0, max: 3.5, noNaN: true }),
        fc.double({ min: 0, max: 6.28, noNaN: true }),
        fc.double({ min: 2.6, max: 30, noNaN: true }),
        (amplitude, phase, hours) => {
          const fields = [tide(amplitude, phase)];
          const wanted = at(Math.round(hours * 3600) / 3600);
          const { solutions, nearest } = answerOf(wanted, fields);
          const prepared = prepareRoute(east, fields);
          const passages = spaced(1, 12, 110).map((speed) => {
            const pace = { hold: "through-speed", speed_m_s: speed } as const;
            return windowCell(
              prepared,
              { departure: DEPARTURE, craft: boat, pace, reserve: null, fields },
              DEPARTURE,
              null,
            ).passage_s;
          });
          const off = passages.map((passage) =>
            passage === null ? null : passage - (wanted.notAfter - DEPARTURE) / 1000,
          );
          const crossings = off.filter((value, n) => {
            const before = off[n - 1];
            return value !== null && before !== null && before !== undefined && before > 0 !== value > 0;
          });
          expect(crossings.length).toBeLessThanOrEqual(1);
          expect(solutions.length).toBeLessThanOrEqual(1);
          expect(solutions.length).toBeGreaterThanOrEqual(crossings.length);
          for (const { arrival } of solutions)
            expect(Math.abs(Date.parse(arrival) - wanted.notAfter)).toBeLessThan(100);
          expect(nearest === null).toBe(
            solutions.length > 0 || passages.every((passage) => passage === null),
          );
        },
      ),
      { numRuns: 8 },
    );
  });

  test("equals a lone estimate at that speed", () => {
    const fields = [tide(1.5)];
    const [solution] = answerOf(at(7), fields).solutions;
    if (solution === undefined) throw new Error("no solution");
    const pace = { hold: "through-speed", speed_m_s: solution.speed_m_s } as const;
    const input = {
      title: "",
      departure: DEPARTURE,
      craft: boat,
      pace,
      reserve: null,
      fields,
      routes: [east],
      land: null,
    };
    const [lone] = estimate(input).estimate.routes;
    expect(lone?.arrival).toBe(solution.arrival);
    expect(lone?.totals.use).toBe(solution.use);
    expect(lone?.totals.remaining).toBe(solution.remaining);
  });

  test("counts stays on the way, not one at the end", () => {
    const route = routeOf(
      waypoint("A", 0, 0),
      waypoint("M", 0, 0.5, { stay_s: 1800 }),
      waypoint("B", 0, 1, { stay_s: 900 }),
    );
    const [solution] = answerOf(at(6), [], { route }).solutions;
    expect(solution?.speed_m_s).toBeCloseTo(distance / (5.5 * 3600), 8);
  });

  test("keeps the own speed of a leg that names one", () => {
    const route = routeOf(waypoint("A", 0, 0), waypoint("M", 0, 0.5, { speed_m_s: 4 }), waypoint("B", 0, 1));
    const [solution] = answerOf(at(6), [], { route }).solutions;
    expect(solution?.speed_m_s).toBeCloseTo(distance / 2 / (6 * 3600 - distance / 8), 8);
  });
});

describe("a gate that is shut for some speeds", () => {
  /** Along the second half of the leg a stream of 4 m/s sets against the craft from 3 h to 5 h after departure. */
  const gate = gridField(
    "current",
    { ...box, lon: [-2, 0.5, 0.51, 3], hours: [-1, 3, 3.1, 4.9, 5, 200] },
    (lon, _lat, hours) => [lon > 0.505 && hours > 3.05 && hours < 4.95 ? -4 : 0, 0],
  );
  const slow = { ...boat, speeds: { min: 2, max: 12 } };

  test("speeds that meet it shut are no solution, and the nearest arrival says why", () => {
    // From 3.5 to 4 m/s the craft meets the gate shut and cannot pass: what would arrive at about 9 h is stopped.
    const prepared = prepareRoute(east, [gate]);
    const speeds = spaced(2, 12, 200);
    const completes = speeds.map((speed) => {
      const pace = { hold: "through-speed", speed_m_s: speed } as const;
      return windowCell(
        prepared,
        { departure: DEPARTURE, craft: slow, pace, reserve: null, fields: [gate] },
        DEPARTURE,
        null,
      );
    });
    const shut = speeds.filter((_, n) => completes[n]?.arrival === null);
    expect(shut.length).toBeGreaterThan(5);
    expect(completes[0]?.arrival).not.toBeNull();
    const { solutions, nearest, reason } = answerOf(at(9), [gate], { craft: slow });
    expect(solutions).toEqual([]);
    expect(nearest).not.toBeNull();
    expect(reason).toMatch(/that speed the route is not completed: leg 1, .*: the track cannot be held/);
    const early = answerOf(at(13), [gate], { craft: slow });
    expect(early.solutions).toHaveLength(1);
    expect(early.solutions[0]?.speed_m_s).toBeLessThan(shut[0] ?? 0);
    expect(answerOf(at(4), [gate], { craft: slow }).solutions[0]?.speed_m_s).toBeGreaterThan(shut[0] ?? 0);
  });

  test("an arrival window takes the cheapest speed of those on both sides", () => {
    const { solutions, chosen } = answerOf(
      { notBefore: DEPARTURE + 4 * HOUR, notAfter: DEPARTURE + 13.2 * HOUR },
      [gate],
      { craft: slow },
    );
    expect(solutions).toHaveLength(2);
    const cheapest = solutions.reduce((a, b) => (a.use < b.use ? a : b));
    expect(solutions[chosen ?? -1]).toBe(cheapest);
  });
});

describe("an arrival between two times", () => {
  test("is made at the slowest speed where going slower is always cheaper", () => {
    const { solutions, chosen } = answerOf(
      { notBefore: DEPARTURE + 5 * HOUR, notAfter: DEPARTURE + 7 * HOUR },
      [],
    );
    expect(chosen).toBe(0);
    expect(solutions[0]?.speed_m_s).toBeCloseTo(distance / (7 * 3600), 8);
  });

  test("is made at the speed of least use where that lies inside", () => {
    // Hotel load h beside k V³: the least of (k V³ + h)/V is at V³ = h/(2k).
    const craft = { ...boat, hotelPerSecond: 20_000 };
    const { solutions, chosen } = answerOf({ notBefore: null, notAfter: DEPARTURE + 20 * HOUR }, [], {
      craft,
    });
    expect(chosen).toBe(0);
    expect(solutions).toHaveLength(1);
    expect(solutions[0]?.speed_m_s).toBeCloseTo(5 * Math.cbrt(0.5), 6);
  });

  test("narrower than the scan's step is found all the same", () => {
    const wanted = { notBefore: DEPARTURE + 6 * HOUR, notAfter: DEPARTURE + 6 * HOUR + 1000 };
    const { solutions } = answerOf(wanted, [tide(1)]);
    expect(solutions).toHaveLength(1);
    const arrival = Date.parse(solutions[0]?.arrival ?? "");
    expect(arrival).toBeGreaterThanOrEqual(wanted.notBefore - 1);
    expect(arrival).toBeLessThanOrEqual(wanted.notAfter + 1);
  });

  test("prefers a solution that keeps the reserve", () => {
    const prepared = prepareRoute(east, []);
    const craft = { ...boat, limits: { ...boat.limits }, store: { unit: "J", usable: 1e5 } as const };
    const answer = solveArrival(prepared, { departure: DEPARTURE, craft, reserve: null, fields: [] }, at(6));
    expect(answer.chosen).toBe(0);
    expect(answer.solutions[0]?.status).toBe("stop");
  });

  test("ends after it begins", () => {
    expect(() => answerOf({ notBefore: DEPARTURE + 1, notAfter: DEPARTURE }, [])).toThrow(
      "an arrival's notBefore is not after its notAfter; found 2027-05-04T06:00:00.001Z and 2027-05-04T06:00Z",
    );
  });
});

describe("a time that no speed arrives at", () => {
  test("too early: the highest speed, and by how much it is late", () => {
    const { solutions, chosen, nearest, reason } = answerOf(at(2), []);
    expect([solutions, chosen]).toEqual([[], null]);
    expect(nearest?.speed_m_s).toBe(12);
    expect(reason).toBe(
      "the highest speed of the craft's range, 12.0 m/s (23.3 kn), arrives 2027-05-04 08:35 UTC, 35 min too late",
    );
  });

  test("too late: the lowest speed, and by how much it is early", () => {
    const { nearest, reason } = answerOf(at(40), []);
    expect(nearest?.speed_m_s).toBe(1);
    expect(reason).toMatch(/^the lowest speed .* arrives 2027-05-05 12:55 UTC, 9 h 05 min too early$/);
  });

  test("before the departure: late by more than the passage", () => {
    expect(answerOf(at(-1), []).reason).toMatch(/3 h 35 min too late$/);
  });

  test("where no speed completes the route there is no nearest", () => {
    const wall = gridField("current", box, (lon) => [lon > 0.6 ? -20 : 0, 0]);
    const { nearest, reason } = answerOf(at(6), [wall]);
    expect(nearest).toBeNull();
    expect(reason).toMatch(
      /^no speed of the craft's range, 1.0 m\/s \(1.9 kn\) to 12.0 m\/s \(23.3 kn\), completes the route; at the highest, leg 1,/,
    );
  });

  test("where every leg names its own speed", () => {
    const route = routeOf(waypoint("A", 0, 0), waypoint("B", 0, 1, { speed_m_s: 5 }));
    expect(answerOf(at(5), [], { route }).reason).toMatch(
      /^every leg names its own speed, and the route arrives/,
    );
  });

  test("a craft without a bound on its speeds is refused in one sentence", () => {
    expect(() => answerOf(at(5), [], { craft: { ...boat, speeds: null } })).toThrow(
      `a choice of speed needs the craft's speeds, as { "min": "3 kn", "max": "14 kn" }, beside the cube model; found none for Craft`,
    );
  });
});

describe("an estimate whose pace asks for an arrival", () => {
  const short: Route = { name: "Short", waypoints: [waypoint("A", 0, 0), waypoint("B", 0, 0.2)] };
  const input: EstimateInput = {
    title: "",
    departure: DEPARTURE,
    craft: { ...boat, speeds: { min: 2, max: 6 } },
    pace: { hold: "through-speed", speed_m_s: 5 },
    reserve: null,
    fields: [tide(1)],
    routes: [{ ...east, name: "Long" }, short],
    land: null,
  };
  const { estimate: answer, profiles } = estimateArriving(prepareRoutes(input), input, at(7));

  test("runs each route at its own speed and says so in a note", () => {
    const [long] = answer.routes;
    expect(long?.arrival).toBe("2027-05-04T13:00:00.000Z");
    expect(long?.status).toBe("clear");
    const found = long?.arrive?.solutions[long.arrive.chosen ?? -1];
    expect(long?.legs[0]?.throughSpeed_m_s?.mean).toBeCloseTo(found?.speed_m_s ?? 0, 9);
    expect(long?.findings[0]).toMatchObject({ code: "pace-found", severity: "note", leg: null });
    expect(long?.findings[0]?.message).toMatch(
      /through the medium arrives 2027-05-04 13:00 UTC, after 7 h 00 min \(asked for: at 2027-05-04 13:00 UTC\)$/,
    );
    expect(profiles).toHaveLength(2);
  });

  test("makes a route without a solution a stop, estimated at the nearest arrival", () => {
    const [, near] = answer.routes;
    expect(near?.status).toBe("stop");
    expect(near?.findings[0]).toMatchObject({ code: "arrival-missed", severity: "stop" });
    expect(near?.findings[0]?.message).toMatch(
      /^no through-speed arrives at 2027-05-04 13:00 UTC: the lowest speed/,
    );
    expect(near?.arrival).toBe(near?.arrive?.nearest?.arrival);
    expect(near?.totals.use).toBe(near?.arrive?.nearest?.use);
  });
});

describe("the latest departure that arrives in time", () => {
  const pace = { hold: "through-speed", speed_m_s: 3 } as const;
  const latest = (fields: readonly Field[], hours: number, craft = boat) =>
    latestDeparture(
      prepareRoute(east, fields),
      { departure: DEPARTURE, craft, pace, reserve: null, fields },
      DEPARTURE,
      DEPARTURE + hours * HOUR,
    );

  test("in a uniform stream is the arrival less D/(V + a)", () => {
    const { latest: cell } = latest([gridField("current", box, () => [1, 0])], 20);
    const exact = DEPARTURE + 20 * HOUR - (1000 * distance) / 4;
    expect(Math.abs(Date.parse(cell?.departure ?? "") - exact)).toBeLessThan(2);
  });

  test("in a reversing stream is that of trying every five minutes, though the route opens and shuts", () => {
    const fields = [tide(3.3)];
    const notAfter = 44;
    const { latest: cell } = latest(fields, notAfter);
    const prepared = prepareRoute(east, fields);
    const conditions = { departure: DEPARTURE, craft: boat, pace, reserve: null, fields };
    const inTime = Array.from({ length: notAfter * 12 }, (_, n) => DEPARTURE + n * FIVE_MINUTES).filter(
      (departure) => {
        const { status, arrival } = windowCell(prepared, conditions, departure, null);
        return status !== "stop" && arrival !== null && Date.parse(arrival) <= DEPARTURE + notAfter * HOUR;
      },
    );
    const openings = inTime.filter((departure, n) => departure - (inTime[n - 1] ?? 0) > FIVE_MINUTES);
    expect(openings.length).toBeGreaterThan(2);
    const best = inTime[inTime.length - 1] ?? 0;
    const found = Date.parse(cell?.departure ?? "");
    expect(found).toBeGreaterThanOrEqual(best);
    expect(found).toBeLessThan(best + FIVE_MINUTES);
  });

  test("is none where every departure is too late, and the earliest says when it arrives", () => {
    const { latest: cell, earliest } = latest([], 5);
    expect(cell).toBeNull();
    expect(earliest.arrival).toBe(new Date(Math.round(DEPARTURE + (1000 * distance) / 3)).toISOString());
  });

  test("needs an arrival after the earliest departure", () => {
    expect(() => latest([], 0)).toThrow("an arrival is after the earliest departure considered");
  });
});
