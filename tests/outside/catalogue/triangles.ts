import {
  componentsFromCurrent,
  componentsFromWind,
  currentSet,
  groundSpeedAlong,
  type HeldTriangle,
  solveTriangle,
  windFrom,
} from "../../../src/craft/triangle.ts";
import { fromUnit, parseQuantity, toUnit } from "../../../src/units.ts";
import { equatorLeg, uniformWind } from "../legs.ts";
import { type Answers, given } from "./catalogue.ts";

type Flow = { readonly u: number; readonly v: number };

/** The triangle of a course at a speed, which must be one that can be held. */
export function held(course_deg: number, throughSpeed: number, flow: Flow): HeldTriangle {
  const triangle = solveTriangle({ course_deg, throughSpeed, ...flow });
  if (!triangle.holdable) throw new Error(`course ${course_deg} cannot be held`);
  return triangle;
}

const cur01 = () => {
  const { heading_deg, speed_through_water_kn, set_deg, drift_kn } = given("CUR-01");
  const through = componentsFromCurrent(speed_through_water_kn as number, heading_deg as number);
  const current = componentsFromCurrent(drift_kn as number, set_deg as number);
  const course = currentSet(through.u + current.u, through.v + current.v).set_deg;
  return { course, triangle: held(course, speed_through_water_kn as number, current) };
};

const cur02 = () => {
  const { track_deg, speed_through_water_kn, set_deg, drift_kn } = given("CUR-02");
  const current = componentsFromCurrent(drift_kn as number, set_deg as number);
  return held(track_deg as number, speed_through_water_kn as number, current);
};

const cur04 = (part: string) => {
  const { track_deg, stw_kn, set_deg, drift_kn } = given("CUR-04", part);
  return held(
    track_deg as number,
    stw_kn as number,
    componentsFromCurrent(drift_kn as number, set_deg as number),
  );
};

const wind01 = () => {
  const { true_course_deg, tas_kn, wind_from_deg, wind_kn } = given("WIND-01");
  const wind = componentsFromWind(wind_kn as number, wind_from_deg as number);
  return held(true_course_deg as number, tas_kn as number, wind);
};

const wind03 = () => {
  const { course_deg, tas_kn, wind_from_deg, wind_kn } = given("WIND-03");
  return held(
    course_deg as number,
    tas_kn as number,
    componentsFromWind(wind_kn as number, wind_from_deg as number),
  );
};

const wind05 = () => {
  const { wind_from_deg, wind_kn, track_deg } = given("WIND-05");
  return held(track_deg as number, 100, componentsFromWind(wind_kn as number, wind_from_deg as number));
};

/** `infeasible` where neither the triangle nor a whole leg in that wind can be held. */
function feasibility(part: string): string {
  const { track_deg, speed, wind_from_deg, wind } = given("WIND-06", part);
  const flow = componentsFromWind(wind as number, wind_from_deg as number);
  const triangle = solveTriangle({ course_deg: track_deg as number, throughSpeed: speed as number, ...flow });
  // The leg runs east: the same triangle turned by a quarter.
  const turned = componentsFromWind(wind as number, (wind_from_deg as number) + 90);
  const run = equatorLeg(10_000, { speed: speed as number, fields: [uniformWind(turned)] }).estimate;
  const stopped = run.status === "stop" && run.findings.some(({ code }) => code === "cannot-hold-track");
  const nothingAfter = run.legs[0]?.time_s === null && run.totals.time_s === null;
  return !triangle.holdable && stopped && nothingAfter ? "infeasible" : "held";
}

const firstWord = (value: unknown): string => String(value).split(" ")[0] as string;
const infeasible = (part: string, words: string) => ({
  words,
  ours: () => feasibility(part),
  part: firstWord,
});

const zermelo = () => {
  const { displacement, current, V } = {
    displacement: [30, 40],
    current: { u: 2, v: -1 },
    V: given("ZER-04").V as number,
  };
  const straight = currentSet(displacement[0] as number, displacement[1] as number);
  const triangle = held(straight.set_deg, V, current);
  return { time: straight.drift / triangle.groundSpeed, heading: triangle.heading_deg };
};

export const triangles: Answers = {
  "CUR-01": {
    cmg_deg: { words: "course made good", ours: () => cur01().course },
    smg_kn: { words: "speed made good", ours: () => cur01().triangle.groundSpeed, printed: 11.2 },
  },
  "CUR-02": {
    course_to_steer_deg: { words: "course to steer", ours: () => cur02().heading_deg },
    speed_made_good_kn: { words: "speed made good", ours: () => cur02().groundSpeed },
  },
  "CUR-04": {
    a_course_deg: { words: "course to steer, first chart", ours: () => cur04("a").heading_deg },
    a_smg_kn: { words: "speed made good, first chart", ours: () => cur04("a").groundSpeed },
    b_course_deg: { words: "course to steer, second chart", ours: () => cur04("b").heading_deg },
    b_smg_kn: { words: "speed made good, second chart", ours: () => cur04("b").groundSpeed },
  },
  "WIND-01": {
    wca_deg: { words: "crab", ours: () => wind01().crab_deg },
    true_heading_deg: { words: "true heading", ours: () => wind01().heading_deg },
    groundspeed_kn: { words: "ground speed", ours: () => wind01().groundSpeed },
    time_h: {
      words: "time of the whole leg",
      ours: () => {
        const { distance_nm, tas_kn, wind_from_deg, wind_kn } = given("WIND-01");
        const wind = componentsFromWind(fromUnit(wind_kn as number, "kn"), wind_from_deg as number);
        const run = equatorLeg(fromUnit(distance_nm as number, "NM"), {
          speed: fromUnit(tas_kn as number, "kn"),
          fields: [uniformWind(wind)],
        });
        return toUnit(run.estimate.legs[0]?.time_s as number, "h");
      },
      printed: 2.5,
    },
  },
  "WIND-03": {
    heading_deg: { words: "heading", ours: () => wind03().heading_deg },
    groundspeed_kn: { words: "ground speed", ours: () => wind03().groundSpeed },
    wca_deg: { words: "crab", ours: () => wind03().crab_deg },
  },
  "WIND-05": {
    headwind_kn: { words: "head wind", ours: () => -wind05().along },
    crosswind_kn: { words: "cross wind, from the right positive", ours: () => -wind05().cross, printed: 10 },
  },
  "WIND-06": {
    a: infeasible("a", "a cross wind above the air speed"),
    b: infeasible("b", "a head wind above the air speed"),
    c: infeasible("c", "a head wind of the air speed"),
    d: infeasible("d", "a cross wind of the air speed"),
  },
  "WIND-07": {
    a_h: {
      words: "time of 210 nautical miles at 140 knots, by a whole leg",
      ours: () => {
        const run = equatorLeg(fromUnit(210, "NM"), { speed: fromUnit(140, "kn") });
        return toUnit(run.estimate.legs[0]?.time_s as number, "h");
      },
      printed: 1.5,
      printedWithin: 0.5 / 60,
    },
    b_nm: {
      words: "distance of 1 h 45 min at 120 knots",
      ours: () => toUnit(parseQuantity("105 min", "time") * parseQuantity("120 kn", "speed"), "NM"),
    },
    c_kn: {
      words: "speed of 270 nautical miles in 3 hours",
      ours: () => toUnit(parseQuantity("270 NM", "length") / parseQuantity("3 h", "time"), "kn"),
    },
    d_mph: {
      words: "20 knots in statute miles an hour (1609.344 m, not a unit of ours)",
      ours: () => (fromUnit(20, "kn") * 3600) / 1609.344,
    },
  },
  "WIND-08": {
    wind_from_deg: {
      words: "direction that a wind comes from",
      ours: () => windFrom(given("WIND-08").u_ms as number, given("WIND-08").v_ms as number).from_deg,
    },
    current_to_deg: {
      words: "set of a current",
      ours: () => currentSet(given("WIND-08").u_ms as number, given("WIND-08").v_ms as number).set_deg,
    },
  },
  "ZER-04": {
    time: { words: "time of the straight leg in a uniform current", ours: () => zermelo().time },
    heading_deg: { words: "heading of the straight leg", ours: () => zermelo().heading },
  },
};

/** Ground speed on the straight way from the textbook's start of Zermelo's problem (ZER-01): below 0, it cannot be sailed. */
export function straightZermeloGroundSpeed(): number {
  const toward = currentSet(-3.66, 1.86).set_deg;
  const triangle = solveTriangle({ course_deg: toward, throughSpeed: 1, u: 1.86, v: 0 });
  if (triangle.holdable) return triangle.groundSpeed;
  return groundSpeedAlong(1, triangle.along, triangle.cross);
}
