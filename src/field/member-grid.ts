import type { GridFile } from "./grid-file.ts";

/**
 * The grid of one member of an ensemble's file, as if the file held that member alone; a file without members is every
 * member's. Nothing is copied.
 *
 * @throws Error where the file has members and not this one
 * @example
 * const lon = Float64Array.of(-5, -4);
 * const lat = Float64Array.of(50);
 * const values = (u) => ({ slices: [Float64Array.of(u, 0, u, 0)], gusts: null, masks: [null] });
 * const members = [{ member: 0, ...values(1) }, { member: 7, ...values(2) }];
 * const grid = { file: "wind.csv", role: "wind", lon, lat, height: null, times: null, ...values(1), members, global: false, ignoredColumns: [], notes: [], bytes: 0 };
 * [...memberGrid(grid, 7).slices[0]] // → [2, 0, 2, 0]
 */
export function memberGrid(grid: GridFile, member: number): GridFile {
  const { members, ...alone } = grid;
  if (members === undefined) return grid;
  const found = members.find((each) => each.member === member);
  if (found === undefined) throw new Error(`${grid.file} has no member ${member}`);
  const { slices, gusts, masks } = found;
  return { ...alone, slices, gusts, masks };
}
