/** Room for nodes along longitude, latitude and level. */
export interface Room {
  readonly lon: number;
  readonly lat: number;
  readonly level: number;
}

/**
 * The nodes of one valid time while a file is read, in the order of first appearance along each axis: node (i, j, k) stands
 * at n = (k · room.lat + j) · room.lon + i.
 */
export class GridSlice {
  /** Interleaved (u, v), m/s; NaN where a row had none. */
  values: Float64Array;
  /** m/s, NaN where a row had none. */
  gusts: Float64Array | null;
  /** A bit per node: whether a row gave it. */
  seen: Uint8Array;
  /** Rows so far, and those of them without a vector. */
  rows = 0;
  missing = 0;

  constructor(room: Room, withGusts: boolean) {
    const nodes = nodesIn(room);
    this.values = new Float64Array(2 * nodes);
    this.gusts = withGusts ? new Float64Array(nodes) : null;
    this.seen = new Uint8Array((nodes + 7) >> 3);
  }

  /** Puts a node's vector (NaN in both where it has none) and gust; `false` where the node has been given before. */
  put(node: number, u: number, v: number, gust: number): boolean {
    const bit = 1 << (node & 7);
    const byte = this.seen[node >> 3] as number;
    if ((byte & bit) !== 0) return false;
    this.seen[node >> 3] = byte | bit;
    this.values[2 * node] = u;
    this.values[2 * node + 1] = v;
    if (this.gusts !== null) this.gusts[node] = gust;
    this.rows++;
    if (Number.isNaN(u)) this.missing++;
    return true;
  }

  has(node: number): boolean {
    return ((this.seen[node >> 3] as number) & (1 << (node & 7))) !== 0;
  }

  /** Moves the nodes into other room, of which `used` is taken in both. */
  moveInto(room: Room, from: Room, used: Room): void {
    const { values, gusts, seen } = this;
    const moved = new GridSlice(room, gusts !== null);
    for (let row = 0; row < used.level * used.lat; row++) {
      const level = Math.floor(row / used.lat);
      const lat = row - level * used.lat;
      const source = (level * from.lat + lat) * from.lon;
      const target = (level * room.lat + lat) * room.lon;
      moved.values.set(values.subarray(2 * source, 2 * (source + used.lon)), 2 * target);
      moved.gusts?.set((gusts as Float64Array).subarray(source, source + used.lon), target);
      for (let i = 0; i < used.lon; i++) {
        const node = source + i;
        if (((seen[node >> 3] as number) & (1 << (node & 7))) !== 0) {
          const at = target + i;
          moved.seen[at >> 3] = (moved.seen[at >> 3] as number) | (1 << (at & 7));
        }
      }
    }
    this.values = moved.values;
    this.gusts = moved.gusts;
    this.seen = moved.seen;
  }
}

export function nodesIn(room: Room): number {
  return room.lon * room.lat * room.level;
}
