import { InputError } from "../errors.ts";

/** Largest plan or craft file, bytes; one of 2,000 waypoints has about 200,000. */
const LARGEST = 64 * 1024 * 1024;

/**
 * Reads a whole file as UTF-8 text.
 *
 * Errors: bytes that are not UTF-8, a file above 64 MiB, and those of opening it.
 */
export async function readText(pieces: AsyncIterable<Uint8Array>, file: string): Promise<string> {
  const all: Uint8Array[] = [];
  let length = 0;
  for await (const piece of pieces) {
    all.push(piece);
    length += piece.length;
    if (length > LARGEST) throw new InputError("the file is at most 64 MiB; found a larger one", { file });
  }
  const bytes = new Uint8Array(length);
  let at = 0;
  for (const piece of all) {
    bytes.set(piece, at);
    at += piece.length;
  }
  try {
    return new TextDecoder("utf-8", { fatal: true }).decode(bytes);
  } catch {
    throw new InputError("the text is UTF-8; found bytes that are not", { file });
  }
}
