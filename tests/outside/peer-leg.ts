import { expect } from "vitest";
import type { Craft, Pace } from "../../src/craft/craft.ts";
import type { LegEstimate } from "../../src/estimate/result.ts";
import type { Route } from "../../src/estimate/route.ts";
import type { Field } from "../../src/field/field.ts";
import { DEPARTURE, estimateOf } from "../estimate/fixtures.ts";
import { runPython } from "./scipy.ts";

/** A leg that is estimated by us and integrated by the peer program legs_by_scipy.py. */
export interface PeerLeg {
  readonly name: string;
  /** Two waypoints. */
  readonly route: Route;
  readonly craft: Craft;
  readonly pace: Pace;
  readonly fields: readonly Field[];
  /** The craft's power model as the peer knows it. */
  readonly power: Readonly<Record<string, unknown>>;
  /** A file that the peer reads for itself, in place of the nodes of `fields`. */
  readonly peerFile?: PeerFile;
}

/** A field file with the names of its columns; a steady wind of one level. */
export interface PeerFile {
  readonly file: string;
  readonly role: "wind";
  readonly columns: Readonly<Record<string, string>>;
  readonly global: boolean;
  /** The pole about which directions turn: 1 north, -1 south. */
  readonly pole: 1 | -1;
}

interface PeerAnswer {
  readonly length: number;
  readonly values: Readonly<Record<string, number>>;
  /** The peer's estimate of its own errors. */
  readonly errors: Readonly<Record<string, number>>;
}

export function integrateByPeer(legs: readonly PeerLeg[]): PeerAnswer[] {
  return runPython("legs_by_scipy.py", legs.map(peerInput)) as PeerAnswer[];
}

function peerInput({ route, craft, pace, fields, power, peerFile }: PeerLeg) {
  const [from, to] = route.waypoints;
  if (from === undefined || to === undefined) throw new Error("a peer leg has two waypoints");
  const { windage } = craft;
  return {
    path: to.path,
    from: [from.lat, from.lon],
    to: [to.lat, to.lon],
    heights: from.height_m === null || to.height_m === null ? null : [from.height_m, to.height_m],
    fields: peerFile === undefined ? fields.map(peerField) : [peerFile],
    pace: {
      hold: pace.hold,
      speed: "speed_m_s" in pace ? pace.speed_m_s : null,
      power: "power_W" in pace ? pace.power_W : null,
    },
    craft: {
      medium: craft.moves === "water" ? "current" : "wind",
      power,
      hotel: craft.hotelPerSecond,
      climbForce: craft.power.climbForce,
      speeds: craft.speeds === null ? null : [craft.speeds.min, craft.speeds.max],
      windage:
        windage === null
          ? null
          : {
              area: windage.frontalArea_m2,
              drag: windage.dragCoefficient,
              efficiency: windage.efficiency,
              density: windage.airDensity_kg_m3,
            },
    },
  };
}

function peerField({ role, tiles }: Field) {
  const tile = tiles[0];
  if (tile === undefined || tiles.length !== 1) throw new Error("a peer's field is one tile");
  const { lon, lat, height, times, slices } = tile;
  const component = (offset: number) =>
    slices.map((slice) =>
      Array.from({ length: height?.length ?? 1 }, (_k, k) =>
        Array.from({ length: lat.length }, (_j, j) =>
          Array.from(
            { length: lon.length },
            (_i, i) => slice[2 * ((k * lat.length + j) * lon.length + i) + offset],
          ),
        ),
      ),
    );
  return {
    role,
    lon: [...lon],
    lat: [...lat],
    height: height === null ? null : [...height],
    times: times === null ? null : Array.from(times, (time) => (time - DEPARTURE) / 1000),
    pole: (lat[0] as number) < 0 && (lat.at(-1) as number) <= 0 ? -1 : 1,
    u: component(0),
    v: component(1),
  };
}

/** Just above the achieved 1.4e-12 (a line integral in which the field nearly cancels); times and uses agree to 2e-13. */
const AGREEMENT = 5e-12;

/** Time, use, distance through the medium and line integrals agree, and time and use within the bounds reported. */
export function expectAgreement(given: PeerLeg, answer: PeerAnswer): void {
  const run = estimateOf(given.route, given).estimate;
  const leg = run.legs[0] as LegEstimate;
  const { values, errors, length } = answer;
  expect(Math.abs(leg.distance_m - length)).toBeLessThan(1e-7);
  const figures: Record<string, number | null | undefined> = {
    time: leg.time_s,
    use: leg.use,
    through: leg.throughDistance_m,
    wind: leg.wind?.alongTrackIntegral_m2_s,
    current: leg.current?.alongTrackIntegral_m2_s,
  };
  for (const [name, theirs] of Object.entries(values)) {
    const ours = figures[name] as number;
    const apart = Math.abs(ours - theirs);
    expect(apart / Math.abs(theirs), `${name}: ours ${ours}, theirs ${theirs}`).toBeLessThanOrEqual(
      AGREEMENT,
    );
  }
  const bounds = { time: leg.error?.time_s as number, use: leg.error?.use as number };
  for (const name of ["time", "use"] as const) {
    const apart = Math.abs((figures[name] as number) - (values[name] as number));
    const allowed = bounds[name] + (errors[name] as number);
    expect(apart, `${name}: bound ${bounds[name]}, the peer's ${errors[name]}`).toBeLessThanOrEqual(allowed);
    // The bound itself says little more than is achieved.
    expect(bounds[name]).toBeLessThanOrEqual(AGREEMENT * (figures[name] as number));
  }
}
