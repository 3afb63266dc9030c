import { InputError } from "../errors.ts";
import { readGridFile } from "../field/csv.ts";
import type { Field, FieldRole } from "../field/field.ts";
import type { GridFile } from "../field/grid-file.ts";
import { memberGrid } from "../field/member-grid.ts";
import { type FieldSource, mergeField } from "../field/merge.ts";
import { holdsSeveral, membersOf, type RoleSource } from "./field-members.ts";
import type { FieldReference, OpenFile } from "./plan.ts";

/** Told how many bytes of a file have been read. */
export type FileProgress = (file: string, bytes: number) => void;

/** The fields of one member of an ensemble; a role without members is the same object in all. */
export interface MemberFields {
  readonly member: number;
  readonly fields: readonly Field[];
}

/** The fields of a plan: those of the control, which is the member of the lowest number, and of every member. */
export interface FieldsRead {
  readonly fields: readonly Field[];
  /** Ascending; empty where fewer than two members are given. */
  readonly members: readonly MemberFields[];
}

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

/**
 * The fields that files make once they are read, the roles in the order in which they first come.
 *
 * @throws InputError where the members of two files or roles are not the same
 */
export function mergeSources(all: readonly RoleSource[]): FieldsRead {
  const roles = [...new Set(all.map(({ grid }) => grid.role))];
  const sources = roles.map((role) => all.filter(({ grid }) => grid.role === role));
  const numbers = membersOf(sources.flat());
  const shared = sources.map((own, n) =>
    own.some(({ members }) => members !== null) ? null : fieldOf(roles[n] as FieldRole, own, null),
  );
  const fieldsFor = (member: number | null) =>
    sources.map((own, n) => shared[n] ?? fieldOf(roles[n] as FieldRole, own, member));
  const members = numbers.map((member) => ({ member, fields: fieldsFor(member) }));
  return { fields: members[0]?.fields ?? fieldsFor(null), members: members.length > 1 ? members : [] };
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

/**
 * A file as read, with the members that it holds.
 *
 * @throws InputError where both its own column and the plan name members
 */
export function roleSource(grid: GridFile, reference: FieldReference): RoleSource {
  const { file, member } = reference;
  if (member !== undefined && holdsSeveral(grid))
    throw new InputError(
      `members are named by the file's own column or by the plan; found both, "member": ${member} in the plan`,
      { file },
    );
  const named = member === undefined ? null : [member];
  const members = holdsSeveral(grid) ? (grid.members ?? []).map((each) => each.member) : named;
  return { grid, reference, members };
}

/** The field of one member, of the files that have it or have no members. */
function fieldOf(role: FieldRole, sources: readonly RoleSource[], member: number | null): Field {
  const own = sources.filter(({ members }) => members === null || members.includes(member as number));
  return mergeField(
    role,
    own.map(({ grid, reference: { gaps, beyond, outside } }): FieldSource => {
      const alone = member !== null && holdsSeveral(grid) ? memberGrid(grid, member) : grid;
      return { grid: alone, gaps, beyond, outside };
    }),
  );
}
