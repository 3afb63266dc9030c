import { InputError } from "../errors.ts";
import { readGridFile } from "../field/csv.ts";
import type { FieldRole } from "../field/field.ts";
import type { RoleSource } from "./field-members.ts";
import { type FieldsRead, mergeSources, roleSource } from "./merge-fields.ts";
import type { FieldReference, OpenFile } from "./plan.ts";

/** Told how many bytes of a file have been read. */
export type FileProgress = (file: string, bytes: number) => void;

/**
 * Reads the field files that a plan names, with every member of an ensemble. Members of wind and current belong together by
 * their numbers.
 *
 * @throws InputError with file and line where a file is not there or breaks a rule, or where the members of two files or roles
 *   are not the same
 *
 * @example
 * const open = async function* () { yield new TextEncoder().encode("member,lat,lon,u,v\n4,50,-5,3,4\n9,50,-5,5,6"); };
 * const reference = { role: "wind", file: "wind.csv", columns: {}, gaps: "stop", beyond: "stop", outside: "stop" };
 * (await readMembers([reference], open)).members.map(({ member }) => member) // → [4, 9]
 */
export async function readMembers(
  references: readonly FieldReference[],
  open: OpenFile,
  onProgress: FileProgress = () => undefined,
): Promise<FieldsRead> {
  const roles = [...new Set(references.map(({ role }) => role))];
  const sources: RoleSource[] = [];
  for (const role of roles) sources.push(...(await readRole(role, references, open, onProgress)));
  return mergeSources(sources);
}

async function readRole(
  role: FieldRole,
  references: readonly FieldReference[],
  open: OpenFile,
  onProgress: FileProgress,
): Promise<RoleSource[]> {
  const sources: RoleSource[] = [];
  for (const reference of references) {
    if (reference.role !== role) continue;
    const { file, columns } = reference;
    const grid = await readGridFile(() => open(file), {
      file,
      role,
      columns,
      onProgress: (bytes) => onProgress(file, bytes),
    });
    sources.push(roleSource(grid, reference));
  }
  if (sources.length === 0) throw new InputError(`the plan names a ${role} file; found none`);
  return sources;
}
