import { constants, type Stats, writeFileSync } from "node:fs";
import { access, chmod, realpath, rename, stat, unlink, writeFile } from "node:fs/promises";
import { dirname, join } from "node:path";
import { InputError } from "./core.ts";
import { fileFault } from "./file-fault.ts";

/** What stands at a path, links followed; `null` where nothing does. */
async function standing(file: string) {
  try {
    const path = await realpath(file);
    return { path, stats: await stat(path) };
  } catch (fault) {
    if (fault instanceof Error && "code" in fault && fault.code === "ENOENT") return null;
    throw fault;
  }
}

/** Beside the file and then in its place: a reader sees the old text or the new, never a part. */
async function replaceFile(path: string, text: string, mode: number | null): Promise<void> {
  const draft = join(dirname(path), `.legwork-${process.pid}-${Math.round(performance.now() * 1000)}.tmp`);
  try {
    await writeFile(draft, text, { flag: "wx" });
    if (mode !== null) await chmod(draft, mode & 0o777);
    await rename(draft, path);
  } catch (fault) {
    await unlink(draft).catch(() => undefined);
    throw fault;
  }
}

/** What is read is not written over: a plan under way to its own table would be lost. Links, hard ones too, are followed. */
async function refuseInput(file: string, { ino, dev }: Stats, inputs: Iterable<string>): Promise<void> {
  for (const input of inputs) {
    const read = (await standing(input))?.stats;
    if (read?.ino === ino && read.dev === dev) {
      throw new InputError("--out names a file of its own; found one that the answer is made from", { file });
    }
  }
}

async function writeTo(file: string, text: string, inputs: Iterable<string>): Promise<void> {
  if (file === "") throw new InputError('--out names a file; found ""');
  const there = await standing(file);
  if (there === null && (await standing(dirname(file)))?.stats.isDirectory() !== true) {
    throw new InputError("the folder to write it in does not exist", { file });
  }
  if (there === null) return replaceFile(file, text, null);
  if (there.stats.isDirectory()) throw new InputError("--out names a file; found a folder", { file });
  // A terminal or a pipe cannot be replaced.
  if (!there.stats.isFile()) return writeFileSync(there.path, text);
  await refuseInput(file, there.stats, inputs);
  await access(there.path, constants.W_OK);
  return replaceFile(there.path, text, there.stats.mode);
}

/** Writes a result to a file that is none of `inputs`, whole or not at all, or to standard output. */
export async function writeResult(text: string, file?: string, inputs: Iterable<string> = []): Promise<void> {
  if (file === undefined) {
    process.stdout.write(text);
    return;
  }
  try {
    await writeTo(file, text, inputs);
  } catch (fault) {
    throw fileFault(fault, file);
  }
}
