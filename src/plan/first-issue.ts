import type * as z from "zod/mini";
import { InputError, type Place } from "../errors.ts";
import { quoted } from "../found.ts";

/** Makes the InputError of a sentence at a key of what is read. */
export type Fault = (path: readonly PropertyKey[], sentence: string) => InputError;

type Issue = z.core.$ZodIssue;
type Path = readonly PropertyKey[];

/**
 * The one problem that is reported of all that a schema found: an unknown key before anything else, since a key that is
 * missing is most often one that was misspelt; then the first in the schema's order.
 *
 * @param document what was checked
 * @param prefix path of the document inside a larger one, as `["craft"]`
 */
export function firstIssue(
  issues: readonly Issue[],
  document: unknown,
  file: string,
  prefix: Path,
): InputError {
  const flat = issues.flatMap((issue) => flattened(issue, document, []));
  const chosen = flat.find(({ issue }) => issue.code === "unrecognized_keys") ?? flat[0];
  if (chosen === undefined) throw new Error("a schema refused a document without an issue");
  const { issue, path } = chosen;
  const own = issue.code === "unrecognized_keys" ? issue.keys.slice(0, 1) : [];
  return new InputError(issue.message, placeOf(file, [...prefix, ...path, ...own]));
}

/** A place in a file by the path of its key. */
export function placeOf(file: string, path: Path): Place {
  return { file, key: keyText(path) };
}

/** A key's path as text: `routes[0].waypoints[2].lat`; a key that is no plain word in brackets and quotes. */
function keyText(path: Path): string {
  return path.reduce<string>((text, part) => {
    if (typeof part === "number") return `${text}[${part}]`;
    const key = String(part);
    if (!/^[A-Za-z_$][\w$]{0,39}$/.test(key)) return `${text}[${quoted(key)}]`;
    return text === "" ? key : `${text}.${key}`;
  }, "");
}

/** An issue with its whole path; of a union, those of the branch that the document means. */
function flattened(issue: Issue, document: unknown, before: Path): { issue: Issue; path: Path }[] {
  const path = [...before, ...issue.path];
  const input = valueAt(document, issue.path);
  if (issue.code !== "invalid_union" || !isObject(input)) return [{ issue, path }];
  const objects = issue.errors.filter((issues) => !issues.some(isWrongKind));
  const branch = meantBranch(objects, input);
  return branch.length === 0 ? [{ issue, path }] : branch.flatMap((each) => flattened(each, input, path));
}

/**
 * The branch of a union of objects that an object means: the first that knows one of its keys, else the first of all. An
 * object of a branch has unknown keys that zod names, so a branch knows one where it names fewer than there are.
 */
function meantBranch(branches: readonly (readonly Issue[])[], input: object): readonly Issue[] {
  const count = Object.keys(input).length;
  const known = branches.find((issues) => count > unknownAtTop(issues) && !lacksWord(issues, input));
  return known ?? branches[0] ?? [];
}

/** Whether a branch is itself a union that a word tells apart, and the object lacks its key. */
function lacksWord(issues: readonly Issue[], input: object): boolean {
  return issues.some(
    (issue) =>
      issue.code === "invalid_union" &&
      "discriminator" in issue &&
      issue.path.length === 1 &&
      !Object.hasOwn(input, issue.path[0] as PropertyKey),
  );
}

/** Whether a branch takes no objects at all. */
function isWrongKind(issue: Issue): boolean {
  return issue.code === "invalid_type" && issue.path.length === 0;
}

function unknownAtTop(issues: readonly Issue[]): number {
  const found = issues.find((issue) => issue.code === "unrecognized_keys" && issue.path.length === 0);
  return found?.code === "unrecognized_keys" ? found.keys.length : 0;
}

function valueAt(document: unknown, path: Path): unknown {
  return path.reduce<unknown>(
    (value, part) => (isObject(value) ? Reflect.get(value, part) : undefined),
    document,
  );
}

function isObject(value: unknown): value is object {
  return typeof value === "object" && value !== null;
}
