/** What a field is of: the air over the ground, or the water over the ground. */
export type FieldRole = "wind" | "current";

/** What becomes of a missing node: the nearest valid one within two steps, nothing moving, or the estimate stops. */
export type GapPolicy = "nearest" | "zero" | "stop";
/** What holds after the last valid time. */
export type BeyondPolicy = "stop" | "hold";
/** What holds outside the grid's area. */
export type OutsidePolicy = "stop" | "zero";

/** State of a node in a tile's mask. A missing node's stored value is 0 and must not be used. */
export const NODE_GIVEN = 0;
export const NODE_FILLED = 1;
export const NODE_MISSING = 2;

/**
 * One rectilinear block of a field: every valid time of files that share their axes.
 *
 * Node (i, j, k) of slice t is longitude i, latitude j, level k at time t, at index n = (k · lat.length + j) · lon.length + i:
 * its eastward component is `slices[t][2 n]`, its northward `slices[t][2 n + 1]`, both in m/s, the way the medium MOVES.
 * A global tile repeats its first meridian at the end, 360° on, so that no cell is a special case.
 */
export interface Tile {
  readonly files: readonly string[];
  /** Node longitudes, degrees, strictly ascending, at most one turn from first to last. */
  readonly lon: Float64Array;
  /** Node latitudes, degrees, strictly ascending. */
  readonly lat: Float64Array;
  /** Levels in m above the surface, strictly ascending; `null` where the file has none. */
  readonly height: Float64Array | null;
  /** Valid times in ms since 1970-01-01T00:00Z, strictly ascending; `null` for a steady field (then one slice). */
  readonly times: Float64Array | null;
  /** Per time, interleaved (u, v) in m/s. */
  readonly slices: readonly Float64Array[];
  /** Per time, wind gust speed in m/s, one per node, missing as NaN; `null` where the file has no gusts. */
  readonly gusts: readonly Float64Array[] | null;
  /** Per time, the state of each node; `null` where every node of that slice was given. */
  readonly masks: readonly (Uint8Array | null)[];
  /** Whether the longitudes close around the globe. */
  readonly global: boolean;
  readonly beyond: BeyondPolicy;
}

/** The files that a member of an ensemble is made of. */
export interface MemberFiles {
  readonly member: number;
  readonly files: readonly string[];
}

/** A file of which nothing is used, since earlier ones hold wherever and whenever it has data. */
export interface UnusedFile {
  readonly file: string;
  readonly by: readonly string[];
}

/** What became of the files that a plan names for a role. */
export interface FieldOrigin {
  /** Ascending; empty where the role has fewer than two members. */
  readonly members: readonly MemberFiles[];
  readonly unused: readonly UnusedFile[];
  /** Files that name no member beside others that do: they are every member's. */
  readonly shared: readonly string[];
}

/** All data of one role. Where tiles overlap, the earlier one holds. */
export interface Field {
  readonly role: FieldRole;
  readonly tiles: readonly Tile[];
  readonly outside: OutsidePolicy;
  /** Left out where the field was not made of a plan's files. */
  readonly origin?: FieldOrigin;
}
