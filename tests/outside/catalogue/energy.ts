import { STANDARD_GRAVITY } from "../../../src/constants.ts";
import { cubePower } from "../../../src/craft/cube.ts";
import {
  bladeProfilePower,
  glauertInducedSpeed,
  inducedPower,
  rotorPower,
} from "../../../src/craft/rotor.ts";
import {
  bestGlideSpeed,
  breguetEndurance,
  breguetRange,
  leastPowerSpeed,
  maxLiftThreeHalvesToDrag,
  maxLiftToDrag,
} from "../../../src/craft/wing-performance.ts";
import { fromUnit, toUnit } from "../../../src/units.ts";
import { craftOf, estimateOf, routeOf, waypoint } from "../../estimate/fixtures.ts";
import { uniformField } from "../legs.ts";
import { type Answers, given } from "./catalogue.ts";
import { rootBetween } from "./search.ts";

type Numbers = Readonly<Record<string, number>>;

const zengProfile = () => {
  const { delta, rho, s, A_m2, Omega_rad_s, R_m } = given("ENE-01") as Numbers;
  return bladeProfilePower({
    profileDragCoefficient: delta as number,
    airDensity_kg_m3: rho as number,
    solidity: s as number,
    discArea_m2: A_m2 as number,
    bladeSpeed_rad_s: Omega_rad_s as number,
    rotorRadius_m: R_m as number,
  });
};
const zengInduced = () => {
  const { k, W_N, rho, A_m2 } = given("ENE-01") as Numbers;
  return inducedPower({
    inducedCorrection: k as number,
    weight_N: W_N as number,
    airDensity_kg_m3: rho as number,
    discArea_m2: A_m2 as number,
  });
};
const zeng = () => {
  const { U_tip_ms, v0_ms, d0, s, A_m2, rho } = given("ENE-01") as Numbers;
  return rotorPower({
    bladeProfilePower_W: zengProfile(),
    inducedPower_W: zengInduced(),
    tipSpeed_m_s: U_tip_ms as number,
    hoverInducedSpeed_m_s: v0_ms as number,
    fuselageDragRatio: d0 as number,
    solidity: s as number,
    discArea_m2: A_m2 as number,
    airDensity_kg_m3: rho as number,
  });
};
const zengEndurance = () => rootBetween(1, 40, (v) => zeng().slope(v));

const shipPower = (speed_kn: number): number =>
  cubePower({ referenceSpeed_m_s: fromUnit(25, "kn"), referencePower_W: 1e6 }).perSecond(
    fromUnit(speed_kn, "kn"),
  );
const cubeRatio = () => {
  const { speed_from_kn, speed_to_kn } = given("ENE-07");
  return shipPower(speed_to_kn as number) / shipPower(speed_from_kn as number);
};
const perMile = () => {
  const { speed_from_kn, speed_to_kn } = given("ENE-07");
  const leg = (speed_kn: number): number =>
    estimateOf(routeOf(waypoint("a", 0, 0), waypoint("b", 0, 1)), {
      craft: craftOf({
        moves: "water",
        power: cubePower({ referenceSpeed_m_s: 10, referencePower_W: 1e6 }),
      }),
      pace: { hold: "through-speed", speed_m_s: fromUnit(speed_kn, "kn") },
    }).estimate.totals.use as number;
  return leg(speed_to_kn as number) / leg(speed_from_kn as number);
};
/** The speed of a whole leg at the least-energy pace, against the current. */
const bestSpeed = () => {
  const current = uniformField("current", -fromUnit(given("ENE-07").head_current_kn as number, "kn"), 0);
  const craft = craftOf({
    moves: "water",
    power: cubePower({ referenceSpeed_m_s: 5, referencePower_W: 40_000 }),
    speeds: { min: fromUnit(2.1, "kn"), max: fromUnit(20, "kn") },
  });
  const run = estimateOf(routeOf(waypoint("a", 0, 0), waypoint("b", 0, 0.5, { path: "rhumb" })), {
    craft,
    pace: { hold: "least-energy" },
    fields: [current],
  });
  return toUnit(run.estimate.legs[0]?.throughSpeed_m_s?.mean as number, "kn");
};

const cp1 = () => {
  const { W0_N, fuel_N, span_m, S_m2, CD0, e, eta, sfc_N_per_J, rho } = given("ENE-11") as Numbers;
  const aspectRatio = (span_m as number) ** 2 / (S_m2 as number);
  return {
    mass_kg: (W0_N as number) / STANDARD_GRAVITY,
    wingArea_m2: S_m2 as number,
    airDensity_kg_m3: rho as number,
    zeroLiftDrag: CD0 as number,
    inducedFactor: 1 / (Math.PI * (e as number) * aspectRatio),
    startMass_kg: (W0_N as number) / STANDARD_GRAVITY,
    endMass_kg: ((W0_N as number) - (fuel_N as number)) / STANDARD_GRAVITY,
    propellerEfficiency: eta as number,
    specificConsumption_kg_J: (sfc_N_per_J as number) / STANDARD_GRAVITY,
  };
};

export const energy: Answers = {
  "ENE-01": {
    P0_W: { words: "blade profile power", ours: zengProfile },
    Pi_W: { words: "induced power in hover", ours: zengInduced },
    hover_W: { words: "power in hover", ours: () => zeng().perSecond(0) },
    V_max_endurance_ms: { words: "speed of least power", ours: zengEndurance },
    P_at_Vme_W: { words: "least power", ours: () => zeng().perSecond(zengEndurance()) },
    P_10_ms_W: { words: "power at 10 m/s", ours: () => zeng().perSecond(10) },
    P_15_ms_W: { words: "power at 15 m/s", ours: () => zeng().perSecond(15) },
  },
  "ENE-03": {
    v_hover_ms: {
      words: "induced speed in hover",
      ours: () => {
        const { T_N, rho, A_m2 } = given("ENE-03") as Numbers;
        return glauertInducedSpeed(T_N as number, rho as number, A_m2 as number);
      },
      printed: 4.03,
    },
  },
  "ENE-07": {
    power_ratio: { words: "power of a fifth less speed", ours: cubeRatio },
    fuel_per_mile_ratio: { words: "use of the same leg at a fifth less speed", ours: perMile },
    best_speed_through_water_kn: { words: "least-energy speed against a current", ours: bestSpeed },
  },
  "ENE-11": {
    LD_max: { words: "greatest lift-to-drag ratio", ours: () => maxLiftToDrag(cp1()) },
    CL15_CD_max: {
      words: "greatest ratio of lift to the power 3/2 to drag",
      ours: () => maxLiftThreeHalvesToDrag(cp1()),
    },
    V_LDmax_ms: { words: "speed of the greatest lift-to-drag ratio", ours: () => bestGlideSpeed(cp1()) },
    V_endurance_ms: { words: "speed of least power", ours: () => leastPowerSpeed(cp1()) },
    range_km_with_13_62: {
      words: "Breguet range at the book's ratio",
      ours: () => toUnit(breguetRange(cp1(), 13.62), "km"),
      printed: 1942,
    },
    endurance_h_with_12_81: {
      words: "Breguet endurance at the book's ratio",
      ours: () => toUnit(breguetEndurance(cp1(), 12.81), "h"),
    },
  },
};
