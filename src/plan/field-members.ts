import { InputError } from "../errors.ts";
import type { GridFile } from "../field/grid-file.ts";
import type { FieldReference } from "./plan.ts";

/** A file of a role as read, with the members that it holds; `null` for a file that is every member's. */
export interface RoleSource {
  readonly grid: GridFile;
  readonly reference: FieldReference;
  readonly members: readonly number[] | null;
}

/** Whether a file is an ensemble in itself; a column with one member only is no ensemble. */
export function holdsSeveral(grid: GridFile): boolean {
  return (grid.members?.length ?? 0) > 1;
}

/**
 * Checks that the members of a role are named in one way.
 *
 * @throws InputError where one of its files has a column of members and the plan names another's
 */
export function checkNaming(sources: readonly RoleSource[]): void {
  const named = sources.find(({ reference }) => reference.member !== undefined);
  const column = sources.find(
    ({ grid, reference }) => reference.member === undefined && grid.members !== undefined,
  );
  if (named === undefined || column === undefined) return;
  throw new InputError(
    `the members of a role are named by its files' own columns or by the plan; found both, a column here and "member": ${named.reference.member} of ${named.grid.file} in the plan`,
    { file: column.grid.file },
  );
}

/**
 * The numbers of the members that the files give, ascending: the same in every file with a column of members, and, of files that
 * the plan gives a member each, together.
 *
 * @throws InputError where two sets differ
 */
export function membersOf(sources: readonly RoleSource[]): readonly number[] {
  const sets: { readonly file: string; readonly members: readonly number[] }[] = [];
  for (const { grid, members } of sources) {
    if (holdsSeveral(grid) && members !== null) sets.push({ file: grid.file, members });
  }
  for (const role of new Set(sources.map(({ grid }) => grid.role))) {
    const named = sources.filter(
      ({ grid, reference }) => grid.role === role && reference.member !== undefined,
    );
    const numbers = new Set(named.flatMap(({ members }) => members ?? []));
    const [first] = named;
    if (first !== undefined)
      sets.push({ file: first.grid.file, members: [...numbers].sort((a, b) => a - b) });
  }
  const [first, ...others] = sets;
  if (first === undefined) return [];
  for (const other of others) {
    const lacking = first.members.filter((member) => !other.members.includes(member));
    const more = other.members.filter((member) => !first.members.includes(member));
    const [odd] = [...lacking, ...more];
    if (odd === undefined) continue;
    const [has, not] = lacking.length > 0 ? [first.file, other.file] : [other.file, first.file];
    throw new InputError(
      `wind and current files of an ensemble have the same members; found member ${odd} in ${has} and not in ${not}`,
    );
  }
  return first.members;
}
