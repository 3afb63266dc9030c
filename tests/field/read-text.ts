import { type GridFileOptions, readGridFile } from "../../src/field/csv.ts";
import type { GridFile } from "../../src/field/grid-file.ts";

/** A file of given bytes that can be opened again, in pieces of a given size. */
export function opened(bytes: Uint8Array, pieceBytes = bytes.length): () => AsyncIterable<Uint8Array> {
  return async function* () {
    for (let at = 0; at < bytes.length; at += pieceBytes) yield bytes.subarray(at, at + pieceBytes);
  };
}

/** Reads a text as the file `winds.csv` of the role wind, unless told otherwise. */
export function readText(
  text: string | Uint8Array,
  options: Partial<GridFileOptions> & { readonly pieceBytes?: number } = {},
): Promise<GridFile> {
  const { pieceBytes, ...rest } = options;
  const bytes = typeof text === "string" ? new TextEncoder().encode(text) : text;
  return readGridFile(opened(bytes, pieceBytes), { file: "winds.csv", role: "wind", ...rest });
}

/** The message with which reading a text fails; fails itself where it does not, or where the error is no user error. */
export async function messageOf(
  text: string | Uint8Array,
  options: Parameters<typeof readText>[1] = {},
): Promise<string> {
  const outcome = await readText(text, options).then(
    () => "read without an error",
    (error: unknown) => error,
  );
  if (outcome instanceof Error && outcome.name === "InputError") return outcome.message;
  throw outcome instanceof Error ? outcome : new Error(String(outcome));
}

/** What of a grid its rows decide: axes and nodes, without the file's size. */
export function nodesOf(grid: GridFile) {
  const { lon, lat, height, times, slices, gusts, masks, global } = grid;
  return { lon, lat, height, times, slices, gusts, masks, global };
}
