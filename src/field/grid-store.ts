import { GridSlice, nodesIn, type Room } from "./grid-slice.ts";
import { WaitingRows } from "./waiting-rows.ts";

/** Fewer nodes given than one in so many: not a grid. */
export const LEAST_SHARE = 20;
/** Nodes that are given room whatever the rows so far, 16 MB of vectors. */
const FREE_NODES = 1 << 20;
/** Waiting rows are placed when they are one in so many. */
const SETTLE_SHARE = 16;
/** Room grows by this factor while an axis is being learned; 1.5 needs half the grid more memory and reads no faster. */
const GROWTH = 1.25;

/** A node by the order of first appearance along each axis. */
export interface NodeIndices {
  readonly time: number;
  readonly level: number;
  readonly lat: number;
  readonly lon: number;
}

/**
 * Gathers a file's nodes, in the order of first appearance along each axis, straight into a slice per time.
 *
 * Room never exceeds twenty times the rows read (as many as a grid may lack): rows beyond it, as scattered places or a
 * shuffled file bring them, wait until the rows catch up, so that a file that is no grid cannot fill the memory.
 */
export class GridStore {
  readonly slices: GridSlice[] = [];
  /** The node that has been given twice, if any. */
  repeated: NodeIndices | null = null;
  room: Room = { lon: 0, lat: 0, level: 0 };
  private used: Room = { lon: 0, lat: 0, level: 0 };
  private times = 0;
  /** Slices that stand. */
  private held = 0;
  /** Rows so far. */
  rows = 0;
  private readonly withGusts: boolean;
  private readonly closes: () => boolean;
  private readonly waiting = new WaitingRows();

  /** @param closes whether the longitudes so far close around the globe, so that the first will be repeated at the end */
  constructor(withGusts: boolean, closes: () => boolean) {
    this.withGusts = withGusts;
    this.closes = closes;
  }

  /** Rows, against the nodes that the axes span so far. */
  get share(): number {
    return this.rows / (this.times * nodesIn(this.used));
  }

  /** Puts a row's node, its indices by first appearance; `false` where the node has been given before. */
  put(time: number, level: number, lat: number, lon: number, u: number, v: number, gust: number): boolean {
    this.rows++;
    const { room } = this;
    const slice = this.slices[time];
    if (slice !== undefined && lon < room.lon && lat < room.lat && level < room.level) {
      if (lon >= this.used.lon || lat >= this.used.lat || level >= this.used.level) this.use(level, lat, lon);
      return this.place(time, level, lat, lon, u, v, gust);
    }
    this.times = Math.max(this.times, time + 1);
    this.use(level, lat, lon);
    if (this.makeRoom(time)) return this.place(time, level, lat, lon, u, v, gust);
    this.waiting.add(time, level, lat, lon, u, v, gust);
    return !this.isWorthSettling() || this.settle();
  }

  /** Gives every waiting row its place, once all axes are known; `false` where a node has been given before. */
  settle(): boolean {
    if (this.waiting.length === 0) return true;
    this.resize(this.used);
    return this.waiting.release((time, level, lat, lon, u, v, gust) => {
      this.openSlice(time);
      return this.place(time, level, lat, lon, u, v, gust);
    });
  }

  private openSlice(time: number): void {
    if (this.slices[time] !== undefined) return;
    this.slices[time] = new GridSlice(this.room, this.withGusts);
    this.held++;
  }

  private use(level: number, lat: number, lon: number): void {
    const { used } = this;
    this.used = {
      lon: Math.max(used.lon, lon + 1),
      lat: Math.max(used.lat, lat + 1),
      level: Math.max(used.level, level + 1),
    };
  }

  private place(
    time: number,
    level: number,
    lat: number,
    lon: number,
    u: number,
    v: number,
    gust: number,
  ): boolean {
    const { room } = this;
    const node = (level * room.lat + lat) * room.lon + lon;
    const isFirst = (this.slices[time] as GridSlice).put(node, u, v, gust);
    if (!isFirst) this.repeated = { time, level, lat, lon };
    return isFirst;
  }

  /** Whether the indices in use and a slice for the time now have room. */
  private makeRoom(time: number): boolean {
    const isNew = this.slices[time] === undefined;
    // With a second time the first has usually shown the whole of the other axes.
    if (isNew && this.held === 1) {
      const exact = { ...this.used, lon: this.used.lon + (this.closes() ? 1 : 0) };
      if (this.fits(exact, 2)) this.resize(exact);
    }
    const count = this.held + (isNew ? 1 : 0);
    const room = this.grownRoom();
    if (!this.fits(room, count)) return false;
    this.resize(room);
    this.openSlice(time);
    return true;
  }

  private grownRoom(): Room {
    const { used, room } = this;
    const grown = (need: number, have: number) =>
      need <= have ? have : Math.ceil(Math.max(need, GROWTH * have));
    return {
      lon: grown(used.lon, room.lon),
      lat: grown(used.lat, room.lat),
      level: grown(used.level, room.level),
    };
  }

  private fits(room: Room, slices: number): boolean {
    return nodesIn(room) * slices <= Math.max(FREE_NODES, LEAST_SHARE * this.rows);
  }

  /** Whether all rows have room now, and enough wait for it to be worth moving the others. */
  private isWorthSettling(): boolean {
    return (
      SETTLE_SHARE * this.waiting.length >= this.rows &&
      this.times * nodesIn(this.used) <= LEAST_SHARE * this.rows
    );
  }

  private resize(wanted: Room): void {
    const { room, used } = this;
    if (wanted.lon === room.lon && wanted.lat === room.lat && wanted.level === room.level) return;
    const kept = {
      lon: Math.min(used.lon, room.lon, wanted.lon),
      lat: Math.min(used.lat, room.lat, wanted.lat),
      level: Math.min(used.level, room.level, wanted.level),
    };
    for (const slice of this.slices) slice?.moveInto(wanted, room, kept);
    this.room = wanted;
  }
}
