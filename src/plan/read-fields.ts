import { InputError } from "../errors.ts";
import { readGridFile } from "../field/csv.ts";
import type { Field, FieldRole } from "../field/field.ts";
import { type FieldSource, mergeField } from "../field/merge.ts";
import type { FieldReference, OpenFile } from "./plan.ts";

/** Told how many bytes of a file have been read. */
export type FileProgress = (file: string, bytes: number) => void;

/**
 * Reads the field files that a plan names and makes the files of each role one field; the roles come in the plan's order.
 *
 * @throws InputError with file and line where a file is not there or breaks a rule
 */
export async function readFields(
  references: readonly FieldReference[],
  open: OpenFile,
  onProgress: FileProgress = () => undefined,
): Promise<Field[]> {
  const roles = [...new Set(references.map(({ role }) => role))];
  const fields: Field[] = [];
  for (const role of roles) fields.push(await readField(role, references, open, onProgress));
  return fields;
}

async function readField(
  role: FieldRole,
  references: readonly FieldReference[],
  open: OpenFile,
  onProgress: FileProgress,
): Promise<Field> {
  const sources: FieldSource[] = [];
  for (const reference of references) {
    if (reference.role !== role) continue;
    const { file, columns, gaps, beyond, outside } = reference;
    const grid = await readGridFile(() => open(file), {
      file,
      role,
      columns,
      onProgress: (bytes) => onProgress(file, bytes),
    });
    sources.push({ grid, gaps, beyond, outside });
  }
  if (sources.length === 0) throw new InputError(`the plan names a ${role} file; found none`);
  return mergeField(role, sources);
}
