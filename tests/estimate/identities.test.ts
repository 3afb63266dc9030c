import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { Craft, Pace } from "../../src/craft/craft.ts";
import { cubePower } from "../../src/craft/cube.ts";
import { wingPower } from "../../src/craft/wing.ts";
import type { LegEstimate, RouteEstimate } from "../../src/estimate/result.ts";
import type { Waypoint } from "../../src/estimate/route.ts";
import type { Field } from "../../src/field/field.ts";
import { sampleField } from "../../src/field/sample.ts";
import { DEGREE, sinCosDegrees } from "../../src/geodesy/angle.ts";
import { meridianArc, meridionalRadius, transverseRadius, WGS84 } from "../../src/geodesy/ellipsoid.ts";
import { makeTrack } from "../../src/geodesy/make-track.ts";
import type { PathKind, Position, Track } from "../../src/geodesy/track.ts";
import { craftOf, DEPARTURE, estimateOf, gridField, routeOf, spaced, waypoint } from "./fixtures.ts";

/*
 * Exact answers and identities of the line integrals, times and uses along whole routes. Where a grid carries the field exactly the
 * tolerance is the rounding of sums (2e-13 of a leg is the bound that an estimate reports for it); where a field has to be
 * sampled on a grid, the tolerance is the grid's own h²/8, said beside it.
 */

/** Rounding of a leg's sums, as a share of the figure. */
const ROUNDING = 1e-12;
const near = (value: number, wanted: number, share = ROUNDING): void => {
  expect(Math.abs(value - wanted), `found ${value}, wanted ${wanted}`).toBeLessThanOrEqual(
    share * Math.abs(wanted),
  );
};

/** A leg on the equator, so that along is u and cross is -v (starboard is south). */
const equator = (length_deg: number, from = 0) =>
  [waypoint("west", 0, from), waypoint("east", 0, from + length_deg, { path: "rhumb" })] as const;
const lengthOf = (degrees: number): number => degrees * DEGREE * WGS84.a;
const uniform = (u: number, v: number): Field =>
  gridField("wind", { lon: [-1, 3, 21], lat: [-2, 0.5, 2] }, () => [u, v]);
const speed = (speed_m_s: number): Pace => ({ hold: "through-speed", speed_m_s });
const legOf = (estimate: RouteEstimate, n = 0): LegEstimate => estimate.legs[n] as LegEstimate;

const degrees = fc.double({ min: 0.05, max: 15, noNaN: true });
const airspeed = fc.double({ min: 12, max: 60, noNaN: true });
/** A wind as a share of the airspeed. */
const share = fc.double({ min: -0.9, max: 0.9, noNaN: true });
const runs = { numRuns: 60, seed: 20270504 };

describe("exact times in exact winds", () => {
  it("a uniform wind along the track: T = L / (V + a)", () => {
    fc.assert(
      fc.property(degrees, airspeed, share, (long, v, part) => {
        const { estimate } = estimateOf(routeOf(...equator(long)), {
          pace: speed(v),
          fields: [uniform(part * v, 0)],
        });
        near(estimate.totals.time_s as number, lengthOf(long) / (v + part * v));
      }),
      runs,
    );
  });

  it("out and back in a steady wind: 2LV / (V² - w²), always longer than in still air", () => {
    fc.assert(
      fc.property(degrees, airspeed, share, (long, v, part) => {
        const [west, east] = equator(long);
        const back = waypoint("back", 0, 0, { path: "rhumb" });
        const { totals } = estimateOf(routeOf(west, east, back), {
          pace: speed(v),
          fields: [uniform(part * v, 0)],
        }).estimate;
        const w = part * v;
        near(totals.time_s as number, (2 * lengthOf(long) * v) / ((v - w) * (v + w)));
        // Rounding may not decide where the wind is a thousandth of the speed or less.
        if (Math.abs(part) > 1e-3) expect(totals.time_s as number).toBeGreaterThan(totals.still.time_s);
      }),
      runs,
    );
  });

  it("a pure cross wind: T = L / sqrt(V² - c²), and all of the penalty is the price of crabbing", () => {
    fc.assert(
      fc.property(degrees, airspeed, share, (long, v, part) => {
        const { estimate } = estimateOf(routeOf(...equator(long)), {
          pace: speed(v),
          fields: [uniform(0, part * v)],
        });
        const { time_s, penalty } = legOf(estimate);
        near(time_s as number, lengthOf(long) / (v * Math.sqrt((1 - part) * (1 + part))));
        expect(Math.abs(penalty?.alongTime_s as number)).toBeLessThanOrEqual(ROUNDING * (time_s as number));
      }),
      runs,
    );
  });

  it("an along-track component linear in distance: T = ln(g(L) / g(0)) / g'", () => {
    fc.assert(
      fc.property(degrees, airspeed, share, share, (long, v, atStart, atEnd) => {
        fc.pre(Math.abs(atEnd - atStart) > 0.01);
        const wind = gridField("wind", { lon: [0, long / 3, long], lat: [-1, 1] }, (lon) => [
          v * (atStart + ((atEnd - atStart) * lon) / long),
          0,
        ]);
        const { totals } = estimateOf(routeOf(...equator(long)), { pace: speed(v), fields: [wind] }).estimate;
        const slope = (v * (atEnd - atStart)) / lengthOf(long);
        // The logarithm of a ratio near 1 loses digits, and so does its slope: 1e-16 over the hundredth asked for above.
        near(totals.time_s as number, Math.log((1 + atEnd) / (1 + atStart)) / slope, 1e-11);
      }),
      runs,
    );
  });

  it("solid-body rotation along a parallel: T = L / (V + U cos φ)", () => {
    fc.assert(
      fc.property(fc.integer({ min: -80, max: 80 }), degrees, (lat, long) => {
        const wind = gridField("wind", { lon: [0, 20], lat: spaced(-90, 90, 180) }, (_, at) => [
          15 * sinCosDegrees(at).cos,
          0,
        ]);
        const route = routeOf(waypoint("a", lat, 0), waypoint("b", lat, long, { path: "rhumb" }));
        const { totals } = estimateOf(route, { pace: speed(50), fields: [wind] }).estimate;
        near(totals.time_s as number, totals.distance_m / (50 + 15 * sinCosDegrees(lat).cos));
      }),
      runs,
    );
  });

  it("solid-body rotation along a meridian never helps or hinders, and Γ is 0", () => {
    const wind = gridField("wind", { lon: [-5, 5], lat: spaced(-90, 90, 90) }, (_, at) => [
      15 * sinCosDegrees(at).cos,
      0,
    ]);
    const route = routeOf(waypoint("a", -60, 0), waypoint("b", 75, 0));
    const {
      penalty,
      wind: along,
      time_s,
    } = legOf(estimateOf(route, { pace: speed(50), fields: [wind] }).estimate);
    expect(Math.abs(along?.alongTrackIntegral_m2_s as number)).toBeLessThan(1e-6);
    expect(Math.abs(penalty?.alongTime_s as number)).toBeLessThan(1e-12 * (time_s as number));
    expect(penalty?.crossTime_s as number).toBeGreaterThan(0);
  });
});

/** A wind that no symmetry makes easy, known by its nodes. */
const tangled = gridField(
  "wind",
  { lon: [-8, -6.6, -6, -4.3, -3.1, -2], lat: [55, 56.1, 56.8, 58, 59.5, 60] },
  (lon, lat) => [4 + 3 * Math.sin(1.7 * lon + lat), -2 + 4 * Math.cos(lat - 0.8 * lon)],
);
const place = fc.record({
  lat: fc.double({ min: 55.1, max: 59.9, noNaN: true }),
  lon: fc.double({ min: -7.9, max: -2.1, noNaN: true }),
});
const kind = fc.constantFrom<PathKind>("geodesic", "rhumb");
const apart = (a: Position, b: Position): boolean => Math.hypot(a.lat - b.lat, a.lon - b.lon) > 0.1;
const on = (name: string, { lat, lon }: Position, more: Partial<Waypoint> = {}) =>
  waypoint(name, lat, lon, more);

function gamma(from: Position, to: Position, path: PathKind, field: Field): number {
  const { estimate } = estimateOf(routeOf(on("a", from), on("b", to, { path })), {
    pace: speed(40),
    fields: [field],
  });
  return estimate.totals.wind?.alongTrackIntegral_m2_s as number;
}

function windAt(field: Field, { lat, lon }: Position): { readonly u: number; readonly v: number } {
  const sample = sampleField(field, lat, lon, null, DEPARTURE);
  if (sample.none !== null) throw new Error(`no wind at ${lat}, ${lon}`);
  return sample;
}

/** Metres eastward and northward per degree at a latitude. */
const metres = (lat: number) => ({
  east: transverseRadius(WGS84, lat) * sinCosDegrees(lat).cos * DEGREE,
  north: meridionalRadius(WGS84, lat) * DEGREE,
});

/** Σ w · (dr/dp) Δp by the midpoint rule in the parameter p of s = L p² (3 - 2p), with dr/dp from differences of positions. */
function byParameter(track: Track, field: Field, steps: number): number {
  const at = (p: number) => track.at(track.length * p * p * (3 - 2 * p));
  let sum = 0;
  for (let n = 0; n < steps; n += 1) {
    const middle = (n + 0.5) / steps;
    const h = 1e-3 / steps;
    const [before, here, after] = [at(middle - h), at(middle), at(middle + h)];
    const { u, v } = windAt(field, here);
    const { east, north } = metres(here.lat);
    sum += (u * east * (after.lon - before.lon) + v * north * (after.lat - before.lat)) / (2 * h);
  }
  return sum / steps;
}

/** Σ w · Δr over the chords of a polyline. */
function byChords(track: Track, field: Field, steps: number): number {
  let sum = 0;
  let from = track.at(0);
  for (let n = 1; n <= steps; n += 1) {
    const to = track.at((track.length * n) / steps);
    const middle = { lat: (from.lat + to.lat) / 2, lon: (from.lon + to.lon) / 2 };
    const { u, v } = windAt(field, middle);
    const { east } = metres(middle.lat);
    sum += u * east * (to.lon - from.lon) + v * meridianArc(WGS84, from.lat, to.lat);
    from = to;
  }
  return sum;
}

describe("the line integral Γ", () => {
  it("changes sign, and nothing else, when the leg is reversed", () => {
    fc.assert(
      fc.property(place, place, kind, (a, b, path) => {
        fc.pre(apart(a, b));
        const there = gamma(a, b, path, tangled);
        const back = gamma(b, a, path, tangled);
        // Against the sum of the parts, of which some cancel: 8 m/s over the leg.
        const size = 8 * makeTrack(a, b, path).length;
        expect(Math.abs(there + back)).toBeLessThanOrEqual(ROUNDING * size);
      }),
      runs,
    );
  });

  it("is the same as ∫ w · (dr/dp) dp in another parameter, and as the limit of Σ w · Δr", () => {
    fc.assert(
      fc.property(place, place, kind, (a, b, path) => {
        fc.pre(apart(a, b));
        const track = makeTrack(a, b, path);
        const ours = gamma(a, b, path, tangled);
        const size = 8 * track.length;
        // The midpoint rule in 2000 steps with kinks at grid lines: h² of the smooth part and of every kink, 4e-7 seen.
        expect(Math.abs(byParameter(track, tangled, 2000) - ours)).toBeLessThan(2e-6 * size);
        expect(Math.abs(byChords(track, tangled, 2000) - ours)).toBeLessThan(2e-6 * size);
      }),
      { ...runs, numRuns: 12 },
    );
  });

  it("is approached by Σ w · Δr at second order", () => {
    const a = { lat: 55.4, lon: -7.3 };
    const b = { lat: 59.1, lon: -2.6 };
    const track = makeTrack(a, b, "geodesic");
    const ours = gamma(a, b, "geodesic", tangled);
    const [coarse, fine] = [500, 8000].map((steps) => Math.abs(byChords(track, tangled, steps) - ours));
    expect((coarse as number) / (fine as number)).toBeGreaterThan(16);
  });

  it("adds up over the pieces of a leg", () => {
    fc.assert(
      fc.property(
        place,
        place,
        kind,
        fc.double({ min: 0.05, max: 0.95, noNaN: true }),
        (a, b, path, part) => {
          fc.pre(apart(a, b));
          const track = makeTrack(a, b, path);
          const middle = track.at(track.length * part);
          const pieces = gamma(a, middle, path, tangled) + gamma(middle, b, path, tangled);
          // The pieces' own tracks lie within a rounding of the whole's (20 nm).
          expect(Math.abs(pieces - gamma(a, b, path, tangled))).toBeLessThanOrEqual(1e-11 * 8 * track.length);
        },
      ),
      runs,
    );
  });
});

describe("a field that is a gradient", () => {
  // f = F (sin φ + λ/2) in u = f_λ/(N cos φ), v = f_φ/M, on nodes 0.02° apart.
  const scale = 3e7;
  const f = ({ lat, lon }: Position) => scale * (sinCosDegrees(lat).sin + (lon * DEGREE) / 2);
  const gradient = gridField("wind", { lon: [-8, -2], lat: spaced(55, 60, 250) }, (_, lat) => [
    scale / 2 / (transverseRadius(WGS84, lat) * sinCosDegrees(lat).cos),
    (scale * sinCosDegrees(lat).cos) / meridionalRadius(WGS84, lat),
  ]);
  // h²/8 of the second derivatives of u and v, (0.02°)² · 4 / 8 of 8 m/s, over the leg.
  const gridError = (0.02 * DEGREE) ** 2 / 2;

  it("gives Γ by its end points alone, on geodesics and on rhumb lines", () => {
    fc.assert(
      fc.property(place, place, kind, (a, b, path) => {
        fc.pre(apart(a, b));
        const size = 8 * makeTrack(a, b, path).length;
        expect(Math.abs(gamma(a, b, path, gradient) - (f(b) - f(a)))).toBeLessThanOrEqual(gridError * size);
      }),
      runs,
    );
  });

  it("gives a closed route nothing", () => {
    fc.assert(
      fc.property(fc.array(place, { minLength: 3, maxLength: 6 }), kind, (places, path) => {
        fc.pre(places.every((p, n) => apart(p, places[(n + 1) % places.length] as Position)));
        const closed = [...places, places[0] as Position].map((p, n) => on(`${n}`, p, { path }));
        const { totals } = estimateOf(routeOf(...closed), { pace: speed(40), fields: [gradient] }).estimate;
        const size = 8 * totals.distance_m;
        expect(Math.abs(totals.wind?.alongTrackIntegral_m2_s as number)).toBeLessThanOrEqual(
          gridError * size,
        );
      }),
      runs,
    );
  });
});

describe("circulation", () => {
  it("around a box of meridians and parallels is the flux of the curl through it", () => {
    // u = κ M-arc northward of 56 N and v = 0: on nodes it is exact along parallels, and on meridians it has no part.
    const u = (lat: number) => 4e-5 * meridianArc(WGS84, 56, lat);
    fc.assert(
      fc.property(
        fc.integer({ min: 0, max: 14 }),
        fc.integer({ min: 1, max: 15 }),
        fc.double({ min: 0.2, max: 5, noNaN: true }),
        (south, rows, wide) => {
          const low = 56 + south * 0.1;
          const high = low + rows * 0.1;
          const field = gridField("wind", { lon: [-8, -2], lat: [low, high] }, (_, lat) => [u(lat), 0]);
          const corners: Position[] = [
            { lat: low, lon: -7.5 },
            { lat: low, lon: -7.5 + wide },
            { lat: high, lon: -7.5 + wide },
            { lat: high, lon: -7.5 },
            { lat: low, lon: -7.5 },
          ];
          const route = routeOf(...corners.map((p, n) => on(`${n}`, p, { path: "rhumb" })));
          const { totals } = estimateOf(route, { pace: speed(40), fields: [field] }).estimate;
          // ∬ curl dA = -∬ ∂(u r)/∂φ dλ dφ with r = N cos φ, counter-clockwise.
          const r = (lat: number) => transverseRadius(WGS84, lat) * sinCosDegrees(lat).cos;
          const flux = -wide * DEGREE * fluxDensity(low, high, (lat) => u(lat) * r(lat));
          const size = 8 * totals.distance_m;
          expect(Math.abs((totals.wind?.alongTrackIntegral_m2_s as number) - flux)).toBeLessThanOrEqual(
            ROUNDING * size,
          );
        },
      ),
      runs,
    );
  });

  it("around a parallel of the globe in solid-body rotation is 2π N cos φ · U cos φ", () => {
    const field = gridField(
      "wind",
      { lon: spaced(-180, 180, 8), lat: spaced(-90, 90, 36) },
      (_, lat) => [20 * sinCosDegrees(lat).cos, 0],
      { global: true },
    );
    for (const lat of [-75, -40, 0, 25, 60]) {
      const around = [-170, -50, 70, -170].map((lon) => waypoint(`${lon}`, lat, lon, { path: "rhumb" }));
      const { totals } = estimateOf(routeOf(...around), { pace: speed(60), fields: [field] }).estimate;
      const { cos } = sinCosDegrees(lat);
      near(
        totals.wind?.alongTrackIntegral_m2_s as number,
        40 * Math.PI * transverseRadius(WGS84, lat) * cos * cos,
      );
    }
  });
});

/** ∫ d(of)/dφ dφ by Gauss-Legendre with five-point derivatives: the flux, by another way than its own ends. */
function fluxDensity(low: number, high: number, of: (lat: number) => number): number {
  const nodes = [-0.906179845938664, -0.538469310105683, 0, 0.538469310105683, 0.906179845938664];
  const weights = [
    0.236926885056189, 0.478628670499366, 0.568888888888889, 0.478628670499366, 0.236926885056189,
  ];
  const half = (high - low) / 2;
  const h = 0.05;
  return nodes.reduce((sum, x, n) => {
    const at = low + half * (1 + x);
    const slope = (of(at - 2 * h) - 8 * of(at - h) + 8 * of(at + h) - of(at + 2 * h)) / (12 * h);
    return sum + half * (weights[n] as number) * slope;
  }, 0);
}

describe("weight on an incline", () => {
  it("costs m g h on top of the level leg whatever the way, and a descent gives nothing back", () => {
    const power = wingPower({
      mass_kg: 12,
      wingArea_m2: 0.7,
      zeroLiftDrag: 0.03,
      inducedFactor: 0.05,
      efficiency: 1,
      airDensity_kg_m3: 1.225,
    });
    const craft = craftOf({ power });
    fc.assert(
      fc.property(
        place,
        place,
        place,
        kind,
        fc.double({ min: 5, max: 900, noNaN: true }),
        (a, b, c, path, climb) => {
          fc.pre(apart(a, b) && apart(b, c));
          const use = (middle: number, end: number): number => {
            const route = routeOf(
              on("low", a, { height_m: 10 }),
              on("middle", b, { height_m: 10 + middle, path }),
              on("high", c, { height_m: 10 + end, path }),
            );
            return estimateOf(route, { craft, pace: speed(22) }).estimate.totals.use as number;
          };
          const level = use(0, 0);
          const weight = 12 * 9.80665;
          // The difference of two uses of some 1e7 J keeps them to 1e-9 J per joule of rounding.
          const rounding = 4e-15 * level;
          expect(Math.abs(use(climb / 3, climb) - level - weight * climb)).toBeLessThanOrEqual(rounding);
          expect(Math.abs(use(climb, climb / 2) - level - weight * climb)).toBeLessThanOrEqual(rounding);
        },
      ),
      runs,
    );
  });
});

describe("the ledger adds up to rounding", () => {
  const hours = [-1, 3, 5, 11, 60];
  const timed = gridField(
    "current",
    { lon: [-8, -6.6, -6, -4.3, -3.1, -2], lat: [55, 56.1, 56.8, 58, 59.5, 60], hours },
    (lon, lat, hour) => [
      0.8 * Math.sin(1.7 * lon + lat + 0.5 * hour),
      0.9 * Math.cos(lat - 0.8 * lon - 0.5 * hour),
    ],
    { beyond: "hold" },
  );
  const boat: Craft = craftOf({
    moves: "water",
    power: cubePower({ referenceSpeed_m_s: 5, referencePower_W: 40_000 }),
    hotelPerSecond: 900,
    speeds: { min: 1.5, max: 12 },
  });
  const pace = fc.constantFrom<Pace>(
    { hold: "through-speed", speed_m_s: 5 },
    { hold: "ground-speed", speed_m_s: 4 },
    { hold: "power", power_W: 30_000 },
    { hold: "least-energy" },
  );

  it("still + along + cross = time and still + penalty = use, on every leg and on the route", () => {
    fc.assert(
      fc.property(fc.array(place, { minLength: 2, maxLength: 5 }), kind, pace, (places, path, how) => {
        fc.pre(places.every((p, n) => n === 0 || apart(p, places[n - 1] as Position)));
        const route = routeOf(...places.map((p, n) => on(`${n}`, p, { path, stay_s: 60 * n })));
        const { legs, totals } = estimateOf(route, { craft: boat, pace: how, fields: [timed] }).estimate;
        for (const { still, penalty, time_s, use } of [...legs, totals]) {
          const {
            alongTime_s,
            crossTime_s,
            time_s: apartFromStill,
            use: useApart,
          } = penalty as NonNullable<typeof penalty>;
          // Each sum of differences rounds a few times.
          const ulps = 4 * Number.EPSILON;
          expect(
            Math.abs(still.time_s + (alongTime_s as number) + (crossTime_s as number) - (time_s as number)),
          ).toBeLessThanOrEqual(ulps * (time_s as number));
          expect(Math.abs(still.time_s + apartFromStill - (time_s as number))).toBeLessThanOrEqual(
            ulps * (time_s as number),
          );
          expect(Math.abs(still.use + useApart - (use as number))).toBeLessThanOrEqual(
            ulps * (use as number),
          );
        }
      }),
      runs,
    );
  });

  it("adds legs up to the route: distance, time, use, Γ and what is left", () => {
    fc.assert(
      fc.property(fc.array(place, { minLength: 3, maxLength: 5 }), kind, pace, (places, path, how) => {
        fc.pre(places.every((p, n) => n === 0 || apart(p, places[n - 1] as Position)));
        const route = routeOf(...places.map((p, n) => on(`${n}`, p, { path, stay_s: 60 * n })));
        const { legs, totals, usable } = estimateOf(route, {
          craft: boat,
          pace: how,
          fields: [timed],
        }).estimate;
        const sum = (of: (leg: LegEstimate) => number): number => legs.reduce((all, leg) => all + of(leg), 0);
        near(
          totals.distance_m,
          sum((leg) => leg.distance_m),
          1e-15,
        );
        near(
          totals.time_s as number,
          sum((leg) => leg.time_s as number),
          1e-14,
        );
        near(
          totals.use as number,
          sum((leg) => leg.use as number),
          1e-14,
        );
        near(totals.remaining as number, usable - sum((leg) => leg.use as number), 1e-14);
        const drift = sum((leg) => leg.current?.alongTrackIntegral_m2_s as number);
        const size = 1.3 * totals.distance_m;
        expect(Math.abs((totals.current?.alongTrackIntegral_m2_s as number) - drift)).toBeLessThan(
          1e-14 * size,
        );
      }),
      runs,
    );
  });
});

describe("the line-integral estimate of the penalty", () => {
  it("-Γ/V² is what the true penalty tends to as the wind grows weak: the rest falls with its square", () => {
    const rest = (scale: number): number => {
      const field = gridField("wind", { lon: [-8, -5, -2], lat: [55, 57.5, 60] }, (lon, lat) => [
        scale * (3 + Math.sin(lon)),
        scale * Math.cos(lat),
      ]);
      const route = routeOf(waypoint("a", 55.5, -7.5), waypoint("b", 59.2, -2.4));
      const { penalty } = legOf(estimateOf(route, { pace: speed(40), fields: [field] }).estimate);
      return Math.abs((penalty?.time_s as number) - (penalty?.firstOrderTime_s as number));
    };
    const order = Math.log2(rest(0.2) / rest(0.1));
    expect(Math.abs(order - 2)).toBeLessThan(0.02);
  });
});
