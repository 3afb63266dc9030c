import type { Profile, RouteEstimate } from "../core.ts";
import { rateUnit, type ShownUnit, shownUnit, storeUnit } from "../format/units.ts";
import type { UnitsPreset } from "../state/page-view.ts";

/** One figure along a route, in SI units, and how it is shown. */
export interface ProfileTrack {
  readonly key: string;
  readonly name: string;
  readonly values: Float64Array;
  readonly unit: ShownUnit;
  /** Ends of the scale, in the values' own unit; `low` below `high`. */
  readonly low: number;
  readonly high: number;
  /** Whether the sign says something: with and against, starboard and port. */
  readonly signed: boolean;
  /** A level that must not be crossed; `null` for none. */
  readonly bound: number | null;
}

/** The figures that a profile draws, top to bottom. */
export function profileTracks(profile: Profile, route: RouteEstimate, units: UnitsPreset): ProfileTrack[] {
  const speed = shownUnit(units, "speed");
  const flow = Math.max(largest(profile.along_m_s), largest(profile.cross_m_s));
  return [
    signedTrack("along", "Along track", profile.along_m_s, speed, flow),
    signedTrack("cross", "Cross track", profile.cross_m_s, speed, flow),
    upward("ground", "Ground speed", profile.groundSpeed_m_s, speed),
    upward(
      "rate",
      route.storeUnit === "J" ? "Power" : "Use rate",
      profile.usePerSecond,
      rateUnit(route.storeUnit, largest(profile.usePerSecond)),
    ),
    {
      ...upward("left", "Store left", profile.remaining, storeUnit(route.storeUnit, route.usable)),
      low: Math.min(0, ...profile.remaining),
      high: route.usable,
      bound: route.reserve !== null && route.reserve > 0 ? route.reserve : null,
    },
  ];
}

/** Along and cross share a scale, so that their heights can be compared. */
function signedTrack(
  key: string,
  name: string,
  values: Float64Array,
  unit: ShownUnit,
  limit: number,
): ProfileTrack {
  const end = limit > 0 ? limit : unit.si;
  return { key, name, values, unit, low: -end, high: end, signed: true, bound: null };
}

function upward(key: string, name: string, values: Float64Array, unit: ShownUnit): ProfileTrack {
  const high = largest(values);
  return { key, name, values, unit, low: 0, high: high > 0 ? high : unit.si, signed: false, bound: null };
}

function largest(values: Float64Array): number {
  return values.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
}
