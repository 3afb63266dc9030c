import { basename } from "node:path";
import { InputError, inspectField, writeInspection } from "./core.ts";
import { writeResult } from "./output.ts";
import { openBeside } from "./plan-files.ts";

export interface InspectOptions {
  readonly role?: "wind" | "current";
  readonly map?: readonly string[];
  readonly format: "text" | "json";
}

function columnMap(pairs: readonly string[]): Readonly<Record<string, string>> {
  const headers = new Map<string, string>();
  for (const pair of pairs) {
    const [, axis, header] = /^([^=]+)=(.+)$/s.exec(pair)?.map((part) => part.trim()) ?? [];
    if (!axis || !header) throw new InputError(`--map is AXIS=HEADER, as lon=longitude; found "${pair}"`);
    if (headers.has(axis)) throw new InputError(`--map names an axis once; found "${axis}" twice`);
    headers.set(axis, header);
  }
  return Object.fromEntries(headers);
}

/** A mapping or role that does not fit the file is the option's fault, not the file's. */
function tellOfOption(fault: unknown, hasRole: boolean): never {
  if (!(fault instanceof InputError)) throw fault;
  const { key, ...place } = fault.place;
  if (key === "columns") throw new InputError(fault.sentence, { key: "--map" });
  if (key === "role")
    throw new InputError(fault.sentence, { ...place, ...(hasRole ? { key: "--role" } : {}) });
  throw fault;
}

/** Reads a field file and says what it holds. */
export async function inspectCommand(
  file: string,
  { role, map = [], format }: InspectOptions,
): Promise<number> {
  const inspection = await inspectField(() => openBeside(file)(basename(file)), {
    file,
    columns: columnMap(map),
    ...(role === undefined ? {} : { role }),
  }).catch((fault: unknown) => tellOfOption(fault, role !== undefined));
  await writeResult(
    format === "json" ? `${JSON.stringify(inspection, null, 2)}\n` : writeInspection(inspection),
  );
  return 0;
}
