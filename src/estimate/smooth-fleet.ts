import type { Field, Tile } from "../field/field.ts";
import type { PanelCells } from "./panels.ts";
import type { PreparedLeg } from "./prepare.ts";
import { makeSliceClock, type SliceClock, turnClock } from "./slice-clock.ts";
import { NO_PAIR, SmoothColumns } from "./smooth-columns.ts";
import { PAIR } from "./smooth-pair.ts";
import { makeRounds, move, type Rounds } from "./smooth-rounds.ts";
import { guessDistance, type Lanes, makeLanes, NOT_SMOOTH, smoothTimes } from "./smooth-step.ts";

/** A valid time was passed when it is further behind than this, and met where it is no further ahead, s. */
const PASSING_S = 1e-9;
/**
 * A cut is so near to its valid time, as a share of the step's time, that the last correction of its place goes unchecked: what it
 * leaves open is of the order of the share's square.
 */
const MEETING = 1e-5;
const MOST_HALVINGS = 10;
const MOST_CUTS = 8;
/** Share of the speed held beyond which no medium is smooth: near it the ground speed ends. */
const REACH = 0.9;

/** The fastest medium over which a craft at this speed steps smoothly, m/s. */
export function reachOf(speed: number): number {
  return REACH * speed;
}

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

/** Told of every step taken: by which departure, to which place, how long it took, and since which valid time its slices hold. */
export type Taken = (n: number, to: number, time: number, since: number) => void;

/**
 * Departures of one craft that go along a leg panel by panel, side by side: what depends on the place and the valid time alone is
 * read once for all. Over a panel each goes in one smooth step, or in several where a valid time falls inside it or it is too rough;
 * none knows of the others, so that its figures are those of a lone one. One that meets anything but data, or a
 * speed out of reach, or a stretch too rough, sinks: it is left where it is.
 */
export class SmoothFleet {
  readonly count: number;
  /** ms since 1970. */
  readonly departure: Float64Array;
  /** 0 for one that sank. */
  readonly afloat: Uint8Array;
  /** Seconds since departure at the leg's start; on the leg; store units on the leg. */
  readonly begun: Float64Array;
  readonly legTime: Float64Array;
  readonly legUse: Float64Array;
  /** The last valid time met, s since departure: the clock may be a little short of it. */
  readonly met: Float64Array;
  readonly #field: Field;
  readonly #columns: SmoothColumns;
  readonly #clock: SliceClock;
  readonly #lanes: Lanes;
  readonly #rounds: Rounds;
  readonly #taken: Taken | null;
  #passage: Passage | null = null;
  #tile = -1;
  #times: Float64Array | null = null;
  #start = 0;
  #end = 0;

  /**
   * @param departures ms since 1970
   * @param alongOnly take the cross-track component as zero
   */
  constructor(field: Field, departures: ArrayLike<number>, alongOnly: boolean, taken: Taken | null = null) {
    const count = departures.length;
    const each = () => new Float64Array(count);
    this.count = count;
    this.departure = Float64Array.from(departures);
    this.afloat = new Uint8Array(count).fill(1);
    this.begun = each();
    this.legTime = each();
    this.legUse = each();
    this.met = each();
    this.#field = field;
    this.#columns = new SmoothColumns(field, alongOnly);
    this.#clock = makeSliceClock(count);
    this.#lanes = { ...makeLanes(count), perSecond: this.#clock.perSecond };
    this.#rounds = makeRounds(count);
    this.#taken = taken;
  }

  /** Sets out on a leg. */
  setOut(passage: Passage): void {
    this.#passage = passage;
    this.#columns.onLeg(passage.leg, passage.cells, passage.reach);
    this.legTime.fill(0);
    this.legUse.fill(0);
  }

  /** Goes over a panel of the leg; afterwards `afloat` says who came through. */
  cross(panel: number): void {
    const { leg } = this.#passage as Passage;
    this.#start = leg.panels.s[panel] as number;
    this.#end = leg.panels.s[panel + 1] as number;
    this.#columns.enter(panel);
    this.#onTile(this.#columns.tile);
    if (this.#tile < 0) this.afloat.fill(0);
    else {
      this.#ready();
      this.#step();
      this.#settle();
    }
  }

  /** A panel in another tile has other valid times. */
  #onTile(tile: number): void {
    if (tile === this.#tile) return;
    this.#tile = tile;
    this.#times = (this.#field.tiles[tile] as Tile | undefined)?.times ?? null;
    this.#clock.slice.fill(0);
    this.#clock.until.fill(Number.NEGATIVE_INFINITY);
  }

  /** Sets the lanes for one step over the panel. */
  #ready(): void {
    const { afloat, begun, legTime, met, count } = this;
    const { until } = this.#clock;
    this.#lanes.half.fill((this.#end - this.#start) / 2);
    for (let n = 0; n < count; n += 1) {
      const now = (begun[n] as number) + (legTime[n] as number);
      const moment = Math.max(now, met[n] as number);
      if (moment >= (until[n] as number) && afloat[n] === 1 && !this.#turn(n, moment)) afloat[n] = 0;
      this.#lanes.share[n] = this.#share(n, now);
    }
  }

  #turn(n: number, moment: number): boolean {
    return turnClock(this.#clock, n, this.#times, this.departure[n] as number, moment);
  }

  #share(n: number, now: number): number {
    return (now - (this.#clock.from[n] as number)) * (this.#clock.perSecond[n] as number);
  }

  /** Takes the step over the panel, for all that are between the same two slices at once. */
  #step(): void {
    const { slice } = this.#clock;
    const { speed } = this.#passage as Passage;
    for (let first = 0; first < this.count; ) {
      if (this.afloat[first] === 0) {
        first += 1;
        continue;
      }
      const at = slice[first] as number;
      let last = first + 1;
      while (last < this.count && slice[last] === at) last += 1;
      const pair = this.#columns.pair(at, this.#next(at));
      if (pair === NO_PAIR) this.afloat.fill(0, first, last);
      else smoothTimes(this.#columns.pairs, pair, 0, speed, this.#lanes, first, last);
      first = last;
    }
  }

  #next(slice: number): number {
    return this.#times === null ? slice : slice + 1;
  }

  /** Books the steps over the panel; those that have to go over it in several go in rounds. */
  #settle(): void {
    const { afloat, begun, legTime, legUse, count } = this;
    const { time } = this.#lanes;
    const { until } = this.#clock;
    const { rate } = this.#passage as Passage;
    let several = 0;
    for (let n = 0; n < count; n += 1) {
      if (afloat[n] === 0) continue;
      const took = time[n] as number;
      const before = legTime[n] as number;
      if (took !== NOT_SMOOTH && (begun[n] as number) + before + took <= (until[n] as number) + PASSING_S) {
        this.#tell(n);
        legTime[n] = before + took;
        legUse[n] = (legUse[n] as number) + rate * took;
      } else if (this.#takeApart(several, n)) several += 1;
    }
    while (several > 0) several = this.#round(several);
  }

  /** Tells of a step over the whole panel, where somebody listens. */
  #tell(n: number): void {
    if (this.#taken !== null)
      this.#taken(n, this.#end, this.#lanes.time[n] as number, this.#clock.from[n] as number);
  }

  /** Sees to one that cannot take the panel in one step; returns whether it is to go over it in several. */
  #takeApart(j: number, n: number): boolean {
    const rounds = this.#rounds;
    rounds.who[j] = n;
    rounds.longest[j] = this.#end - this.#start;
    this.#aim(j, this.#start);
    return this.#judge(j, this.#lanes, n);
  }

  #book(n: number, to: number, time: number): void {
    this.#taken?.(n, to, time, this.#clock.from[n] as number);
    this.legTime[n] = (this.legTime[n] as number) + time;
    this.legUse[n] = (this.legUse[n] as number) + (this.#passage as Passage).rate * time;
  }

  /** One step of those that go over the panel in several; returns how many still do. */
  #round(several: number): number {
    const { who, place, to, lanes, parts } = this.#rounds;
    const perMetre = 2 / (this.#end - this.#start);
    let laid = 0;
    for (let j = 0; j < several; j += 1) {
      const n = who[j] as number;
      const slice = this.#clock.slice[n] as number;
      const from = ((place[j] as number) - this.#start) * perMetre - 1;
      const half = ((to[j] as number) - (place[j] as number)) / 2;
      if (!this.#columns.part(slice, this.#next(slice), from, half * perMetre, parts, laid * PAIR)) {
        this.afloat[n] = 0;
        continue;
      }
      if (j !== laid) move(this.#rounds, j, laid);
      lanes.half[laid] = half;
      lanes.share[laid] = this.#share(n, this.#now(n));
      lanes.perSecond[laid] = this.#clock.perSecond[n] as number;
      laid += 1;
    }
    smoothTimes(parts, 0, PAIR, (this.#passage as Passage).speed, lanes, 0, laid);
    let left = 0;
    for (let j = 0; j < laid; j += 1) {
      if (!this.#judge(j, lanes, j)) continue;
      if (j !== left) move(this.#rounds, j, left);
      left += 1;
    }
    return left;
  }

  #now(n: number): number {
    return (this.begun[n] as number) + (this.legTime[n] as number);
  }

  /** Judges the step that one has just tried in a lane; returns whether another is to come. */
  #judge(j: number, lanes: Lanes, lane: number): boolean {
    const { who, place, to, longest, limit, tries, cutting } = this.#rounds;
    const n = who[j] as number;
    const time = lanes.time[lane] as number;
    const until = this.#clock.until[n] as number;
    const wanted = until - this.#now(n);
    if (cutting[j] === 0) {
      if (time === NOT_SMOOTH) {
        longest[j] = ((to[j] as number) - (place[j] as number)) / 2;
        to[j] = (place[j] as number) + (longest[j] as number);
        return this.#again(j, n, MOST_HALVINGS);
      }
      if (time <= wanted + PASSING_S) return this.#accept(j, n, time);
      if (wanted <= PASSING_S) return this.#meet(j, n);
      cutting[j] = 1;
      tries[j] = 0;
      limit[j] = to[j] as number;
      return this.#aimAtTime(j, n, (place[j] as number) + guessDistance(lanes, lane, wanted));
    }
    if (time === NOT_SMOOTH) return this.#sink(n);
    const late = time - wanted;
    const at = (to[j] as number) - late / (lanes.end[lane] as number);
    if (Math.abs(late) > Math.max(MEETING * time, PASSING_S))
      return this.#again(j, n, MOST_CUTS) && this.#aimAtTime(j, n, at);
    if (at > (place[j] as number)) to[j] = Math.min(at, limit[j] as number);
    this.met[n] = until;
    return this.#accept(j, n, wanted);
  }

  #again(j: number, n: number, most: number): boolean {
    const { tries } = this.#rounds;
    tries[j] = (tries[j] as number) + 1;
    return (tries[j] as number) <= most || this.#sink(n);
  }

  #sink(n: number): false {
    this.afloat[n] = 0;
    return false;
  }

  /** Meets a valid time on the spot. */
  #meet(j: number, n: number): boolean {
    this.met[n] = this.#clock.until[n] as number;
    return this.#goOn(j, n);
  }

  /** Aims at the place where a valid time is met. */
  #aimAtTime(j: number, n: number, at: number): boolean {
    const { place, to, limit } = this.#rounds;
    if (!(at > (place[j] as number))) return this.#sink(n);
    to[j] = Math.min(at, limit[j] as number);
    return true;
  }

  #accept(j: number, n: number, time: number): boolean {
    const { place, to, longest, cutting } = this.#rounds;
    this.#book(n, to[j] as number, time);
    // What was too rough is likely so further on; beyond a valid time it need not be.
    longest[j] = cutting[j] === 1 ? this.#end : 2 * ((to[j] as number) - (place[j] as number));
    place[j] = to[j] as number;
    return (place[j] as number) < this.#end && this.#goOn(j, n);
  }

  /** Makes ready for the next step from where one is. */
  #goOn(j: number, n: number): boolean {
    this.#aim(j, this.#rounds.place[j] as number);
    const moment = Math.max(this.#now(n), this.met[n] as number);
    return moment < (this.#clock.until[n] as number) || this.#turn(n, moment) || this.#sink(n);
  }

  /** Aims a step as far as is likely to be smooth. */
  #aim(j: number, place: number): void {
    const rounds = this.#rounds;
    rounds.place[j] = place;
    rounds.to[j] = Math.min(place + (rounds.longest[j] as number), this.#end);
    rounds.tries[j] = 0;
    rounds.cutting[j] = 0;
  }
}
