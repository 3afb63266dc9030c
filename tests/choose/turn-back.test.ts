import fc from "fast-check";
import { describe, expect, test } from "vitest";
import type { Alternate } from "../../src/choose/alternate.ts";
import { turnBack } from "../../src/choose/turn-back.ts";
import type { RoutePlace, TurnBack } from "../../src/choose/turn-back-result.ts";
import type { Craft, Pace, Reserve } from "../../src/craft/craft.ts";
import { cubePower } from "../../src/craft/cube.ts";
import { rotorPower } from "../../src/craft/rotor.ts";
import { InputError } from "../../src/errors.ts";
import { fieldsInUse, prepareRoute } from "../../src/estimate/prepare.ts";
import type { Route, Waypoint } from "../../src/estimate/route.ts";
import type { Field } from "../../src/field/field.ts";
import { WGS84 } from "../../src/geodesy/ellipsoid.ts";
import { geodesicDirect, geodesicInverse } from "../../src/geodesy/geodesic.ts";
import { makeTrack } from "../../src/geodesy/make-track.ts";
import {
  craftOf,
  DEPARTURE,
  estimateOf,
  gridField,
  routeOf,
  spaced,
  waypoint,
} from "../estimate/fixtures.ts";

const DEGREE_M = (WGS84.a * Math.PI) / 180;
/** Rate of the fixtures' craft, W. */
const RATE = 1000;

interface Asked {
  readonly craft?: Craft;
  readonly pace?: Pace;
  readonly fields?: readonly Field[];
  readonly reserve?: Reserve | null;
  readonly alternates?: readonly Alternate[];
}

function turned(route: Route, asked: Asked = {}): TurnBack {
  const {
    craft = craftOf(),
    pace = { hold: "through-speed", speed_m_s: 10 } as const,
    reserve = null,
  } = asked;
  const fields = fieldsInUse(craft, asked.fields ?? []);
  const conditions = { departure: DEPARTURE, craft, pace, reserve, fields };
  return turnBack(prepareRoute(route, fields), conditions, asked.alternates);
}

/** Due east along the equator from Greenwich. */
function eastward(length: number): Route {
  return routeOf(waypoint("start", 0, 0), waypoint("end", 0, length / DEGREE_M, { path: "rhumb" }));
}

function steady(u: number, v: number): Field {
  return gridField("wind", { lon: spaced(-10, 10, 4), lat: spaced(-10, 10, 4) }, () => [u, v]);
}

const alternate = (name: string, lat: number, lon: number, height_m: number | null = null): Alternate => ({
  name,
  lat,
  lon,
  height_m,
});

const withStore = (usable: number) => craftOf({ store: { unit: "J", usable } });
const limitTo = (turn: TurnBack, goal: number | null) => turn.limits.find((limit) => limit.goal === goal);
const between = (turn: TurnBack, a: number, b: number) =>
  turn.equalTime.filter((point) => point.between[0] === a && point.between[1] === b);

describe("a uniform wind along the track", () => {
  const wind = fc.double({ min: -8, max: 8, noNaN: true });
  const length = fc.double({ min: 20e3, max: 900e3, noNaN: true });

  test("puts the equal-time point at D gHome / (gOn + gHome)", () => {
    fc.assert(
      fc.property(wind, length, (w, d) => {
        const turn = turned(eastward(d), { fields: [steady(w, 0)] });
        const [point, ...others] = between(turn, 0, 1);
        expect(others).toEqual([]);
        const expected = (d * (10 - w)) / 20;
        // The place is a root of times good to some 1e-12, at most 900 km apart.
        expect(Math.abs((point?.place.distance_m ?? 0) - expected)).toBeLessThan(2e-5);
        expect(point?.time_s).toBeCloseTo(expected / (10 - w), 5);
      }),
      { numRuns: 12 },
    );
  });

  test("puts the point of no return at E gOut gHome / (gOut + gHome), the reserve taken off first", () => {
    fc.assert(
      fc.property(wind, fc.double({ min: 0, max: 0.5, noNaN: true }), (w, share) => {
        const endurance = 40e3;
        const turn = turned(eastward(900e3), {
          craft: withStore(endurance * RATE),
          reserve: { kind: "share", share },
          fields: [steady(w, 0)],
        });
        const expected = (endurance * (1 - share) * (10 + w) * (10 - w)) / 20;
        const limit = limitTo(turn, 0);
        expect(limit?.beyond).toBe("short");
        expect(Math.abs((limit?.last?.distance_m ?? 0) - expected)).toBeLessThan(2e-5);
      }),
      { numRuns: 12 },
    );
  });

  test("reversed, puts the equal-time point as far from the other end and leaves the point of no return", () => {
    const asked = { craft: withStore(40e3 * RATE) };
    const ahead = turned(eastward(600e3), { ...asked, fields: [steady(4, 0)] });
    const astern = turned(eastward(600e3), { ...asked, fields: [steady(-4, 0)] });
    const places = [ahead, astern].map((turn) => between(turn, 0, 1)[0]?.place.distance_m ?? 0);
    expect((places[0] as number) + (places[1] as number)).toBeCloseTo(600e3, 4);
    const limits = [ahead, astern].map((turn) => limitTo(turn, 0)?.last?.distance_m ?? 0);
    expect(limits[0]).toBeCloseTo(limits[1] as number, 4);
  });

  test("counts a reserve of time at the rate under way", () => {
    const turn = turned(eastward(900e3), {
      craft: withStore(40e3 * RATE),
      reserve: { kind: "time", time_s: 4000 },
      fields: [steady(3, 0)],
    });
    expect(limitTo(turn, 0)?.last?.distance_m).toBeCloseTo((36e3 * 13 * 7) / 20, 4);
    expect(turn.samples.goals[0]?.margin[0]).toBeCloseTo(36e3 * RATE, 3);
  });
});

describe("without wind", () => {
  test("the equal-time point of an alternate off the track is equally far from it as from the start", () => {
    const turn = turned(eastward(300e3), { alternates: [alternate("Off", 1.2, 1.9)] });
    const [point] = between(turn, 0, 2);
    const place = point?.place as RoutePlace;
    const away = geodesicInverse(WGS84, place, { lat: 1.2, lon: 1.9 }).distance;
    expect(place.distance_m).toBeCloseTo(away, 4);
    expect(point?.time_s).toBeCloseTo(away / 10, 5);
  });

  test("the limit of an alternate is where way so far and way to it are the range together", () => {
    const turn = turned(eastward(300e3), {
      craft: withStore(25e3 * RATE),
      alternates: [alternate("Off", 0.6, 1.9)],
    });
    const place = limitTo(turn, 2)?.last as RoutePlace;
    const away = geodesicInverse(WGS84, place, { lat: 0.6, lon: 1.9 }).distance;
    expect(place.distance_m + away).toBeCloseTo(250e3, 4);
    expect(limitTo(turn, null)?.last).toEqual(place);
    const [nothing] = turn.nowhere;
    expect(nothing?.reach).toBe("short");
    expect(nothing?.from.distance_m).toBeCloseTo(place.distance_m, 4);
    expect(nothing?.to).toEqual(turn.end);
  });

  test("every crossing is found where the route goes to and fro before an alternate", () => {
    const far = (n: number) => (n % 2 === 0 ? 0.2 : 1.4);
    const ways = Array.from({ length: 7 }, (_, n) => waypoint(`W${n}`, far(n), 0.4 * n));
    const turn = turned(routeOf(...ways), { alternates: [alternate("South", -0.5, 1.2)] });
    const { distance_m, goals } = turn.samples;
    const difference = distance_m.map(
      (_, n) => (goals[0]?.time_s[n] as number) - (goals[2]?.time_s[n] as number),
    );
    const signs = difference.filter((value) => Math.abs(value) > 1e-3).map(Math.sign);
    const changes = signs.filter((sign, n) => n > 0 && sign !== signs[n - 1]).length;
    expect(between(turn, 0, 2)).toHaveLength(changes);
    for (const { place, time_s } of between(turn, 0, 2)) {
      expect(geodesicInverse(WGS84, place, { lat: -0.5, lon: 1.2 }).distance / 10).toBeCloseTo(time_s, 4);
      expect(place.distance_m / 10).toBeCloseTo(time_s, 4);
    }
  });

  test("two crossings between two neighbouring even places are both found", () => {
    // A current of air against the way north, strongest midway between the even places at 145 and 150 km.
    const middle = 147.5e3 / DEGREE_M;
    const lon = [middle - 2, middle - 0.06, middle, middle + 0.06, middle + 2];
    const band = gridField("wind", { lon, lat: [-2, -0.001, 0, 0.2, 0.201, 2] }, (at, lat) => [
      0,
      at === middle && lat >= 0 && lat <= 0.2 ? -4 : 0,
    ]);
    const here = { lat: 0, lon: middle };
    const north = alternate("North", 1, middle);
    const way = routeOf(waypoint("here", 0, middle), waypoint("North", 1, middle));
    const timeOf = (fields: readonly Field[]) => estimateOf(way, { fields }).estimate.totals.time_s as number;
    const calm = timeOf([]);
    const lost = timeOf([band]) - calm;
    // Farther by seven tenths of what is lost there.
    const { lat } = geodesicDirect(WGS84, here, 180, 10 * (calm + 0.7 * lost));
    const turn = turned(eastward(300e3), {
      fields: [band],
      alternates: [north, alternate("South", lat, middle)],
    });
    const places = between(turn, 2, 3).map(({ place }) => place.distance_m);
    expect(places).toHaveLength(2);
    expect(places[0]).toBeGreaterThan(145e3);
    expect(places[1]).toBeLessThan(150e3);
  });

  test("a goal in reach from the whole way has no point of no return", () => {
    const turn = turned(eastward(100e3), { alternates: [alternate("Off", 0.5, 0.5)] });
    for (const limit of turn.limits) {
      expect(limit).toMatchObject({ beyond: null, notKnownFrom: null, reason: null });
      expect(limit.last).toEqual(turn.end);
    }
    expect(turn.nowhere).toEqual([]);
  });

  test("with all of the store kept back only the start itself is in reach", () => {
    const turn = turned(eastward(100e3), {
      craft: withStore(1e6),
      reserve: { kind: "share", share: 1 },
      alternates: [alternate("Off", 0.5, 0.5)],
    });
    expect(limitTo(turn, 0)?.last?.distance_m).toBeLessThan(1e-5);
    expect(limitTo(turn, 2)).toMatchObject({ last: null, beyond: "short" });
    expect(turn.nowhere.map(({ reach }) => reach)).toEqual(["short"]);
  });

  test("an alternate at the start or the destination is as far as either", () => {
    const turn = turned(eastward(200e3), {
      craft: withStore(15e3 * RATE),
      alternates: [alternate("Back", 0, 0), alternate("On", 0, 200e3 / DEGREE_M)],
    });
    expect(limitTo(turn, 2)?.last?.distance_m).toBeCloseTo(limitTo(turn, 0)?.last?.distance_m ?? 0, 4);
    expect(between(turn, 0, 2)).toEqual([]);
    expect(between(turn, 1, 3)).toEqual([]);
    expect(between(turn, 2, 3)[0]?.place.distance_m).toBeCloseTo(100e3, 4);
  });
});

/** A wind that turns and grows over place and time, m/s. */
const gale = gridField(
  "wind",
  { lon: spaced(-2, 6, 16), lat: spaced(-2, 6, 16), hours: spaced(0, 60, 20), height: [0, 500, 1500] },
  (lon, lat, hours, height) => [
    3 * Math.sin(hours / 5 + lon) + height / 1000,
    3 * Math.cos(hours / 7 + lat) - lon / 4,
  ],
);

const dogleg = routeOf(
  waypoint("A", 0.3, 0.2, { height_m: 100 }),
  waypoint("B", 1.6, 1.1, { height_m: 900, speed_m_s: 12 }),
  waypoint("C", 1.2, 3.1, { path: "rhumb", height_m: 300, stay_s: 1200 }),
  waypoint("D", 3.4, 4.0, { height_m: 700 }),
);
/** Spends more the faster, so that use and time are not one. */
const cubed = craftOf({
  power: cubePower({ referenceSpeed_m_s: 10, referencePower_W: 1000 }),
  store: { unit: "J", usable: 60e6 },
});
const MAST = alternate("Mast", 2.4, 1.8, 200);

/** The route as far as a place, by hand. */
function upTo(route: Route, { leg, at_m }: RoutePlace): { readonly here: Waypoint; readonly out: Route } {
  const from = route.waypoints[leg - 1] as Waypoint;
  const to = route.waypoints[leg] as Waypoint;
  const track = makeTrack(from, to, to.path);
  const share = at_m / track.length;
  const height_m = (from.height_m ?? 0) + ((to.height_m ?? 0) - (from.height_m ?? 0)) * share;
  const here = { ...to, ...track.at(at_m), name: "P", height_m, stay_s: 0 };
  return { here, out: routeOf(...route.waypoints.slice(0, leg), here) };
}

/** Each waypoint before it with the path and speed of the leg that is gone back on. */
function backFrom(route: Route, here: Waypoint, leg: number): Route {
  const back = Array.from({ length: leg }, (_, n) => {
    const { path, speed_m_s } = route.waypoints[leg - n] as Waypoint;
    return { ...(route.waypoints[leg - n - 1] as Waypoint), path, speed_m_s, stay_s: 0 };
  });
  return routeOf(here, ...back);
}

/** Time and use so far, and of the way back, by lone estimates. */
function byHand(place: RoutePlace, reserve: Reserve | null = null) {
  const { here, out } = upTo(dogleg, place);
  const asked = { craft: cubed, fields: [gale], reserve };
  const so = estimateOf(out, asked).estimate;
  const time = (Date.parse(so.arrival as string) - DEPARTURE) / 1000;
  const exact = (so.totals.time_s as number) + so.totals.stay_s;
  const leaving = { ...asked, departure: DEPARTURE + 1000 * exact };
  const back = estimateOf(backFrom(dogleg, here, place.leg), leaving).estimate;
  const off = estimateOf(
    routeOf(here, waypoint("Mast", MAST.lat, MAST.lon, { height_m: MAST.height_m })),
    leaving,
  ).estimate;
  return { time, exact, used: so.totals.use as number, back, off };
}

describe("a field that varies in place and time", () => {
  const reserve: Reserve = { kind: "time", time_s: 1800 };
  const turn = turned(dogleg, { craft: cubed, fields: [gale], reserve, alternates: [MAST] });

  test("each sample is what lone estimates of the way there, back and off come to", () => {
    const { samples } = turn;
    const picked = [4, 17, 30, 41, 52, samples.leg.length - 1];
    for (const n of picked) {
      const place = { leg: samples.leg[n], at_m: samples.at_m[n] } as RoutePlace;
      if (place.at_m === 0) continue;
      const own = byHand(place, reserve);
      // Sums of steps of up to 60 estimates against those of one, each good to 1e-11.
      expect((samples.time_s[n] as number) / own.exact - 1).toBeCloseTo(0, 9);
      expect((samples.use[n] as number) / own.used - 1).toBeCloseTo(0, 9);
      const [back, , off] = samples.goals;
      for (const [series, route] of [
        [back, own.back],
        [off, own.off],
      ] as const) {
        expect((series?.time_s[n] as number) / (route.totals.time_s as number) - 1).toBeCloseTo(0, 9);
        expect((series?.use[n] as number) / (route.totals.use as number) - 1).toBeCloseTo(0, 9);
        const margin = 60e6 - own.used - (route.totals.use as number) - (route.reserve as number);
        expect(Math.abs((series?.margin[n] as number) - margin)).toBeLessThan(0.1);
      }
    }
  });

  test("has samples at every waypoint, before and after a stay, and at 60 places", () => {
    const { samples } = turn;
    expect(samples.leg.length).toBeGreaterThanOrEqual(60);
    expect(samples.distance_m.every((d, n) => n === 0 || d >= (samples.distance_m[n - 1] as number))).toBe(
      true,
    );
    const stay = samples.at_m.findIndex((at, n) => n > 0 && at === 0);
    expect(samples.leg[stay]).toBe(3);
    expect(samples.distance_m[stay]).toBe(samples.distance_m[stay - 1]);
    expect((samples.time_s[stay] as number) - (samples.time_s[stay - 1] as number)).toBeCloseTo(1200, 6);
  });

  test("the start is in reach just before the point of no return and not just after it", () => {
    const limit = limitTo(turn, 0);
    const last = limit?.last as RoutePlace;
    expect(limit?.beyond).toBe("short");
    const margin = (at_m: number) => {
      const own = byHand({ ...last, at_m }, reserve);
      return 60e6 - own.used - (own.back.totals.use as number) - (own.back.reserve as number);
    };
    expect(margin(last.at_m - 0.5)).toBeGreaterThan(0);
    expect(margin(last.at_m + 0.5)).toBeLessThan(0);
  });

  test("from an equal-time point both ways take as long", () => {
    const points = between(turn, 0, 2);
    expect(points.length).toBeGreaterThan(0);
    for (const { place, time_s } of points) {
      const { back, off } = byHand(place, reserve);
      expect(back.totals.time_s as number).toBeCloseTo(off.totals.time_s as number, 4);
      expect(back.totals.time_s as number).toBeCloseTo(time_s, 4);
    }
  });

  test("stretches follow one another to the end and agree with the samples inside them", () => {
    turn.stretches.forEach((stretches, goal) => {
      expect(stretches[0]?.from.distance_m).toBe(0);
      expect(stretches.at(-1)?.to).toEqual(turn.end);
      turn.samples.time_s.forEach((time, n) => {
        const holding = stretches.find(({ from, to }) => from.time_s <= time && time <= to.time_s);
        if (holding !== undefined) expect(turn.samples.goals[goal]?.reach[n]).toBe(holding.reach);
      });
    });
  });

  test("is the same twice", () => {
    expect(turned(dogleg, { craft: cubed, fields: [gale], reserve, alternates: [MAST] })).toEqual(turn);
  });
});

describe("a stay", () => {
  const route = routeOf(
    waypoint("start", 0, 0),
    waypoint("stop", 0, 100e3 / DEGREE_M, { path: "rhumb", stay_s: 7200 }),
    waypoint("end", 0, 200e3 / DEGREE_M, { path: "rhumb" }),
  );
  const boat = craftOf({ moves: "water", hotelPerSecond: 500, store: { unit: "J", usable: 31.5e6 } });

  test("may hold the last moment to turn back", () => {
    // 10,000 s at 1500 W out and again home; 1.5 MJ are left for waiting at 500 W.
    const { last, beyond } = limitTo(turned(route, { craft: boat }), 0) ?? {};
    expect(beyond).toBe("short");
    expect(last?.leg).toBe(1);
    expect(last?.distance_m).toBeCloseTo(100e3, 6);
    expect(last?.time_s).toBeCloseTo(10e3 + 3000, 3);
  });

  test("is left out of the way on, as of the way back", () => {
    const turn = turned(route, { craft: boat });
    expect(between(turn, 0, 1)[0]?.place.distance_m).toBeCloseTo(100e3, 3);
    expect(turn.samples.goals[1]?.time_s[0]).toBeCloseTo(20e3, 5);
  });
});

describe("where no answer is", () => {
  const short = gridField("wind", { lon: spaced(-1, 4, 5), lat: spaced(-1, 1, 2), hours: [0, 4, 8] }, () => [
    1, 0,
  ]);

  test("a forecast that ends on the way back leaves the start unknown from there on", () => {
    const turn = turned(eastward(250e3), { fields: [short] });
    const limit = limitTo(turn, 0);
    // 11 m/s out, 9 m/s back: 8 h are 8 · 3600 · 11 · 9 / 20 m.
    expect(limit?.last?.distance_m).toBeCloseTo((8 * 3600 * 99) / 20, -1);
    expect(limit).toMatchObject({ beyond: "unknown", reason: "outside-time" });
    expect((limit?.notKnownFrom?.distance_m ?? 0) - (limit?.last?.distance_m ?? 0)).toBeLessThanOrEqual(1);
    const last = turn.samples.goals[0];
    expect(last?.time_s.at(-1)).toBeNull();
    expect(last?.stops.at(-1)).toBe("outside-time");
  });

  test("what is spent before the data end may already be too much", () => {
    const turn = turned(eastward(250e3), { fields: [short], craft: withStore(26e3 * RATE) });
    expect(limitTo(turn, 0)).toMatchObject({ beyond: "short", notKnownFrom: null, reason: null });
    expect(turn.samples.goals[0]?.reach).not.toContain("unknown");
  });

  test("a wind too strong to return against says that it cannot be done", () => {
    const turn = turned(eastward(250e3), { fields: [steady(10.5, 0)] });
    expect(limitTo(turn, 0)?.last?.distance_m).toBeLessThanOrEqual(1);
    expect(limitTo(turn, 0)).toMatchObject({ beyond: "cannot", notKnownFrom: null });
    expect(turn.samples.goals[0]?.stops.at(-1)).toBe("cannot-hold-track");
  });

  test("a route that stops on the way is looked at as far as it comes", () => {
    const turn = turned(eastward(600e3), { fields: [short] });
    expect(turn.end.distance_m).toBeCloseTo(8 * 3600 * 11, -1);
    expect(turn.samples.distance_m.at(-1)).toBe(turn.end.distance_m);
    expect(turn.samples.goals[1]?.reach).toContain("unknown");
    expect(turn.equalTime).toEqual([]);
  });

  test("a route that cannot leave its start is one place", () => {
    const turn = turned(eastward(100e3), { fields: [steady(-10.5, 0)] });
    expect(turn.end.distance_m).toBe(0);
    expect(turn.samples.distance_m).toEqual([0]);
    expect(turn.samples.goals.map(({ reach }) => reach[0])).toEqual(["reachable", "cannot"]);
  });

  test("a limit broken on the way back is named beside figures that stand", () => {
    const craft = craftOf({ limits: { ...craftOf().limits, wind_m_s: 5 } });
    const turn = turned(eastward(100e3), { craft, fields: [steady(6, 0)] });
    expect(turn.samples.goals[0]?.limit.at(-1)).toBe("wind-limit");
    expect(turn.samples.goals[0]?.reach.at(-1)).toBe("reachable");
  });

  test("no figure is ever NaN", () => {
    fc.assert(
      fc.property(
        fc.double({ min: -12, max: 12, noNaN: true }),
        fc.double({ min: -12, max: 12, noNaN: true }),
        fc.double({ min: 1e6, max: 1e8, noNaN: true }),
        fc.integer({ min: 1, max: 30 }),
        (u, v, usable, hours) => {
          const field = gridField(
            "wind",
            { lon: [-1, 1, 3, 5], lat: [-1, 1, 3, 5], hours: [0, hours] },
            (lon, lat, hour) => [u + lon * hour * 0.05, v - lat * hour * 0.05],
          );
          const turn = turned(dogleg, { fields: [field], craft: withStore(usable), alternates: [MAST] });
          JSON.stringify(turn, (_, value) => {
            if (typeof value === "number") expect(Number.isFinite(value)).toBe(true);
            return value;
          });
          expect(turn.samples.time_s.length).toBe(turn.samples.goals[2]?.reach.length);
        },
      ),
      { numRuns: 12 },
    );
  });
});

describe("everywhere on the globe", () => {
  test("a way across the antimeridian comes out as anywhere else", () => {
    const moved = (shift: number) =>
      turned(routeOf(waypoint("start", 10, 178 + shift), waypoint("end", 12, 184 + shift)), {
        craft: withStore(40e3 * RATE),
        alternates: [alternate("Isle", 9, -179.5 + shift)],
      });
    const [across, inland] = [moved(0), moved(-150)];
    const places = (turn: TurnBack) =>
      [...turn.limits.map(({ last }) => last), ...turn.equalTime.map(({ place }) => place)].map(
        (place) => place?.distance_m ?? -1,
      );
    expect(places(across).length).toBeGreaterThan(5);
    places(inland).forEach((distance, n) => {
      expect(places(across)[n]).toBeCloseTo(distance, 3);
    });
    for (const lon of across.samples.lon) expect(Math.abs(lon)).toBeLessThanOrEqual(180);
  });

  test("a way over the pole turns back over it", () => {
    const turn = turned(routeOf(waypoint("start", 88, 20), waypoint("end", 89, -160)), {
      craft: withStore(40e3 * RATE),
    });
    expect(between(turn, 0, 1)[0]?.place.distance_m).toBeCloseTo(turn.end.distance_m / 2, 3);
    expect(limitTo(turn, 0)?.last?.distance_m).toBeCloseTo(200e3, 3);
  });

  test("a rhumb line is gone back along itself", () => {
    const route = routeOf(waypoint("start", 60, 0), waypoint("end", 60, 90, { path: "rhumb" }));
    const turn = turned(route);
    const back = turn.samples.goals[0]?.time_s ?? [];
    turn.samples.distance_m.forEach((distance, n) => {
      expect(10 * (back[n] as number)).toBeCloseTo(distance, 4);
    });
  });
});

describe("what cannot be asked", () => {
  const rotor = rotorPower({
    bladeProfilePower_W: 80,
    inducedPower_W: 88,
    tipSpeed_m_s: 120,
    hoverInducedSpeed_m_s: 4,
    fuselageDragRatio: 0.6,
    solidity: 0.05,
    discArea_m2: 0.5,
    airDensity_kg_m3: 1.225,
    efficiency: 1,
  });
  const drone = craftOf({ power: rotor });

  test("the way back of a route that descends needs the rotor's mass", () => {
    const route = routeOf(waypoint("A", 0, 0, { height_m: 80 }), waypoint("B", 0, 1, { height_m: 20 }));
    expect(() => turned(route, { craft: drone })).toThrow(
      new InputError(
        "the way back of a route that descends is a climb, which needs the mass of the craft's rotor model; found a climb to 80 m and no mass",
      ),
    );
  });

  test("so does the way up to an alternate, and neither does a level way", () => {
    const route = routeOf(waypoint("A", 0, 0, { height_m: 20 }), waypoint("B", 0, 1, { height_m: 20 }));
    const high = [alternate("Hill", 0.1, 0.5, 90)];
    expect(() => turned(route, { craft: drone, alternates: high })).toThrow(
      /a way to an alternate is a climb/,
    );
    expect(turned(route, { craft: drone, alternates: [alternate("Level", 0.1, 0.5)] }).limits).toHaveLength(
      3,
    );
  });
});
