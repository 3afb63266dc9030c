import {
  type Field,
  LATTICE_COVERED,
  LATTICE_FILLED,
  LATTICE_GAP,
  LATTICE_HELD,
  sampleLattice,
} from "./core.ts";
import type { Lattice, LatticeQuestion } from "./protocol.ts";

/** More places than any screen shows; beyond it the question is a mistake. */
const MOST_PLACES = 100_000;

/** The field's vectors on a lattice, where it has any: given, filled by the gap policy, or held beyond its last time; and its gaps. */
export function answerLattice(fields: readonly Field[], question: LatticeQuestion): Lattice {
  const { role, south, north, west, east, stepLat, stepLon, phase, height_m, instant } = question;
  const field = fields.find((candidate) => candidate.role === role);
  const lats = multiples(south, north, stepLat, phase);
  const lons = multiples(west, east, stepLon, phase);
  const count = lats.length * lons.length;
  if (field === undefined || count > MOST_PLACES)
    return packed(new Float64Array(0), new Float64Array(0), [], [], []);
  const { u, v, state } = sampleLattice(field, lats, lons, height_m, instant);
  const shown = Array.from(state, (_, at) => at).filter((at) => isShown(state[at]));
  return packed(
    Float64Array.from(shown, (at) => lats[Math.floor(at / lons.length)] ?? 0),
    Float64Array.from(shown, (at) => lons[at % lons.length] ?? 0),
    shown.map((at) => u[at] ?? 0),
    shown.map((at) => v[at] ?? 0),
    shown.map((at) => state[at] ?? LATTICE_GAP),
  );
}

function isShown(state: number | undefined): boolean {
  return (
    state === LATTICE_COVERED || state === LATTICE_FILLED || state === LATTICE_HELD || state === LATTICE_GAP
  );
}

function multiples(from: number, to: number, step: number, phase: number): number[] {
  const found: number[] = [];
  for (let count = Math.ceil(from / step - phase) + phase; count * step <= to; count += 1)
    found.push(count * step);
  return found;
}

function packed(
  lat: Float64Array,
  lon: Float64Array,
  u: readonly number[],
  v: readonly number[],
  state: readonly number[],
): Lattice {
  return {
    lat,
    lon,
    east_m_s: Float32Array.from(u),
    north_m_s: Float32Array.from(v),
    state: Uint8Array.from(state),
  };
}
