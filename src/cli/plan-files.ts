import { createReadStream } from "node:fs";
import { readFile } from "node:fs/promises";
import { dirname, resolve } from "node:path";
import { InputError, type OpenFile } from "./core.ts";
import { fileFault } from "./file-fault.ts";
import { startProgress } from "./progress.ts";

/** Bytes of a piece: large enough that the reader's loop, not the system, sets the pace. */
const PIECE = 1 << 20;

/** A text file, UTF-8 with or without BOM. */
async function readText(file: string): Promise<string> {
  const bytes = await readBytes(file);
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

/** Opens files as a plan names them: relative to the plan's own folder. Their paths go into `opened`. */
export function openBeside(plan: string, opened?: Set<string>): OpenFile {
  const folder = dirname(plan);
  return (name) => {
    const path = resolve(folder, name);
    opened?.add(path);
    return pieces(name, path);
  };
}

/**
 * A plan's text and what opens the files that it names: those beside it, or those in the same archive.
 *
 * @param inputs receives the path of every file that is opened
 */
export async function openPlan(
  file: string,
  inputs?: Set<string>,
): Promise<{ readonly text: string; readonly open: OpenFile }> {
  if (!file.toLowerCase().endsWith(".zip"))
    return { text: await readText(file), open: openBeside(file, inputs) };
  const { readArchive } = await import("./archive.ts");
  const { plan, files } = readArchive(await readBytes(file), file);
  return { text: plan.text, open: (name) => packed(files.get(name), name, file) };
}

async function* packed(
  content: Uint8Array | undefined,
  name: string,
  file: string,
): AsyncIterable<Uint8Array> {
  if (content === undefined)
    throw new InputError(`the archive holds every file that its plan names; found no ${name}`, { file });
  for (let at = 0; at < content.length; at += PIECE) yield content.subarray(at, at + PIECE);
}

async function readBytes(file: string): Promise<Uint8Array> {
  try {
    return await readFile(file);
  } catch (fault) {
    throw fileFault(fault, file);
  }
}
