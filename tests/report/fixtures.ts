/*
 * Estimates made by hand for the writers: a uniform flow on each leg, so that every figure follows from the triangle by
 * a few lines of arithmetic. Places, craft and data are invented.
 */

import { ADVISORY } from "../../src/constants.ts";
import type { Craft, Pace, StoreUnit } from "../../src/craft/craft.ts";
import type {
  Estimate,
  FieldAlong,
  FieldSummary,
  Finding,
  LegEstimate,
  RouteEstimate,
  Spread,
} from "../../src/estimate/result.ts";
import type { Route, Waypoint } from "../../src/estimate/route.ts";
import type { ReportInput } from "../../src/report/input.ts";

interface LegSketch {
  readonly to: string;
  readonly lat: number;
  readonly lon: number;
  readonly distance: number;
  readonly course: number;
  readonly along: number;
  readonly cross: number;
  readonly stay?: number;
  readonly height?: number;
  readonly path?: "geodesic" | "rhumb";
  readonly finalCourse?: number;
  readonly variation?: number | null;
  /** Second field, beside the medium. */
  readonly other?: readonly [along: number, cross: number];
}

interface RouteSketch {
  readonly name: string;
  readonly from: {
    readonly name: string;
    readonly lat: number;
    readonly lon: number;
    readonly height?: number;
  };
  readonly legs: readonly LegSketch[];
  /** 1-based leg on which the route stops. */
  readonly stopsOn?: number;
  readonly findings?: readonly Finding[];
  readonly reserve?: number | null;
}

export interface PlanSketch {
  readonly title: string;
  readonly craft: Pick<Craft, "name" | "moves">;
  readonly departure: string;
  readonly speed: number;
  /** Store units per second. */
  readonly rate: number;
  readonly storeUnit: StoreUnit;
  readonly usable: number;
  readonly fields: readonly FieldSummary[];
  readonly routes: readonly RouteSketch[];
  readonly pace?: Pace;
}

const around = (mean: number, spread: number): Spread => ({ mean, min: mean - spread, max: mean + spread });

function along(sketch: LegSketch, a: number, c: number): FieldAlong {
  return {
    alongTrackIntegral_m2_s: a * sketch.distance,
    meanAlongTrack_m_s: a,
    meanCrossTrack_m_s: c,
    maxSpeed_m_s: Math.hypot(a, c) * 1.2,
    covered: 1,
  };
}

const turn = (degrees: number) => ((degrees % 360) + 360) % 360;

function legOf(
  plan: PlanSketch,
  sketch: LegSketch,
  from: string,
  leg: number,
  start: number | null,
  before: number,
): LegEstimate {
  const { speed, rate, craft } = plan;
  const stay = sketch.stay ?? 0;
  const crabbed = Math.sqrt(speed ** 2 - sketch.cross ** 2);
  const still = sketch.distance / speed;
  const time = sketch.distance / (crabbed + sketch.along);
  const alongOnly = sketch.distance / (speed + sketch.along) - still;
  const medium = along(sketch, sketch.along, sketch.cross);
  const other = sketch.other === undefined ? null : along(sketch, sketch.other[0], sketch.other[1]);
  const heading = sketch.course - (Math.asin(sketch.cross / speed) * 180) / Math.PI;
  const use = rate * time + rate * 0.1 * stay;
  const stopped = start === null;
  const iso = (ms: number) => new Date(ms).toISOString();
  const variation = sketch.variation === undefined ? -3.4 : sketch.variation;
  return {
    leg,
    from,
    to: sketch.to,
    path: sketch.path ?? "geodesic",
    distance_m: sketch.distance,
    initialCourse_deg: sketch.course,
    finalCourse_deg: sketch.finalCourse ?? sketch.course,
    magneticCourse_deg: stopped || variation === null ? null : turn(sketch.course - variation),
    departure: stopped ? null : iso(start),
    arrival: stopped ? null : iso(start + time * 1000),
    time_s: stopped ? null : time,
    stay_s: stay,
    throughDistance_m: stopped ? null : speed * time,
    throughSpeed_m_s: stopped ? null : around(speed, 0),
    groundSpeed_m_s: stopped ? null : around(sketch.distance / time, 0.4),
    heading_deg: stopped ? null : { mean: turn(heading), min: turn(heading - 4), max: turn(heading + 4) },
    crab_deg: stopped ? null : around(heading - sketch.course, 4),
    wind: stopped ? null : craft.moves === "air" ? medium : other,
    current: stopped ? null : craft.moves === "water" ? medium : null,
    use: stopped ? null : use,
    remaining: stopped ? null : before - use,
    still: { time_s: still, use: rate * still + rate * 0.1 * stay },
    penalty: stopped
      ? null
      : {
          time_s: time - still,
          use: rate * (time - still),
          alongTime_s: alongOnly,
          crossTime_s: time - still - alongOnly,
          firstOrderTime_s: (-sketch.along * sketch.distance) / speed ** 2 + 0,
        },
    error: stopped ? null : { time_s: 3e-9, use: 2e-6 },
  };
}

const total = (values: readonly (number | null)[]): number | null =>
  values.some((value) => value === null)
    ? null
    : values.reduce((sum: number, value) => sum + (value ?? 0), 0);

function wholeField(
  legs: readonly LegEstimate[],
  of: (leg: LegEstimate) => FieldAlong | null,
): FieldAlong | null {
  const fields = legs.map(of);
  const distance = legs.reduce((sum, leg) => sum + leg.distance_m, 0);
  const mean = (value: (field: FieldAlong) => number) =>
    legs.reduce((sum, leg, index) => {
      const field = fields[index];
      return sum + (field ? value(field) * leg.distance_m : 0);
    }, 0) / distance;
  if (fields.some((field) => field === null)) return null;
  return {
    alongTrackIntegral_m2_s: mean((field) => field.meanAlongTrack_m_s) * distance,
    meanAlongTrack_m_s: mean((field) => field.meanAlongTrack_m_s),
    meanCrossTrack_m_s: mean((field) => field.meanCrossTrack_m_s),
    maxSpeed_m_s: Math.max(...fields.map((field) => field?.maxSpeed_m_s ?? 0)),
    covered: 1,
  };
}

function routeOf(plan: PlanSketch, sketch: RouteSketch): RouteEstimate {
  const legs: LegEstimate[] = [];
  let clock: number | null = Date.parse(plan.departure);
  let left = plan.usable;
  let from = sketch.from.name;
  let spent = 0;
  const departure = Date.parse(plan.departure);
  for (const [index, legSketch] of sketch.legs.entries()) {
    if (index + 1 === sketch.stopsOn) {
      spent = clock === null ? spent : (clock - departure) / 1000;
      clock = null;
    }
    const leg = legOf(plan, legSketch, from, index + 1, clock, left);
    legs.push(leg);
    left -= leg.use ?? 0;
    if (clock !== null && leg.time_s !== null) clock += (leg.time_s + leg.stay_s) * 1000;
    from = legSketch.to;
  }
  const sum = (of: (leg: LegEstimate) => number | null | undefined) =>
    total(legs.map((leg) => of(leg) ?? null));
  const findings = sketch.findings ?? [];
  const time = sum((leg) => leg.time_s);
  const known = time !== null;
  const worst = (severity: string) => findings.some((finding) => finding.severity === severity);
  return {
    name: sketch.name,
    status: worst("stop") ? "stop" : worst("caution") ? "caution" : "clear",
    departure: plan.departure,
    arrival: legs.at(-1)?.arrival ?? null,
    storeUnit: plan.storeUnit,
    usable: plan.usable,
    reserve: sketch.reserve === undefined ? plan.usable * 0.2 : sketch.reserve,
    ...(sketch.stopsOn === undefined
      ? {}
      : {
          reached: {
            leg: sketch.stopsOn,
            at_m: 4321.5,
            time_s: spent + 700,
            use: plan.usable - left + 700 * plan.rate,
          },
        }),
    totals: {
      distance_m: sum((leg) => leg.distance_m) ?? 0,
      time_s: time,
      stay_s: sum((leg) => leg.stay_s) ?? 0,
      throughDistance_m: sum((leg) => leg.throughDistance_m),
      wind: known ? wholeField(legs, (leg) => leg.wind) : null,
      current: known ? wholeField(legs, (leg) => leg.current) : null,
      use: sum((leg) => leg.use),
      remaining: legs.at(-1)?.remaining ?? null,
      still: { time_s: sum((leg) => leg.still.time_s) ?? 0, use: sum((leg) => leg.still.use) ?? 0 },
      penalty: known
        ? {
            time_s: sum((leg) => leg.penalty?.time_s) ?? 0,
            use: sum((leg) => leg.penalty?.use) ?? 0,
            alongTime_s: sum((leg) => leg.penalty?.alongTime_s),
            crossTime_s: sum((leg) => leg.penalty?.crossTime_s),
            firstOrderTime_s: sum((leg) => leg.penalty?.firstOrderTime_s),
          }
        : null,
      error: known ? { time_s: 3e-9 * legs.length, use: 2e-6 * legs.length } : null,
    },
    legs,
    findings,
  };
}

function geometryOf(sketch: RouteSketch): Route {
  const start: Waypoint = {
    name: sketch.from.name,
    lat: sketch.from.lat,
    lon: sketch.from.lon,
    path: "geodesic",
    speed_m_s: null,
    height_m: sketch.from.height ?? null,
    stay_s: 0,
  };
  const rest = sketch.legs.map(
    (leg): Waypoint => ({
      name: leg.to,
      lat: leg.lat,
      lon: leg.lon,
      path: leg.path ?? "geodesic",
      speed_m_s: null,
      height_m: leg.height ?? null,
      stay_s: leg.stay ?? 0,
    }),
  );
  return { name: sketch.name, waypoints: [start, ...rest] };
}

/** An estimate and its geometry from a sketch. */
export function reportOf(plan: PlanSketch): ReportInput {
  const estimate: Estimate = {
    format: "legwork-estimate/1",
    advisory: ADVISORY,
    plan: { title: plan.title },
    fields: plan.fields,
    routes: plan.routes.map((route) => routeOf(plan, route)),
  };
  return {
    estimate,
    routes: plan.routes.map(geometryOf),
    craft: plan.craft,
    pace: plan.pace ?? { hold: "through-speed", speed_m_s: plan.speed },
  };
}

const KNOT = 1852 / 3600;

export function finding(part: Partial<Finding> & Pick<Finding, "code" | "severity" | "message">): Finding {
  return { leg: null, at_m: null, to_m: null, lat: null, lon: null, ...part };
}

/** A battery tender among islands: a stay, a rhumb leg, a route that breaks its reserve and one that stops on the way. */
export const tenderSketch: PlanSketch = {
  title: "Supply run to Skerrin",
  craft: { name: "Nine-metre tender", moves: "water" },
  departure: "2027-05-04T06:00:00.000Z",
  speed: 12 * KNOT,
  rate: 61800,
  storeUnit: "J",
  usable: 216 * 3.6e6,
  fields: [
    {
      role: "current",
      files: ["sound-current.csv"],
      validFrom: "2027-05-04T00:00:00.000Z",
      validTo: "2027-05-05T00:00:00.000Z",
    },
    { role: "wind", files: ["sound-wind.csv"], validFrom: null, validTo: null },
  ],
  routes: [
    {
      name: "Outer",
      from: { name: "Quay", lat: 58.1032, lon: -6.3871 },
      legs: [
        {
          to: "Head",
          lat: 58.25333,
          lon: -6.68333,
          distance: 24185.4,
          course: 313.6,
          finalCourse: 313.4,
          along: -0.31,
          cross: 0.44,
          stay: 300,
          other: [-6.2, 3.1],
        },
        {
          to: "Skerrin",
          lat: 58.402,
          lon: -7.05,
          distance: 27114.9,
          course: 307.7,
          along: 0.52,
          cross: -0.2,
          path: "rhumb",
          other: [-5.8, 2.2],
        },
      ],
      findings: [
        finding({
          code: "wind-against-current",
          severity: "caution",
          leg: 2,
          at_m: 3900,
          to_m: 12840,
          lat: 58.28,
          lon: -6.75,
          message:
            "leg 2, from 3.9 km (2.1 NM) to 12.8 km (6.9 NM) after Head: wind against current: 8.6 m/s of wind blows within 34° of dead against a current of 0.61 m/s; expect steep seas",
        }),
        finding({ code: "no-variation", severity: "note", message: "the magnetic model ends on 2029-11-13" }),
      ],
    },
    {
      name: "Inner, by the narrows",
      from: { name: "Quay", lat: 58.1032, lon: -6.3871 },
      legs: [
        {
          to: "Narrows",
          lat: 58.2,
          lon: -6.6,
          distance: 16543.2,
          course: 310.6,
          along: -1.9,
          cross: 0.1,
          other: [-6, 3],
        },
        {
          to: "Skerrin",
          lat: 58.402,
          lon: -7.05,
          distance: 34701.1,
          course: 310.5,
          along: -2.2,
          cross: -0.6,
          other: [-6, 3],
        },
      ],
      findings: [
        finding({
          code: "reserve-broken",
          severity: "stop",
          leg: 2,
          at_m: 31000,
          to_m: 34701.1,
          message: "what is left falls below the reserve of 43.2 kWh by 22.4 kWh",
        }),
      ],
    },
    {
      name: "Through the race",
      from: { name: "Quay", lat: 58.1032, lon: -6.3871 },
      legs: [
        {
          to: "Mark",
          lat: 58.2,
          lon: -6.4,
          distance: 10800,
          course: 355.96,
          along: 1,
          cross: 0.1,
          variation: null,
          other: [-6, 3],
        },
        {
          to: "Race",
          lat: 58.3,
          lon: -6.6,
          distance: 16100,
          course: 313.6,
          along: 0,
          cross: 0,
          other: [-6, 3],
        },
        {
          to: "Skerrin",
          lat: 58.402,
          lon: -7.05,
          distance: 28700,
          course: 293.5,
          along: 0,
          cross: 0,
          other: [-6, 3],
        },
      ],
      stopsOn: 2,
      reserve: null,
      findings: [
        finding({
          code: "cannot-hold-track",
          severity: "stop",
          leg: 2,
          at_m: 4321.5,
          to_m: 4321.5,
          lat: 58.23,
          lon: -6.45,
          message:
            "the track cannot be held: the current's cross component is 6.4 m/s, speed through the water 6.2 m/s",
        }),
      ],
    },
  ],
};

/** A survey drone, out and back, seconds matter. */
export const droneSketch: PlanSketch = {
  title: "Survey of the north face",
  craft: { name: "Quad 6", moves: "air" },
  departure: "2027-06-10T09:30:00.000Z",
  speed: 12,
  rate: 310,
  storeUnit: "J",
  usable: 160 * 3600,
  fields: [
    {
      role: "wind",
      files: ["face-20m.csv", "face-60m.csv"],
      validFrom: "2027-06-10T06:00:00.000Z",
      validTo: "2027-06-10T18:00:00.000Z",
    },
  ],
  routes: [
    {
      name: "Low",
      from: { name: "Pad", lat: 46.5, lon: 7.95, height: 0 },
      legs: [
        {
          to: "Face",
          lat: 46.515,
          lon: 7.97,
          distance: 2267,
          course: 42.6,
          along: -3.4,
          cross: 4.2,
          height: 60,
          stay: 90,
          variation: 3.1,
        },
        {
          to: "Pad",
          lat: 46.5,
          lon: 7.95,
          distance: 2267,
          course: 222.7,
          along: 3.4,
          cross: -4.2,
          height: 0,
          variation: 3.1,
        },
      ],
      findings: [
        finding({
          code: "height-outside-field",
          severity: "caution",
          leg: 1,
          at_m: 0,
          to_m: 755,
          message: "below the lowest level, 20 m, which holds",
        }),
      ],
    },
  ],
};

/** An ocean passage across the antimeridian on fuel in tonnes: nine legs. */
export const oceanSketch: PlanSketch = {
  title: "Northern loop, winter",
  craft: { name: "Bulk carrier", moves: "water" },
  departure: "2027-01-28T18:00:00.000Z",
  speed: 13.5 * KNOT,
  rate: 28000 / 86400,
  storeUnit: "kg",
  usable: 620000,
  fields: [],
  routes: ["Great circle", "Composite"].map((name, which) => ({
    name,
    from: { name: "East pilot", lat: 35.1, lon: 140.2 },
    legs: Array.from({ length: 9 }, (_, leg) => ({
      to: leg === 8 ? "West pilot" : `WP ${leg + 1}`,
      lat: 36 + 1.5 * leg,
      lon: 145 + 9.5 * leg,
      distance: 812345.678 + 20000 * which,
      course: 62 + 4 * leg,
      finalCourse: 66.5 + 4 * leg,
      along: 0.3 * Math.sin(leg),
      cross: 0.4 * Math.cos(leg),
      variation: leg > 6 ? null : -6,
      other: [-4 * Math.cos(leg), 6] as const,
    })),
  })),
};

export const tender = reportOf(tenderSketch);
export const drone = reportOf(droneSketch);
export const ocean = reportOf(oceanSketch);
