import { InputError } from "../errors.ts";
import type { Field, FieldRole } from "../field/field.ts";
import type { GridFile } from "../field/grid-file.ts";
import { memberGrid } from "../field/member-grid.ts";
import { type FieldSource, mergeField } from "../field/merge.ts";
import { holdsSeveral, membersOf, type RoleSource } from "./field-members.ts";
import type { FieldReference } from "./plan.ts";

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
