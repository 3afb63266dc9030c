import { strToU8, unzipSync, zipSync } from "fflate";
import { InputError } from "../errors.ts";
import { quoted } from "../found.ts";
import { statedSums } from "./archive-sums.ts";
import { crc32 } from "./crc32.ts";
import type { PlanDocument } from "./plan-schema.ts";
import { serializePlan } from "./write-plan.ts";

/*
 * One file that holds a plan, its craft and its fields: a ZIP archive with the plan at its root and the files beside it by the
 * names that the plan has for them. https://pkware.cachefly.net/webdocs/casestudies/APPNOTE.TXT, version 6.3.10.
 */

const PLAN_ENDING = ".plan.json";

/** Bounds of what an archive may hold, so that a small file can't grow without end when it is opened. */
const MOST_ENTRIES = 200;
const MOST_BYTES = 1_000_000_000;
const LONGEST_NAME = 200;

export interface Archive {
  /** Name and text of the plan. */
  readonly plan: { readonly name: string; readonly text: string };
  /** The other files, by their names. */
  readonly files: ReadonlyMap<string, Uint8Array>;
}

/**
 * Reads an archive. What its files hold is for their own readers to check.
 *
 * @throws InputError where it is no ZIP archive, holds a damaged file, no plan or several, a name that leads out of it, one name twice,
 *   or more than an archive of a plan should
 *
 * @example
 * readArchive(writeArchive({ format: "legwork-plan/1", departure: "2027-05-04T06:00:00Z", craft: { file: "a.craft.json" }, routes: [] }, "out", () => new Uint8Array(8)), "out.legwork.zip").files.get("a.craft.json").length // → 8
 */
export function readArchive(bytes: Uint8Array, file: string): Archive {
  const files = new Map(Object.entries(unpacked(bytes, file)));
  const plans = [...files.keys()].filter((name) => name.endsWith(PLAN_ENDING));
  const [name = ""] = plans;
  if (plans.length !== 1) {
    throw new InputError(`an archive holds one plan (${PLAN_ENDING}); found ${plans.length}`, { file });
  }
  const content = files.get(name) ?? new Uint8Array();
  files.delete(name);
  try {
    return { plan: { name, text: new TextDecoder("utf-8", { fatal: true }).decode(content) }, files };
  } catch {
    throw new InputError("the text is UTF-8; found bytes that are not", { file: name });
  }
}

/**
 * Writes an archive of a plan with the files that it names; the same plan and files give the same bytes. A name that leads out of
 * the archive is changed, in the plan too.
 *
 * @param stem name of the plan's file, without its ending
 * @param contentOf the bytes of a file by the plan's name for it
 *
 * @example
 * writeArchive({ format: "legwork-plan/1", departure: "2027-05-04T06:00:00Z", craft: { file: "a.craft.json" }, routes: [] }, "out", () => new Uint8Array(8)).slice(0, 2) // → [80, 75]
 */
export function writeArchive(
  document: PlanDocument,
  stem: string,
  contentOf: (name: string) => Uint8Array,
): Uint8Array {
  const names = namesInside(document);
  const entries = [...names].map(([name, inside]) => [inside, contentOf(name)] as const);
  const text = serializePlan(renamed(document, names));
  const all = [[stem + PLAN_ENDING, strToU8(text)] as const, ...entries];
  // ZIP has no date before 1980, and the archive no date of its own.
  return zipSync(Object.fromEntries(all), { level: 6, mtime: new Date(1980, 0, 1) });
}

/** The files that a plan names, each with its name in the archive. */
function namesInside({ craft, fields = [] }: PlanDocument): Map<string, string> {
  const given = ["file" in craft ? craft.file : null, ...fields.map((field) => field.file)];
  const names = new Map<string, string>();
  for (const name of given) {
    if (name === null || names.has(name)) continue;
    const taken = new Set(names.values());
    const plain = isInside(name) ? name : (name.split(/[/\\]/).at(-1) ?? "");
    let inside = plain === "" || !isInside(plain) ? "file" : plain;
    for (let number = 2; taken.has(inside); number += 1) inside = `${number}-${plain}`;
    names.set(name, inside);
  }
  return names;
}

function renamed(document: PlanDocument, names: ReadonlyMap<string, string>): PlanDocument {
  const { craft, fields } = document;
  const rename = <T extends { readonly file: string }>(named: T): T => ({
    ...named,
    file: names.get(named.file) ?? named.file,
  });
  return {
    ...document,
    craft: "file" in craft ? rename(craft) : craft,
    ...(fields === undefined ? {} : { fields: fields.map(rename) }),
  };
}

function unpacked(bytes: Uint8Array, file: string): Record<string, Uint8Array> {
  const stated = statedSums(bytes);
  /** The sums by the names of the entries that are taken. */
  const sums = new Map<string, number | undefined>();
  let entry = 0;
  let total = 0;
  let files: Record<string, Uint8Array>;
  try {
    files = unzipSync(bytes, {
      filter({ name, originalSize }) {
        const sum = stated[entry];
        entry += 1;
        // A folder has an entry of its own.
        if (name.endsWith("/")) return false;
        checkName(name, sums, file);
        sums.set(name, sum);
        total += originalSize;
        if (total > MOST_BYTES) {
          throw new InputError(`an archive holds at most ${MOST_BYTES / 1e6} MB unpacked; found more`, {
            file,
          });
        }
        return true;
      },
    });
  } catch (fault) {
    if (fault instanceof InputError) throw fault;
    throw new InputError("an archive is a whole ZIP file; found one that can't be unpacked", { file });
  }
  for (const [name, content] of Object.entries(files)) checkSum(name, content, sums.get(name), file);
  return files;
}

function checkSum(name: string, content: Uint8Array, stated: number | undefined, file: string): void {
  if (crc32(content) === stated) return;
  throw new InputError(
    `a file in an archive has the CRC-32 that the archive states; found ${quoted(name)} damaged`,
    { file },
  );
}

function checkName(name: string, seen: ReadonlyMap<string, unknown>, file: string): void {
  if (!isInside(name)) {
    throw new InputError(`a file in an archive has a name that stays inside it; found ${quoted(name)}`, {
      file,
    });
  }
  if (seen.has(name))
    throw new InputError(`an archive holds a file once; found ${quoted(name)} twice`, { file });
  if (seen.size === MOST_ENTRIES) {
    throw new InputError(`an archive holds at most ${MOST_ENTRIES} files; found more`, { file });
  }
}

/** Whether a name is relative, of plain parts, and can be the name of a file. */
function isInside(name: string): boolean {
  if (name.length > LONGEST_NAME || /[\\:\p{Cc}]/u.test(name) || name === "__proto__") return false;
  return name.split("/").every((part) => part.trim() !== "" && part !== "." && part !== "..");
}
