import type { CraftDocument, FieldDocument, PaceDocument, PlanDocument } from "./plan-document.ts";

/* Edits of the plan as a whole. Each takes a plan and returns another; none changes what it was given. */

/** Sets a text of the plan; an empty text takes the key away. */
export function setPlanText(
  plan: PlanDocument,
  key: "title" | "reserve" | "confidence",
  text: string,
): PlanDocument {
  const { [key]: _old, ...rest } = plan;
  return text.trim() === "" ? rest : { ...rest, [key]: text };
}

/** Sets the departure: ISO 8601 with a zone, kept as written. */
export function setDeparture(plan: PlanDocument, departure: string): PlanDocument {
  return { ...plan, departure };
}

/** Sets the pace, with only the keys that its rule takes: `speed` for the two speeds, `power` for power. */
export function setPace(plan: PlanDocument, pace: PaceDocument): PlanDocument {
  const { hold, speed, power } = pace;
  if (hold === "power") return { ...plan, pace: power ? { hold, power } : { hold } };
  if (hold === "least-energy") return { ...plan, pace: { hold } };
  return { ...plan, pace: speed ? { hold, speed } : { hold } };
}

export function setCraft(plan: PlanDocument, craft: CraftDocument | { readonly file: string }): PlanDocument {
  return { ...plan, craft };
}

/** Adds a field reference at the end: where tiles overlap, earlier ones hold. */
export function addField(plan: PlanDocument, field: FieldDocument): PlanDocument {
  return withFields(plan, [...(plan.fields ?? []), field]);
}

export function changeField(plan: PlanDocument, index: number, change: Partial<FieldDocument>): PlanDocument {
  return withFields(
    plan,
    (plan.fields ?? []).map((field, at) => (at === index ? { ...field, ...change } : field)),
  );
}

export function deleteField(plan: PlanDocument, index: number): PlanDocument {
  return withFields(
    plan,
    (plan.fields ?? []).filter((_, at) => at !== index),
  );
}

/** Moves a field reference up or down the list, which decides which of two overlapping tiles holds. */
export function moveField(plan: PlanDocument, from: number, to: number): PlanDocument {
  const fields = [...(plan.fields ?? [])];
  const [moved] = fields.splice(from, 1);
  if (moved === undefined) return plan;
  fields.splice(to, 0, moved);
  return withFields(plan, fields);
}

function withFields(plan: PlanDocument, fields: readonly FieldDocument[]): PlanDocument {
  const { fields: _old, ...rest } = plan;
  return fields.length === 0 ? rest : { ...rest, fields };
}
