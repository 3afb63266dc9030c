import type { Field } from "../field/field.ts";
import type { PanelCells } from "./panels.ts";
import type { PreparedLeg } from "./prepare.ts";
import { NO_PAIR, SmoothColumns } from "./smooth-columns.ts";
import { ABREAST, PASSING_S, SmoothLog, SUNK, type Taken } from "./smooth-log.ts";
import { SmoothMean } from "./smooth-mean.ts";
import { PAIR } from "./smooth-pair.ts";
import { SmoothRounds } from "./smooth-rounds.ts";
import {
  guessDistance,
  guessSlowness,
  type Lanes,
  makeLanes,
  NOT_SMOOTH,
  smoothTimes,
} from "./smooth-step.ts";

/** Share of the speed held beyond which no medium is smooth: near it the ground speed ends. */
const REACH = 0.9;

/** The fastest medium over which a craft at this speed steps smoothly, m/s. */
export function reachOf(speed: number): number {
  return REACH * speed;
}

/** So many departures between two valid times are worth what mean ground speeds cost: seven steps. */
const MANY = 12;

/** A leg as a fleet goes along it, at a held speed and a steady rate. */
export interface Passage {
  readonly leg: PreparedLeg;
  /** Cells of the field's tiles on the leg. */
  readonly cells: readonly PanelCells[];
  /** Through the medium, m/s, and what it takes, store units per second. */
  readonly speed: number;
  readonly rate: number;
  /** A panel with a faster node than this is not gone over, m/s. */
  readonly reach: number;
}

export interface FleetOptions {
  /** Takes the cross-track component as zero. */
  readonly alongOnly?: boolean;
  readonly taken?: Taken | null;
}

/**
 * A panel or half of one, m from the leg's start, with its pair of columns: that at `at` of `pairs`. All are written alike: objects of several
 * shapes cost the sweep a tenth.
 */
interface Stretch {
  readonly pairs: Float64Array;
  readonly at: number;
  readonly from: number;
  readonly to: number;
  /** Share of the way from slice to slice that passes in a second. */
  readonly perSecond: number;
}

/**
 * Departures of one craft that go along a leg panel by panel, side by side: what depends on the place and the valid time alone is
 * worked out once for all. Those between the same two valid times go abreast, by a smooth step each, or over the panel or its halves by their mean
 * ground speed where many are compared and it serves; those to whom a valid time falls due on the way, or for whom it is too rough, go in steps of
 * their own. None knows of the others, so that its figures are those of a lone one. One that meets anything but data, or a
 * speed out of reach, or a stretch too rough, sinks: it is left where it is.
 */
export class SmoothFleet {
  readonly log: SmoothLog;
  readonly #columns: SmoothColumns;
  readonly #mean: SmoothMean | null;
  readonly #rounds: SmoothRounds;
  readonly #lanes: Lanes;
  readonly #due: Int32Array;
  readonly #halves = new Float64Array(2 * PAIR);
  readonly #enough_s: number;
  #passage: Passage | null = null;
  #speed = 0;

  /**
   * @param departures ms since 1970
   * @param every_s step of the departures that are compared, s, whether or not they are in this fleet; `null` for none
   */
  constructor(
    field: Field,
    departures: ArrayLike<number>,
    every_s: number | null,
    { alongOnly = false, taken = null }: FleetOptions = {},
  ) {
    this.log = new SmoothLog(field, departures, taken);
    this.#columns = new SmoothColumns(field, alongOnly);
    this.#due = new Int32Array(departures.length);
    this.#mean = every_s === null ? null : new SmoothMean();
    this.#enough_s = MANY * (every_s ?? 0);
    this.#rounds = new SmoothRounds(this.log, this.#columns);
    this.#lanes = { ...makeLanes(departures.length), perSecond: this.log.clock.perSecond };
  }

  /** Sets out on a leg. */
  setOut(passage: Passage): void {
    this.#passage = passage;
    this.#speed = passage.speed;
    this.#columns.onLeg(passage.leg, passage.cells, passage.reach);
    this.log.beginLeg(passage.rate);
  }

  /** Goes over a panel of the leg; afterwards the log says who came through. */
  cross(panel: number): void {
    const { log } = this;
    const { s } = (this.#passage as Passage).leg.panels;
    const from = s[panel] as number;
    const to = s[panel + 1] as number;
    this.#columns.enter(panel);
    if (this.#columns.tile < 0) {
      log.state.fill(SUNK);
      return;
    }
    log.onTile(this.#columns.tile);
    this.#rounds.enter(from, to, this.#speed);
    for (let first = 0; first < log.count; ) {
      let last = first + 1;
      if (log.state[first] === ABREAST) {
        last = this.#lastAbreast(first);
        this.#goAbreast(from, to, first, last);
      }
      first = last;
    }
    this.#rounds.run();
  }

  /** Where those in a row end who are between the same two valid times as the first. */
  #lastAbreast(first: number): number {
    const { count, clock } = this.log;
    const { slice } = clock;
    let last = first + 1;
    while (last < count && slice[last] === slice[first]) last += 1;
    return last;
  }

  /** Goes over the panel with those who are between the same two valid times. */
  #goAbreast(from: number, to: number, first: number, last: number): void {
    const { log } = this;
    const columns = this.#columns;
    const slice = log.clock.slice[first] as number;
    const next = log.after(slice);
    const at = columns.pair(slice, next);
    if (at === NO_PAIR) {
      log.state.fill(SUNK, first, last);
      return;
    }
    const perSecond = log.clock.perSecond[first] as number;
    const whole = { pairs: columns.pairs, at, from, to, perSecond };
    const mean = slice !== next && perSecond * this.#enough_s <= 1 ? this.#mean : null;
    if (mean === null) this.#goByStep(whole, first, last);
    else if (this.#lay(mean, whole)) this.#goByMean(mean, whole, first, last);
    else if (!this.#layHalves(slice, next)) this.#goByStep(whole, first, last);
    else {
      const middle = (from + to) / 2;
      const pairs = this.#halves;
      this.#goOver(mean, { pairs, at: 0, from, to: middle, perSecond }, first, last);
      this.#setApart(slice, middle, to, first, last);
      this.#goOver(mean, { pairs, at: PAIR, from: middle, to, perSecond }, first, last);
    }
  }

  /** Lays the pairs of both halves of the panel; returns whether there are such. */
  #layHalves(slice: number, next: number): boolean {
    const columns = this.#columns;
    return (
      columns.part(slice, next, -1, 0.5, this.#halves, 0) &&
      columns.part(slice, next, 0, 0.5, this.#halves, PAIR)
    );
  }

  /** Has those go on in steps of their own who met a valid time at the panel's middle. */
  #setApart(slice: number, middle: number, to: number, first: number, last: number): void {
    const { state, clock } = this.log;
    for (let n = first; n < last; n += 1)
      if (state[n] === ABREAST && clock.slice[n] !== slice) this.#rounds.goOn(n, middle, to);
  }

  #goOver(mean: SmoothMean, stretch: Stretch, first: number, last: number): void {
    if (this.#lay(mean, stretch)) this.#goByMean(mean, stretch, first, last);
    else this.#goByStep(stretch, first, last);
  }

  #lay(mean: SmoothMean, { pairs, at, from, to, perSecond }: Stretch): boolean {
    return mean.lay(pairs, at, this.#speed, to - from, perSecond);
  }

  #goByMean(mean: SmoothMean, stretch: Stretch, first: number, last: number): void {
    const { log } = this;
    const { state, begun, legTime, legUse, rate, tells } = log;
    const { from, until } = log.clock;
    const { share, time } = this.#lanes;
    const { to, perSecond } = stretch;
    let due = 0;
    for (let n = first; n < last; n += 1) {
      if (state[n] !== ABREAST) continue;
      const before = legTime[n] as number;
      const now = (begun[n] as number) + before;
      const left = (until[n] as number) - now;
      const part = (now - (from[n] as number)) * perSecond;
      const took = mean.time(part);
      if (took <= left + PASSING_S) {
        // As the log books it, with its arrays at hand: nowhere does a sweep spend more time.
        if (tells) log.tell(n, to, took);
        const after = before + took;
        legTime[n] = after;
        legUse[n] = (legUse[n] as number) + rate * took;
        if ((begun[n] as number) + after >= (until[n] as number)) log.turn(n);
      } else {
        share[n] = part;
        time[n] = took;
        this.#due[due] = n;
        due += 1;
      }
    }
    if (due > 0) this.#cut(stretch, due);
  }

  /**
   * Has those go in steps of their own to whom a valid time falls due on a stretch. They stand in `due`; in their lanes, how long the stretch would
   * take them.
   */
  #cut({ pairs, at, from, to }: Stretch, count: number): void {
    const { log } = this;
    const lanes = this.#lanes;
    const due = this.#due;
    const first = due[0] as number;
    const last = (due[count - 1] as number) + 1;
    lanes.half.fill((to - from) / 2, first, last);
    guessSlowness(pairs, at, 0, this.#speed, lanes, first, last);
    for (let j = 0; j < count; j += 1) {
      const n = due[j] as number;
      this.#rounds.cut(n, from, to, guessDistance(lanes, n, log.left(n, log.now(n))));
    }
  }

  #goByStep({ pairs, at, from, to }: Stretch, first: number, last: number): void {
    const { log } = this;
    const lanes = this.#lanes;
    lanes.half.fill((to - from) / 2, first, last);
    for (let n = first; n < last; n += 1) lanes.share[n] = log.share(n, log.now(n));
    smoothTimes(pairs, at, 0, this.#speed, lanes, first, last);
    for (let n = first; n < last; n += 1) {
      if (log.state[n] !== ABREAST) continue;
      const time = lanes.time[n] as number;
      const left = log.left(n, log.now(n));
      if (time === NOT_SMOOTH) this.#rounds.halve(n, from, to);
      else if (time <= left + PASSING_S) log.book(n, to, time);
      else this.#rounds.cut(n, from, to, guessDistance(lanes, n, left));
    }
  }
}
