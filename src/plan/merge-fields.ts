import { InputError } from "../errors.ts";
import type { Field, FieldOrigin, FieldRole, MemberFiles } from "../field/field.ts";
import type { GridFile } from "../field/grid-file.ts";
import { memberGrid } from "../field/member-grid.ts";
import type { FieldSource } from "../field/merge.ts";
import { seenField } from "../field/seen-field.ts";
import { checkNaming, holdsSeveral, membersOf, type RoleSource } from "./field-members.ts";
import { checkUnnamed, type SeenRole, sharedFiles, unusedFiles } from "./hidden-files.ts";
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
 * @throws InputError where the members of two files or roles are not the same, a role's members are named in two ways, or a file
 *   without a member and one with it cover the same
 */
export function mergeSources(all: readonly RoleSource[]): FieldsRead {
  const roles = [...new Set(all.map(({ grid }) => grid.role))];
  const sources = roles.map((role) => all.filter(({ grid }) => grid.role === role));
  for (const own of sources) checkNaming(own);
  const numbers = membersOf(sources.flat());
  const merged = sources.map((own, n) => roleFields(roles[n] as FieldRole, own, numbers));
  const fieldsAt = (place: number) => merged.map((fields) => (fields[place] ?? fields[0]) as Field);
  const members = numbers.map((member, place) => ({ member, fields: fieldsAt(place) }));
  return { fields: members[0]?.fields ?? fieldsAt(0), members: members.length > 1 ? members : [] };
}

/** The field of a role in every member, or its one field where none of its files has members. */
function roleFields(role: FieldRole, sources: readonly RoleSource[], numbers: readonly number[]): Field[] {
  const hasMembers = sources.some(({ members }) => members !== null);
  const seen = hasMembers
    ? numbers.map((member) => seenBy(role, sources, member))
    : [seenBy(role, sources, null)];
  if (hasMembers) checkUnnamed(sources, seen);
  const isEnsemble = hasMembers && numbers.length > 1;
  const unused = unusedFiles(sources, seen);
  const origin: FieldOrigin = {
    members: isEnsemble ? numbers.map((member, n) => filesOf(member, seen[n])) : [],
    unused,
    shared: isEnsemble ? sharedFiles(sources, unused) : [],
  };
  return seen.map(({ field }) => ({ ...field, origin }));
}

function filesOf(member: number, seen: SeenRole | undefined): MemberFiles {
  return { member, files: [...new Set(seen?.field.tiles.flatMap(({ files }) => files))] };
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
function seenBy(role: FieldRole, sources: readonly RoleSource[], member: number | null): SeenRole {
  const own = sources.filter(({ members }) => members === null || members.includes(member as number));
  const alone = new Map<FieldSource, RoleSource>();
  for (const source of own) {
    const { grid, reference } = source;
    const { gaps, beyond, outside } = reference;
    const named = member !== null && holdsSeveral(grid) ? memberGrid(grid, member) : grid;
    alone.set({ grid: named, gaps, beyond, outside }, source);
  }
  const { field, hidden } = seenField(role, [...alone.keys()]);
  const roleSourceOf = (source: FieldSource) => alone.get(source) as RoleSource;
  return {
    field,
    own,
    hidden: new Map(hidden.map(({ source, by }) => [roleSourceOf(source), by.map(roleSourceOf)])),
  };
}
