import { InputError } from "../errors.ts";
import type { Field, UnusedFile } from "../field/field.ts";
import type { RoleSource } from "./field-members.ts";

/** A role's field in one member. */
export interface SeenRole {
  readonly field: Field;
  /** The files that the member has. */
  readonly own: readonly RoleSource[];
  /** Those of which nothing is used, and the earlier ones that cover them. */
  readonly hidden: ReadonlyMap<RoleSource, readonly RoleSource[]>;
}

/** The files of which no member uses anything. */
export function unusedFiles(sources: readonly RoleSource[], seen: readonly SeenRole[]): UnusedFile[] {
  return sources.flatMap((source) => {
    const covers = coversOf(source, seen);
    const [first] = covers;
    if (first === undefined || covers.some((by) => by === undefined)) return [];
    return [{ file: source.grid.file, by: [...new Set(first.map(({ grid }) => grid.file))] }];
  });
}

/** The files in use that serve every member beside others of the role that name theirs. */
export function sharedFiles(sources: readonly RoleSource[], unused: readonly UnusedFile[]): string[] {
  return sources
    .filter(({ members }) => members === null)
    .map(({ grid }) => grid.file)
    .filter((name) => unused.every(({ file }) => file !== name));
}

/**
 * A file without its member is every member's, which makes sense only where it adds to those that name one: over the same area
 * and times, either it or they are left out, and what looks like an ensemble is none.
 *
 * @throws InputError where it is so
 */
export function checkUnnamed(sources: readonly RoleSource[], seen: readonly SeenRole[]): void {
  for (const source of sources) {
    const covers = coversOf(source, seen);
    const isUnnamed = source.members === null;
    if (isUnnamed && covers.some((by) => by === undefined)) continue;
    const other = covers.flatMap((by) => by ?? []).find(({ members }) => (members === null) !== isUnnamed);
    if (other === undefined) continue;
    throw new InputError(
      `a ${source.grid.role} file without its "member", beside others that name theirs, adds area or times to them; found that ${source.grid.file} lies within ${other.grid.file}`,
      { file: (isUnnamed ? source : other).grid.file },
    );
  }
}

/** For each member that has the file: the files that cover it, `undefined` where something of it is used. */
function coversOf(
  source: RoleSource,
  seen: readonly SeenRole[],
): readonly (readonly RoleSource[] | undefined)[] {
  return seen.filter(({ own }) => own.includes(source)).map(({ hidden }) => hidden.get(source));
}
