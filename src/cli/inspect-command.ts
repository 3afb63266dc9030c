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
  return Object.fromEntries(
    pairs.map((pair) => {
      const [, axis, header] = /^([^=]+)=(.+)$/s.exec(pair) ?? [];
      if (axis === undefined || header === undefined) {
        throw new InputError(`--map is AXIS=HEADER, as lon=longitude; found "${pair}"`);
      }
      return [axis.trim(), header.trim()];
    }),
  );
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
  });
  await writeResult(
    format === "json" ? `${JSON.stringify(inspection, null, 2)}\n` : writeInspection(inspection),
  );
  return 0;
}
