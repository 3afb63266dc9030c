import { createReadStream } from "node:fs";
import { readFile } from "node:fs/promises";
import { dirname, resolve } from "node:path";
import { InputError, type OpenFile } from "./core.ts";
import { fileFault } from "./file-fault.ts";
import { startProgress } from "./progress.ts";

/** Bytes of a piece: large enough that the reader's loop, not the system, sets the pace. */
const PIECE = 1 << 20;

/** A text file, UTF-8 with or without BOM. */
export async function readText(file: string): Promise<string> {
  let bytes: Uint8Array;
  try {
    bytes = await readFile(file);
  } catch (fault) {
    throw fileFault(fault, file);
  }
  try {
    return new TextDecoder("utf-8", { fatal: true }).decode(bytes);
  } catch {
    throw new InputError("the text is UTF-8; found bytes that are not", { file });
  }
}

async function* pieces(name: string, path: string): AsyncIterable<Uint8Array> {
  const progress = startProgress(name, path);
  try {
    for await (const piece of createReadStream(path, { highWaterMark: PIECE })) {
      progress.add(piece.length);
      yield piece;
    }
  } catch (fault) {
    throw fileFault(fault, path);
  } finally {
    progress.end();
  }
}

/** Opens files as a plan names them: relative to the plan's own folder. */
export function openBeside(plan: string): OpenFile {
  const folder = dirname(plan);
  return (name) => pieces(name, resolve(folder, name));
}
