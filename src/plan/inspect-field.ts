import { InputError } from "../errors.ts";
import { readGridFile } from "../field/csv.ts";
import type { FieldRole } from "../field/field.ts";
import { type FieldInspection, inspectGrid } from "../field/inspect.ts";

export interface InspectRequest {
  readonly file: string;
  /** What the field is of; where left out, wind unless only current's columns are there. */
  readonly role?: FieldRole;
  /** Our name of a column → its header in the file. */
  readonly columns?: Readonly<Record<string, string>>;
  readonly onProgress?: (bytes: number) => void;
}

/**
 * Says what a field file holds: axes, valid times, coverage, gaps, ranges, ignored columns, memory.
 *
 * @throws InputError with the line where the file breaks a rule
 *
 * @example
 * async function* open() {
 *   yield new TextEncoder().encode("lat,lon,u,v\n50,-5,3,4\n50,-4,0,\n51,-5,6,8\n51,-4,0,0\n");
 * }
 * const { role, longitude, missing, speed } = await inspectField(open, { file: "wind.csv" });
 * [role, longitude.count, missing, speed.max] // → ["wind", 2, 1, 10]
 */
export async function inspectField(
  open: () => AsyncIterable<Uint8Array>,
  request: InspectRequest,
): Promise<FieldInspection> {
  if (request.role !== undefined) return inspectAs(request.role, open, request);
  try {
    return await inspectAs("wind", open, request);
  } catch (fault) {
    if (!(fault instanceof InputError)) throw fault;
    return inspectAs("current", open, request).catch((second: unknown) => {
      // The wind's own fault says more unless the file got further as a current.
      throw second instanceof InputError && (second.place.line ?? 0) > (fault.place.line ?? 0)
        ? second
        : fault;
    });
  }
}

async function inspectAs(
  role: FieldRole,
  open: () => AsyncIterable<Uint8Array>,
  { file, columns, onProgress }: InspectRequest,
): Promise<FieldInspection> {
  const grid = await readGridFile(open, {
    file,
    role,
    ...(columns === undefined ? {} : { columns }),
    ...(onProgress === undefined ? {} : { onProgress }),
  });
  return inspectGrid(grid);
}
