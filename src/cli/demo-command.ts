import { existsSync } from "node:fs";
import { mkdir, readdir, readFile, stat, writeFile } from "node:fs/promises";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";
import { InputError } from "./core.ts";
import { fileFault } from "./file-fault.ts";

/** What of the demo folder a user wants; its recipe is not among it. */
const WANTED = /\.(plan|craft)\.json$|\.csv$/;

const PLAN = ".plan.json";

/** The demo data as they were shipped, above the built file or the source. */
function shippedFolder(): string {
  let folder = dirname(fileURLToPath(import.meta.url));
  for (let levels = 0; levels < 4; levels += 1) {
    const candidate = join(folder, "data", "demo");
    if (existsSync(candidate)) return candidate;
    folder = dirname(folder);
  }
  throw new Error("the demo data were not shipped beside the program");
}

/** What `look` finds at a path; `null` where nothing is there. */
async function found<T>(look: Promise<T>): Promise<T | null> {
  try {
    return await look;
  } catch (fault) {
    if (fault instanceof Error && "code" in fault && fault.code === "ENOENT") return null;
    throw fault;
  }
}

/** Folder by folder, since Node's own recursion never ends where the system has no such folder to make, as below /proc. */
async function makeFolder(folder: string): Promise<void> {
  if ((await found(stat(folder)))?.isDirectory() === true) return;
  const above = dirname(folder);
  if (above !== folder) await makeFolder(above);
  const made = await found(mkdir(folder));
  if (made === null) throw new InputError("the system makes no folder there", { file: folder });
}

/** The files to write and their content; a file that is there already with the same content is left out. */
async function missing(names: readonly string[], from: string, folder: string): Promise<Map<string, Buffer>> {
  const files = new Map<string, Buffer>();
  for (const name of names) {
    const wanted = await readFile(join(from, name));
    const target = join(folder, name);
    const there = await found(readFile(target));
    if (there === null) files.set(target, wanted);
    else if (!there.equals(wanted)) {
      throw new InputError("a file of other content is there and is not overwritten; name another folder", {
        file: target,
      });
    }
  }
  return files;
}

/** A plan before the one that builds on it: `islands`, `islands-decide`. */
function byStem(a: string, b: string): number {
  return a.slice(0, -PLAN.length) < b.slice(0, -PLAN.length) ? -1 : 1;
}

/** A path as a shell takes it. */
function shown(path: string): string {
  return /^[\w./-]+$/.test(path) ? path : JSON.stringify(path);
}

/** Writes the demo plans, craft and fields into a folder, all of them or none. */
export async function demoCommand(folder: string): Promise<number> {
  const from = shippedFolder();
  const names = (await readdir(from)).filter((name) => WANTED.test(name)).sort();
  try {
    await makeFolder(folder);
    const files = await missing(names, from, folder);
    for (const [file, content] of files) await writeFile(file, content);
  } catch (fault) {
    throw fileFault(fault, folder);
  }
  const plans = names.filter((name) => name.endsWith(PLAN)).sort(byStem);
  const next = plans.flatMap((name) => {
    const written = shown(join(folder, name));
    const estimate = `  legwork estimate ${written}`;
    return name.endsWith(`-decide${PLAN}`) ? [estimate, `  legwork window ${written}`] : [estimate];
  });
  process.stdout.write(`${names.length} files are in ${folder}. Run next:\n${next.join("\n")}\n`);
  return 0;
}
