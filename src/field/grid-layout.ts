import { InputError } from "../errors.ts";
import { NODE_MISSING } from "./field.ts";
import type { GridSlice } from "./grid-slice.ts";
import type { GridStore } from "./grid-store.ts";
import type { MemberSlices } from "./member-slices.ts";

/** Vectors and gusts on one meridian given under two longitudes agree within this, m/s: the rounding of a direction. */
const AGREEMENT = 1e-6;

/** Axis values in the order of first appearance. */
export interface FoundAxes {
  readonly lon: readonly number[];
  readonly lat: readonly number[];
  /** m; `null` where the file has no levels. */
  readonly height: readonly number[] | null;
  /** ms since 1970-01-01T00:00Z; `null` where the field is steady. */
  readonly times: readonly number[] | null;
  /** Numbers of the members, and which slice is of which member and time; `null` where the file has no members. */
  readonly members: { readonly numbers: readonly number[]; readonly slices: MemberSlices } | null;
}

export interface OrderedAxis {
  /** Ascending. */
  readonly values: Float64Array;
  /** Per value its index by first appearance. */
  readonly sources: Int32Array;
}

/** A slice in the order of the axes. */
export interface LaidSlice {
  readonly values: Float64Array;
  readonly gusts: Float64Array | null;
  readonly mask: Uint8Array | null;
}

/** Moves slices from the order of first appearance to that of the axes. */
export class GridLayout {
  private readonly store: GridStore;
  private readonly lonSources: readonly (readonly number[])[];
  private readonly firstLon: Int32Array;
  private readonly doubled: readonly number[];
  private readonly rowSources: Int32Array;
  private readonly about: { readonly file: string; readonly axes: FoundAxes };
  private readonly inPlace: boolean;
  /** Memory of the slice before, which the next one may use. */
  private spare: Float64Array | null = null;

  constructor(
    store: GridStore,
    lonSources: readonly (readonly number[])[],
    lat: OrderedAxis,
    height: OrderedAxis | null,
    about: { readonly file: string; readonly axes: FoundAxes },
  ) {
    const { room } = store;
    this.store = store;
    this.about = about;
    this.lonSources = lonSources;
    this.firstLon = Int32Array.from(lonSources, (sources) => sources[0] as number);
    this.doubled = [...lonSources.keys()].filter(
      (index) => (lonSources[index] as readonly number[]).length > 1,
    );
    const levels = height?.sources ?? Int32Array.of(0);
    this.rowSources = Int32Array.from({ length: levels.length * lat.sources.length }, (_, row) => {
      const level = levels[Math.floor(row / lat.sources.length)] as number;
      return (level * room.lat + (lat.sources[row % lat.sources.length] as number)) * room.lon;
    });
    this.inPlace =
      this.doubled.length === 0 &&
      this.firstLon.length === room.lon &&
      this.rowSources.length === room.lat * room.level &&
      this.firstLon.every((source, index) => source === index) &&
      this.rowSources.every((source, row) => source === row * room.lon);
  }

  take(slice: GridSlice): LaidSlice {
    this.joinDoubled(slice);
    const nodes = this.firstLon.length * this.rowSources.length;
    const whole = slice.missing === 0 && slice.rows === nodes;
    if (this.inPlace && whole) return { values: slice.values, gusts: slice.gusts, mask: null };
    const values =
      this.spare === null || this.spare.length < 2 * nodes
        ? new Float64Array(2 * nodes)
        : this.spare.subarray(0, 2 * nodes);
    const gusts = slice.gusts === null ? null : new Float64Array(nodes);
    const mask = this.fill(slice, values, gusts);
    this.spare = slice.values;
    return { values, gusts, mask };
  }

  /** Copies a slice's nodes; returns the mask, or `null` where none is missing. */
  private fill(slice: GridSlice, values: Float64Array, gusts: Float64Array | null): Uint8Array | null {
    const { firstLon, rowSources } = this;
    const columns = firstLon.length;
    let mask: Uint8Array | null = null;
    let node = 0;
    for (const rowSource of rowSources) {
      for (let i = 0; i < columns; i++, node++) {
        const source = rowSource + (firstLon[i] as number);
        const seen = slice.has(source);
        const u = seen ? (slice.values[2 * source] as number) : Number.NaN;
        const isMissing = Number.isNaN(u);
        if (isMissing) {
          mask ??= new Uint8Array(columns * rowSources.length);
          mask[node] = NODE_MISSING;
        }
        values[2 * node] = isMissing ? 0 : u;
        values[2 * node + 1] = isMissing ? 0 : (slice.values[2 * source + 1] as number);
        if (gusts !== null)
          gusts[node] = seen ? ((slice.gusts as Float64Array)[source] as number) : Number.NaN;
      }
    }
    return mask;
  }

  /** Brings what several longitudes of the file give on one meridian to the first of them. */
  private joinDoubled(slice: GridSlice): void {
    for (const column of this.doubled) {
      const [first, ...others] = this.lonSources[column] as readonly number[];
      for (const rowSource of this.rowSources) {
        for (const other of others) this.join(slice, rowSource, first as number, other);
      }
    }
  }

  private join(slice: GridSlice, rowSource: number, first: number, other: number): void {
    const from = rowSource + other;
    const to = rowSource + first;
    if (!slice.has(from)) return;
    const { values, gusts } = slice;
    const [u, v, gust] = [values[2 * from], values[2 * from + 1], gusts?.[from] ?? 0] as [
      number,
      number,
      number,
    ];
    if (!slice.has(to)) {
      slice.put(to, u, v, gust);
      return;
    }
    const agreed = agreeing(values[2 * to] as number, u) && agreeing(values[2 * to + 1] as number, v);
    if (!agreed || !agreeing(gusts?.[to] ?? 0, gust)) throw this.disagreement(rowSource, first, other);
    if (Number.isNaN(values[2 * to])) {
      values[2 * to] = u;
      values[2 * to + 1] = v;
    }
    if (gusts !== null && Number.isNaN(gusts[to])) gusts[to] = gust;
  }

  private disagreement(rowSource: number, first: number, other: number): InputError {
    const { axes, file } = this.about;
    const lat = axes.lat[(rowSource / this.store.room.lon) % this.store.room.lat];
    const [a, b] = [axes.lon[first], axes.lon[other]];
    return new InputError(
      `longitudes ${a} and ${b} are one meridian and give the same values; found different ones at latitude ${lat}`,
      { file },
    );
  }
}

/** Whether two values are the same, or one is missing. */
function agreeing(a: number, b: number): boolean {
  return Number.isNaN(a) || Number.isNaN(b) || Math.abs(a - b) <= AGREEMENT;
}
