import type { Field } from "../field/field.ts";
import { type Flow, makeFlow, readSlice } from "./flow.ts";
import { LEVEL_BETWEEN, type PanelCells } from "./panels.ts";
import type { PreparedLeg } from "./prepare.ts";
import { project } from "./project.ts";
import { BENDS, PAIR, POINT, POINTS } from "./smooth-pair.ts";
import { cutPair, fitPowers, TERMS } from "./smooth-powers.ts";
import { COLUMN_POINTS, COLUMN_X } from "./smooth-rule.ts";
import { layMiddle, layStations, makeStations } from "./stations.ts";

/*
 * Columns: what the medium is along one panel at one valid time, along and across the track, for whoever comes by at whatever moment. A
 * column depends on the place and the slice alone, so that all departures of a sweep read the same one. Two of them side by
 * side, as values and changes, make a pair: all that a smooth step reads.
 */

/** Answer where the data of a panel cannot serve a smooth step. */
export const NO_PAIR = -1;

const VALUES = COLUMN_X.length;
const LAST = VALUES - 1;
const MIDDLE = LAST / 2;
/** Offsets in a column: values of both components, then the coefficients in ξ of their polynomials. */
const ALONG = 0;
const CROSS = VALUES;
const ALONG_POWERS = 2 * VALUES;
const CROSS_POWERS = ALONG_POWERS + TERMS;
const COLUMN = CROSS_POWERS + TERMS;

/** What is known of a column; the polynomials are laid when a part of the panel is asked for. */
const UNMADE = 0;
const MADE = 1;
const UNFIT = 2;
const WITH_POWERS = 3;
const WITHOUT_POWERS = 4;

/** The columns of the panel in work, one a slice, for one field. */
export class SmoothColumns {
  /** The pairs of the whole panel, that of slice k and the next at k times {@link PAIR}. */
  readonly pairs: Float64Array;
  /** Tile that holds the panel, the first that covers it; -1 where none does, or beyond 85° of latitude. */
  tile = -1;
  readonly #columns: Float64Array;
  readonly #state: Uint8Array;
  readonly #joined: Uint8Array;
  readonly #sampler: Flow;
  readonly #stations = makeStations(COLUMN_X);
  readonly #alongOnly: boolean;
  #reach = 0;
  #leg: PreparedLeg | null = null;
  #panel = -1;
  #laid = false;

  /** @param alongOnly take the cross-track component as zero */
  constructor(field: Field, alongOnly: boolean) {
    const slices = Math.max(0, ...field.tiles.map((tile) => tile.slices.length));
    this.#sampler = makeFlow(field, 0);
    this.#alongOnly = alongOnly;
    this.#state = new Uint8Array(slices);
    this.#joined = new Uint8Array(slices);
    this.#columns = new Float64Array(slices * COLUMN);
    this.pairs = new Float64Array(slices * PAIR);
  }

  /**
   * Turns to a leg; `cells` are those of the field's tiles on it.
   *
   * @param reach nothing is given where a node in use has a speed above this, m/s
   */
  onLeg(leg: PreparedLeg, cells: readonly PanelCells[], reach: number): void {
    this.#leg = leg;
    this.#reach = reach;
    this.#sampler.cells = cells;
    this.#sampler.heights = leg.heights;
  }

  /** Turns to a panel of the leg. */
  enter(panel: number): void {
    const { cells } = this.#sampler;
    this.#panel = panel;
    this.#laid = false;
    this.#state.fill(UNMADE);
    this.#joined.fill(0);
    this.tile = -1;
    if ((this.#leg as PreparedLeg).panels.polar[panel] === 1) return;
    for (let q = 0; q < cells.length && this.tile < 0; q += 1)
      if (((cells[q] as PanelCells).column[panel] as number) >= 0) this.tile = q;
  }

  /** Offset of the pair of two slices; {@link NO_PAIR} where data are missing, filled, held or out of reach. */
  pair(slice: number, next: number): number {
    if (!this.#has(slice) || !this.#has(next)) return NO_PAIR;
    if (this.#joined[slice] === 0) {
      this.#joined[slice] = 1;
      this.#join(slice * COLUMN, next * COLUMN, slice * PAIR);
    }
    return slice * PAIR;
  }

  /**
   * Lays the pair of a part of the panel, which starts at ξ = `from` and is 2 `half` long, at `at` in `parts`.
   *
   * @returns whether there are such columns, and they can be cut
   */
  part(slice: number, next: number, from: number, half: number, parts: Float64Array, at: number): boolean {
    const whole = this.pair(slice, next);
    if (whole === NO_PAIR || !this.#hasPowers(slice) || !this.#hasPowers(next)) return false;
    cutPair(
      this.#columns,
      slice * COLUMN + ALONG_POWERS,
      next * COLUMN + ALONG_POWERS,
      from,
      half,
      parts,
      at,
    );
    const { pairs } = this;
    const square = half * half;
    for (let n = BENDS; n < PAIR; n += 1) parts[at + n] = square * (pairs[whole + n] as number);
    return true;
  }

  #has(slice: number): boolean {
    if (this.tile < 0) return false;
    if (this.#state[slice] === UNMADE) this.#state[slice] = this.#make(slice) ? MADE : UNFIT;
    return this.#state[slice] !== UNFIT;
  }

  #make(slice: number): boolean {
    const sampler = this.#sampler;
    const panel = this.#panel;
    this.#lay();
    readSlice(sampler, panel, this.tile, slice, this.#stations);
    if (sampler.state !== "data" || sampler.filled || sampler.beyondLevels) return false;
    const between = (sampler.cells[this.tile] as PanelCells).levelState[panel] === LEVEL_BETWEEN;
    if (peak(sampler, between ? 2 : 1) > this.#reach) return false;
    project(sampler, panel, false, this.#stations);
    this.#copy(sampler, slice * COLUMN);
    return true;
  }

  #copy({ along, cross }: Flow, at: number): void {
    const columns = this.#columns;
    const isAcross = !this.#alongOnly;
    for (let n = 0; n < VALUES; n += 1) {
      columns[at + ALONG + n] = along[n] as number;
      if (isAcross) columns[at + CROSS + n] = cross[n] as number;
    }
  }

  /** Lays the stations on the panel, once. */
  #lay(): void {
    if (this.#laid) return;
    this.#laid = true;
    const { panels, curve } = this.#leg as PreparedLeg;
    const piece = panels.piece[this.#panel] as number;
    const from = panels.s[this.#panel] as number;
    const to = panels.s[this.#panel + 1] as number;
    layMiddle(this.#stations, curve, piece, from, to);
    layStations(this.#stations, curve, piece, from, to);
  }

  #join(first: number, second: number, at: number): void {
    const columns = this.#columns;
    const { pairs } = this;
    for (let n = 0; n < POINTS; n += 1) {
      const along = COLUMN_POINTS[n] as number;
      const cross = along + CROSS;
      const to = at + POINT * n;
      pairs[to] = columns[first + along] as number;
      pairs[to + 1] = (columns[second + along] as number) - (columns[first + along] as number);
      pairs[to + 2] = columns[first + cross] as number;
      pairs[to + 3] = (columns[second + cross] as number) - (columns[first + cross] as number);
    }
    pairs[at + BENDS] = bend(columns, first + ALONG);
    pairs[at + BENDS + 1] = bend(columns, second + ALONG) - bend(columns, first + ALONG);
    pairs[at + BENDS + 2] = bend(columns, first + CROSS);
    pairs[at + BENDS + 3] = bend(columns, second + CROSS) - bend(columns, first + CROSS);
  }

  /** Whether polynomials serve for a column that there is. */
  #hasPowers(slice: number): boolean {
    if (this.#state[slice] === MADE) {
      const at = slice * COLUMN;
      const fits =
        fitPowers(this.#columns, at + ALONG, at + ALONG_POWERS, this.#reach) &&
        fitPowers(this.#columns, at + CROSS, at + CROSS_POWERS, this.#reach);
      this.#state[slice] = fits ? WITH_POWERS : WITHOUT_POWERS;
    }
    return this.#state[slice] === WITH_POWERS;
  }
}

/** Half the second derivative in ξ, from both ends and the middle: exact for a parabola. */
function bend(values: Float64Array, at: number): number {
  return ((values[at] as number) + (values[at + LAST] as number)) / 2 - (values[at + MIDDLE] as number);
}

/** Speed of the fastest node of the cell in use, m/s: no place between them has a greater one. */
function peak({ corners }: Flow, levels: number): number {
  let square = 0;
  for (let n = 0; n < 8 * levels; n += 8)
    for (let side = n; side < n + 4; side += 2) {
      const u = corners[side] as number;
      const v = corners[side + 4] as number;
      const uNorth = u + (corners[side + 1] as number);
      const vNorth = v + (corners[side + 5] as number);
      square = Math.max(square, u * u + v * v, uNorth * uNorth + vNorth * vNorth);
    }
  return Math.sqrt(square);
}
