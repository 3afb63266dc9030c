import type { SmoothColumns } from "./smooth-columns.ts";
import { ABREAST, APART, PASSING_S, type SmoothLog, SUNK } from "./smooth-log.ts";
import { PAIR } from "./smooth-pair.ts";
import {
  guessDistance,
  type Lanes,
  lateDistance,
  makeLanes,
  NOT_SMOOTH,
  smoothTimes,
} from "./smooth-step.ts";

/**
 * A cut is so near to its valid time, as a share of the step's time, that the last correction of its place goes unchecked: what it
 * leaves open is of the order of the share's cube.
 */
const MEETING = 1e-4;
/** Most times that a step is shortened. */
const MOST_TRIES = 16;

/**
 * Those who go over a panel in steps of their own, since a valid time falls inside it or it is too rough. Steps are cut where a valid time
 * is met, and halved where they are not smooth; in a round each takes one, side by side. Index j is that in the round.
 */
export class SmoothRounds {
  readonly #log: SmoothLog;
  readonly #columns: SmoothColumns;
  readonly #lanes: Lanes;
  /** A pair for each. */
  readonly #parts: Float64Array;
  readonly #who: Int32Array;
  /** Metres from the leg's start: where the next step begins and ends, and at most. */
  readonly #place: Float64Array;
  readonly #to: Float64Array;
  readonly #limit: Float64Array;
  /** How long the next step may be, m. */
  readonly #longest: Float64Array;
  readonly #tries: Int32Array;
  /** 1 where the step is being cut at a valid time. */
  readonly #cutting: Uint8Array;
  #count = 0;
  #start = 0;
  #end = 0;
  #speed = 0;

  constructor(log: SmoothLog, columns: SmoothColumns) {
    const { count } = log;
    const each = () => new Float64Array(count);
    this.#log = log;
    this.#columns = columns;
    this.#lanes = makeLanes(count);
    this.#parts = new Float64Array(count * PAIR);
    this.#who = new Int32Array(count);
    this.#place = each();
    this.#to = each();
    this.#limit = each();
    this.#longest = each();
    this.#tries = new Int32Array(count);
    this.#cutting = new Uint8Array(count);
  }

  /** Turns to the panel on which the columns stand, m from the leg's start, at a speed through the medium, m/s. */
  enter(start: number, end: number, speed: number): void {
    this.#start = start;
    this.#end = end;
    this.#speed = speed;
  }

  /** Takes in one whose step meets a valid time so far from its start, nearly. */
  cut(n: number, from: number, to: number, distance: number): void {
    const j = this.#take(n, from, to);
    if (this.#cut(j, n, distance)) this.#count += 1;
  }

  /** Takes in one whose step is too rough. */
  halve(n: number, from: number, to: number): void {
    const j = this.#take(n, from, to);
    if (this.#halve(j, n)) this.#count += 1;
  }

  /** Takes in one who goes on with a step from here. */
  goOn(n: number, from: number, to: number): void {
    this.#take(n, from, to);
    this.#count += 1;
  }

  /** Goes on until all are at the panel's end, or sank. */
  run(): void {
    while (this.#count > 0) {
      const laid = this.#lay();
      smoothTimes(this.#parts, 0, PAIR, this.#speed, this.#lanes, 0, laid);
      let left = 0;
      for (let j = 0; j < laid; j += 1) {
        if (!this.#judge(j)) continue;
        if (j !== left) this.#move(j, left);
        left += 1;
      }
      this.#count = left;
    }
  }

  #take(n: number, from: number, to: number): number {
    const j = this.#count;
    this.#log.state[n] = APART;
    this.#who[j] = n;
    this.#longest[j] = to - from;
    this.#aim(j, from);
    return j;
  }

  /** Lays the lanes of a round; returns how many there are. */
  #lay(): number {
    const log = this.#log;
    const { slice, perSecond } = log.clock;
    const lanes = this.#lanes;
    const perMetre = 2 / (this.#end - this.#start);
    let laid = 0;
    for (let j = 0; j < this.#count; j += 1) {
      const n = this.#who[j] as number;
      const first = slice[n] as number;
      const place = this.#place[j] as number;
      const from = (place - this.#start) * perMetre - 1;
      const half = ((this.#to[j] as number) - place) / 2;
      if (!this.#columns.part(first, log.after(first), from, half * perMetre, this.#parts, laid * PAIR)) {
        this.#sink(n);
        continue;
      }
      if (j !== laid) this.#move(j, laid);
      lanes.half[laid] = half;
      lanes.share[laid] = log.share(n, log.now(n));
      lanes.perSecond[laid] = perSecond[n] as number;
      laid += 1;
    }
    return laid;
  }

  /** Judges the step that one has just tried; returns whether another is to come. */
  #judge(j: number): boolean {
    const log = this.#log;
    const lanes = this.#lanes;
    const n = this.#who[j] as number;
    const time = lanes.time[j] as number;
    if (time === NOT_SMOOTH) return this.#halve(j, n);
    const wanted = log.left(n, log.now(n));
    if (this.#cutting[j] === 1) return this.#judgeCut(j, n, time, wanted);
    if (time > wanted + PASSING_S) return this.#cut(j, n, guessDistance(lanes, j, wanted));
    const to = this.#to[j] as number;
    // What was too rough is likely so further on.
    this.#longest[j] = 2 * (to - (this.#place[j] as number));
    log.book(n, to, time);
    return this.#proceed(j, n, to);
  }

  #judgeCut(j: number, n: number, time: number, wanted: number): boolean {
    const late = time - wanted;
    const at = (this.#to[j] as number) - lateDistance(this.#lanes, j, late);
    if (Math.abs(late) > Math.max(MEETING * time, PASSING_S)) return this.#aimCut(j, n, at);
    const to =
      at > (this.#place[j] as number) ? Math.min(at, this.#limit[j] as number) : (this.#to[j] as number);
    // Beyond a valid time it need not be rough.
    this.#longest[j] = this.#end;
    this.#log.bookToTime(n, to, wanted);
    return this.#proceed(j, n, to);
  }

  #cut(j: number, n: number, distance: number): boolean {
    const log = this.#log;
    const place = this.#place[j] as number;
    if (log.left(n, log.now(n)) <= PASSING_S) {
      log.meet(n);
      return this.#proceed(j, n, place);
    }
    this.#cutting[j] = 1;
    this.#limit[j] = this.#to[j] as number;
    return this.#aimCut(j, n, place + distance);
  }

  /** Aims at the place where a valid time is met. */
  #aimCut(j: number, n: number, at: number): boolean {
    this.#to[j] = Math.min(at, this.#limit[j] as number);
    return at > (this.#place[j] as number) ? this.#tryAgain(j, n) : this.#sink(n);
  }

  #halve(j: number, n: number): boolean {
    const place = this.#place[j] as number;
    this.#cutting[j] = 0;
    this.#longest[j] = ((this.#to[j] as number) - place) / 2;
    this.#to[j] = place + (this.#longest[j] as number);
    return this.#tryAgain(j, n);
  }

  #tryAgain(j: number, n: number): boolean {
    this.#tries[j] = (this.#tries[j] as number) + 1;
    return (this.#tries[j] as number) <= MOST_TRIES || this.#sink(n);
  }

  #sink(n: number): false {
    this.#log.state[n] = SUNK;
    return false;
  }

  /** Makes ready for the next step from where one is come to; returns whether there is one. */
  #proceed(j: number, n: number, place: number): boolean {
    const { state } = this.#log;
    if (state[n] === SUNK) return false;
    if (place < this.#end) {
      this.#aim(j, place);
      return true;
    }
    state[n] = ABREAST;
    return false;
  }

  /** Aims a step as far as is likely to be smooth. */
  #aim(j: number, place: number): void {
    this.#place[j] = place;
    this.#to[j] = Math.min(place + (this.#longest[j] as number), this.#end);
    this.#tries[j] = 0;
    this.#cutting[j] = 0;
  }

  /** Moves what is known of one from index `from` to index `at`. */
  #move(from: number, at: number): void {
    this.#who[at] = this.#who[from] as number;
    this.#place[at] = this.#place[from] as number;
    this.#to[at] = this.#to[from] as number;
    this.#limit[at] = this.#limit[from] as number;
    this.#longest[at] = this.#longest[from] as number;
    this.#tries[at] = this.#tries[from] as number;
    this.#cutting[at] = this.#cutting[from] as number;
  }
}
