import type { FieldRole } from "./field.ts";

/** One member of an ensemble: its own values on the axes of its file. */
export interface GridMember {
  readonly member: number;
  readonly slices: readonly Float64Array[];
  readonly gusts: readonly Float64Array[] | null;
  readonly masks: readonly (Uint8Array | null)[];
}

/**
 * One file's grid, as read: nodes as in `Tile`, missing ones at 0 and told by the masks.
 * Slices with the same missing nodes share a mask.
 */
export interface GridFile {
  readonly file: string;
  readonly role: FieldRole;
  readonly lon: Float64Array;
  readonly lat: Float64Array;
  readonly height: Float64Array | null;
  readonly times: Float64Array | null;
  readonly slices: readonly Float64Array[];
  readonly gusts: readonly Float64Array[] | null;
  readonly masks: readonly (Uint8Array | null)[];
  /**
   * The members, ascending, of a file that has them; the slices, gusts and masks above are those of the first, the control.
   * Left out where the file has no column of members.
   */
  readonly members?: readonly GridMember[];
  readonly global: boolean;
  /** Headers of columns that were not used, as written. */
  readonly ignoredColumns: readonly string[];
  /** Lines that begin with `#` before the header, without it. */
  readonly notes: readonly string[];
  /** Size of the file, bytes. */
  readonly bytes: number;
}
