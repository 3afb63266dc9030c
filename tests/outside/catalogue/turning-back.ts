import { turnBack } from "../../../src/choose/turn-back.ts";
import type { TurnBack } from "../../../src/choose/turn-back-result.ts";
import { componentsFromWind } from "../../../src/craft/triangle.ts";
import { prepareRoute } from "../../../src/estimate/prepare.ts";
import { DEGREE } from "../../../src/geodesy/angle.ts";
import { WGS84 } from "../../../src/geodesy/ellipsoid.ts";
import { fromUnit, toUnit } from "../../../src/units.ts";
import { craftOf, DEPARTURE, routeOf, waypoint } from "../../estimate/fixtures.ts";
import { equatorLeg, uniformWind } from "../legs.ts";
import { type Answers, given } from "./catalogue.ts";
import { held } from "./triangles.ts";

interface Flight {
  readonly distance_nm: number;
  readonly tas_kn: number;
  /** Toward the east, kn. */
  readonly wind_kn: number;
  /** At the one rate of the craft; without end where left out. */
  readonly endurance_s?: number;
}

/** Flies east along the equator and asks for the way back from everywhere. */
function flight({ distance_nm, tas_kn, wind_kn, endurance_s = 1e9 }: Flight): TurnBack {
  const end = fromUnit(distance_nm, "NM") / (WGS84.a * DEGREE);
  const route = routeOf(waypoint("start", 0, 0), waypoint("end", 0, end, { path: "rhumb" }));
  const fields = [uniformWind({ u: fromUnit(wind_kn, "kn"), v: 0 })];
  const pace = { hold: "through-speed", speed_m_s: fromUnit(tas_kn, "kn") } as const;
  const craft = craftOf({ store: { unit: "J", usable: 1000 * endurance_s } });
  return turnBack(prepareRoute(route, fields), { departure: DEPARTURE, craft, pace, reserve: null, fields });
}

const groundSpeed = (head: number) => {
  const { tas_kn, headwind_kn } = given("PNR-01");
  return held(90, tas_kn as number, componentsFromWind(headwind_kn as number, head > 0 ? 90 : 270))
    .groundSpeed;
};

const equalTime = () => {
  const { distance_nm, tas_kn, headwind_kn } = given("PNR-01");
  const turn = flight({
    distance_nm: distance_nm as number,
    tas_kn: tas_kn as number,
    wind_kn: -(headwind_kn as number),
  });
  const [point] = turn.equalTime;
  if (point === undefined) throw new Error("no equal-time point");
  return point;
};

const noReturn = () => {
  const { endurance_h, gs_out_kn, gs_home_kn } = given("PNR-02");
  const out = gs_out_kn as number;
  const home = gs_home_kn as number;
  const turn = flight({
    distance_nm: 1200,
    tas_kn: (out + home) / 2,
    wind_kn: (out - home) / 2,
    endurance_s: fromUnit(endurance_h as number, "h"),
  });
  const last = turn.limits[0]?.last;
  if (last === undefined || last === null) throw new Error("no point of no return");
  return last;
};

const airDistance = () => {
  const { ground_distance_nm, tas_kn, gs_kn } = given("PNR-04");
  const headwind = fromUnit((tas_kn as number) - (gs_kn as number), "kn");
  const run = equatorLeg(fromUnit(ground_distance_nm as number, "NM"), {
    speed: fromUnit(tas_kn as number, "kn"),
    fields: [uniformWind({ u: -headwind, v: 0 })],
  });
  return toUnit(run.estimate.legs[0]?.throughDistance_m as number, "NM");
};

export const turningBack: Answers = {
  "PNR-01": {
    gs_out: { words: "ground speed out", ours: () => groundSpeed(1) },
    gs_home: { words: "ground speed home", ours: () => groundSpeed(-1) },
    etp_from_departure_nm: {
      words: "equal-time point of a whole flight",
      ours: () => toUnit(equalTime().place.distance_m, "NM"),
    },
    time_each_way_min: { words: "time from there either way", ours: () => toUnit(equalTime().time_s, "min") },
  },
  "PNR-02": {
    time_min: { words: "time out to the point of no return", ours: () => toUnit(noReturn().time_s, "min") },
    distance_nm: { words: "distance out", ours: () => toUnit(noReturn().distance_m, "NM") },
  },
  "PNR-04": {
    net_air_distance_nm: { words: "distance through the air of a whole leg", ours: airDistance },
  },
};
