import { quoted } from "../found.ts";
import { nearest } from "../nearest.ts";
import { columnNames, isNameOfOnly, namesText, type Quantity, quantityOf } from "./column-names.ts";
import { splitHeader } from "./column-units.ts";
import type { FieldRole } from "./field.ts";

/** Characters of a list of headers that a message shows. */
const HEADERS_SHOWN = 400;

/** What a message says where a file has no column for a quantity that every field needs. */
export function missingColumnText(headers: readonly string[], role: FieldRole, quantity: Quantity): string {
  return missingText(`a ${quantity} column (${namesText(quantity, role)})`, headers, role, [quantity]);
}

/** What a message says where a file has no whole vector; where its columns are those of the other role, that. */
export function missingVectorText(
  headers: readonly string[],
  role: FieldRole,
  found: ReadonlySet<Quantity>,
): string {
  const quantities: readonly Quantity[] = ["eastward", "northward", "speed", "direction"];
  const [east, north, speed, direction] = quantities.map((quantity) => namesText(quantity, role));
  const columns = `columns for the ${role}: ${east} with ${north}, or ${speed} with ${direction}`;
  const strangers = headersOfOther(headers, role);
  if (strangers.length > 0) {
    const names = strangers.map(quoted).join(", ");
    return missingText(
      `${columns}; ${names} ${strangers.length === 1 ? "is" : "are"} of the ${otherThan(role)}, while the file's role is ${role}`,
      headers,
      role,
      [],
    );
  }
  const wanted = quantities.filter((quantity) => !found.has(quantity));
  return missingText(columns, headers, role, wanted);
}

/** Whether headers are of the other role alone, so that the role may be what is wrong. */
export function isOfOtherRole(headers: readonly string[], role: FieldRole): boolean {
  return headersOfOther(headers, role).length > 0;
}

function headersOfOther(headers: readonly string[], role: FieldRole): readonly string[] {
  return headers.filter((header) => isNameOfOnly(splitHeader(header).name, otherThan(role)));
}

function otherThan(role: FieldRole): FieldRole {
  return role === "wind" ? "current" : "wind";
}

/** What a message says where a column mapping gives a header to a name that the role does not have. */
export function unknownNameText(name: string, role: FieldRole): string {
  const names = [...columnNames(role).values()].flat();
  const near = nearestName(name, names);
  const hint = near === null ? "" : `; the nearest is ${near}`;
  return `a column mapping names one of ${names.join(", ")}; found ${quoted(name)}${hint}`;
}

/** A file's headers in quotes, cut where they are many. */
export function headersText(headers: readonly string[]): string {
  const text = headers.map(quoted).join(", ");
  return text.length <= HEADERS_SHOWN ? text : `${text.slice(0, HEADERS_SHOWN)}…`;
}

/** Names, with what was looked for and what was found, the headers that are near to a name looked for. */
function missingText(
  what: string,
  headers: readonly string[],
  role: FieldRole,
  wanted: readonly Quantity[],
): string {
  const names = wanted.flatMap((quantity) => columnNames(role).get(quantity) ?? []);
  const guesses = headers.flatMap((header) => {
    const { name } = splitHeader(header);
    const near = quantityOf(name, role) === undefined ? nearestName(name, names) : null;
    return near === null ? [] : [`${quoted(name)} is near to ${near}`];
  });
  const guess = guesses.length === 0 ? "" : `; ${guesses.slice(0, 3).join(", ")}`;
  return `the file has ${what}; found the headers ${headersText(headers)}${guess}`;
}

/** The name that a header may have been meant as; `null` where even that is more than a third of its letters away. */
function nearestName(found: string, names: readonly string[]): string | null {
  if (names.length === 0) return null;
  const { name, distance } = nearest(found, names);
  return distance <= Math.max(1, name.length / 3) ? name : null;
}
