import type { Field } from "../field/field.ts";
import type { EstimateInput } from "./estimate.ts";
import { routeFinding } from "./findings.ts";
import { fieldsInUse, mediumRole } from "./prepare.ts";
import type { Finding } from "./result.ts";

/** What there is to note of a plan's fields, whatever the route: what is missing, and what is left out. */
export function fieldNotes({ craft, fields }: Pick<EstimateInput, "craft" | "fields">): Finding[] {
  const used = fieldsInUse(craft, fields);
  const notes = used.flatMap(originNotes);
  const medium = mediumRole(craft);
  if (fields.length === 0) {
    notes.push(routeFinding("no-field", "the plan names no field: this is an estimate for a still medium"));
  } else if (!used.some(({ role }) => role === medium)) {
    notes.push(routeFinding("no-field", `the plan names no ${medium}: the ${craft.moves} is taken as still`));
  }
  if (craft.moves === "water" && craft.windage === null && used.some(({ role }) => role === "wind")) {
    const what = `the wind changes neither time nor use: ${craft.name} names no windage`;
    notes.push(routeFinding("field-unused", `${what}; it is read for limits and cautions alone`));
  }
  for (const field of fields) {
    if (!used.includes(field))
      notes.push(
        routeFinding(
          "field-unused",
          `the ${field.role} is left out: ${craft.name} moves through the ${craft.moves}`,
        ),
      );
  }
  return notes;
}

/** What became of the files that a field is made of. */
function originNotes({ origin }: Field): Finding[] {
  if (origin === undefined) return [];
  const { members, unused, shared } = origin;
  return [
    ...unused.map(({ file, by }) =>
      routeFinding(
        "field-unused",
        `${file} is left out: ${by.join(" and ")}, named before it, ${by.length === 1 ? "covers" : "cover"} all of its area and times`,
      ),
    ),
    ...shared.map((file) =>
      routeFinding("field-shared", `${file} names no member, so it serves all ${members.length} members`),
    ),
  ];
}
