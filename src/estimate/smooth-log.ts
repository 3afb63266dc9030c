import type { Field, Tile } from "../field/field.ts";
import { makeSliceClock, type SliceClock, turnClock } from "./slice-clock.ts";

/** A valid time was passed when it is further behind than this, and met where it is no further ahead, s. */
export const PASSING_S = 1e-9;

/** What a departure is at: it sank, goes abreast with others, or goes over the panel in steps of its own. */
export const SUNK = 0;
export const ABREAST = 1;
export const APART = 2;

/** Told of every step taken: by which departure, to which place, how long it took, and since which valid time its slices hold. */
export type Taken = (n: number, to: number, time: number, since: number) => void;

/** Where departures of a fleet stand in time, and what they have used: index n is the departure's. */
export class SmoothLog {
  readonly count: number;
  /** ms since 1970. */
  readonly departure: Float64Array;
  readonly state: Uint8Array;
  /** Seconds since departure at the leg's start; on the leg; store units on the leg. */
  readonly begun: Float64Array;
  readonly legTime: Float64Array;
  readonly legUse: Float64Array;
  /** The last valid time met, s since departure: the clock may be a little short of it. */
  readonly met: Float64Array;
  /** Between which valid times each is. */
  readonly clock: SliceClock;
  /** Store units per second on the leg. */
  rate = 0;
  readonly #field: Field;
  /** Whether somebody is told of the steps. */
  readonly tells: boolean;
  readonly #taken: Taken | null;
  #tile = -1;
  #times: Float64Array | null = null;
  #wound = false;

  /** @param departures ms since 1970 */
  constructor(field: Field, departures: ArrayLike<number>, taken: Taken | null) {
    const count = departures.length;
    const each = () => new Float64Array(count);
    this.count = count;
    this.departure = Float64Array.from(departures);
    this.state = new Uint8Array(count).fill(ABREAST);
    this.begun = each();
    this.legTime = each();
    this.legUse = each();
    this.met = each();
    this.clock = makeSliceClock(count);
    this.#field = field;
    this.tells = taken !== null;
    this.#taken = taken;
  }

  /** Begins a leg on which so much is used, store units per second. */
  beginLeg(rate: number): void {
    this.rate = rate;
    this.legTime.fill(0);
    this.legUse.fill(0);
    this.#wound = false;
  }

  /** Sets where one stands. */
  put(n: number, begun: number, legTime: number, met: number): void {
    this.state[n] = ABREAST;
    this.begun[n] = begun;
    this.legTime[n] = legTime;
    this.met[n] = met;
    this.#wound = false;
  }

  /** Turns to a tile and its valid times, and all clocks with it. */
  onTile(tile: number): void {
    if (tile !== this.#tile) {
      this.#tile = tile;
      this.#times = (this.#field.tiles[tile] as Tile).times;
      this.clock.slice.fill(0);
      this.clock.until.fill(Number.NEGATIVE_INFINITY);
      this.#wound = false;
    }
    if (this.#wound) return;
    this.#wound = true;
    for (let n = 0; n < this.count; n += 1) if (this.state[n] !== SUNK) this.turn(n);
  }

  /** The slice that holds after this one; the same for a steady tile. */
  after(slice: number): number {
    return this.#times === null ? slice : slice + 1;
  }

  /** s since departure. */
  now(n: number): number {
    return (this.begun[n] as number) + (this.legTime[n] as number);
  }

  /** Share of the way from slice to slice at a moment, 0..1. */
  share(n: number, now: number): number {
    return (now - (this.clock.from[n] as number)) * (this.clock.perSecond[n] as number);
  }

  /** Seconds from a moment to the next valid time. */
  left(n: number, now: number): number {
    return (this.clock.until[n] as number) - now;
  }

  /** Tells of a step, before it is booked. */
  tell(n: number, to: number, time: number): void {
    this.#taken?.(n, to, time, this.clock.from[n] as number);
  }

  /** Books a step. */
  book(n: number, to: number, time: number): void {
    this.#add(n, to, time);
    if (this.now(n) >= (this.clock.until[n] as number)) this.turn(n);
  }

  /** Books a step at whose end the next valid time is met. */
  bookToTime(n: number, to: number, time: number): void {
    this.#add(n, to, time);
    this.meet(n);
  }

  /** Has the next valid time met. */
  meet(n: number): void {
    this.met[n] = this.clock.until[n] as number;
    this.turn(n);
  }

  /** Turns the clock where it is time to; one for which no slices hold any more sinks. */
  turn(n: number): void {
    const moment = Math.max(this.now(n), this.met[n] as number);
    if (
      moment >= (this.clock.until[n] as number) &&
      !turnClock(this.clock, n, this.#times, this.departure[n] as number, moment)
    )
      this.state[n] = SUNK;
  }

  #add(n: number, to: number, time: number): void {
    if (this.tells) this.tell(n, to, time);
    this.legTime[n] = (this.legTime[n] as number) + time;
    this.legUse[n] = (this.legUse[n] as number) + this.rate * time;
  }
}
