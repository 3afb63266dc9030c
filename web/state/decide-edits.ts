import type {
  AlternateDocument,
  ArrivalDocument,
  ErrorDocument,
  FieldDocument,
  PlanDocument,
  WhatIfDocument,
  WindowDocument,
} from "./plan-document.ts";

/* Edits of what a plan wants decided. Each takes a plan and returns another; an index that does not exist changes nothing. */

export function setWindow(plan: PlanDocument, window: WindowDocument): PlanDocument {
  return { ...plan, window };
}

/** Asks for an arrival in place of a speed. */
export function setArrival(plan: PlanDocument, arrive: ArrivalDocument["arrive"]): PlanDocument {
  return { ...plan, pace: { arrive } };
}

/** Adds a place to turn off to, with a name that no other has. */
export function addAlternate(plan: PlanDocument, lat: number, lon: number): PlanDocument {
  const taken = new Set((plan.alternates ?? []).map(alternateName));
  let number = taken.size + 1;
  while (taken.has(`Alternate ${number}`)) number += 1;
  return withAlternates(plan, [...(plan.alternates ?? []), { name: `Alternate ${number}`, lat, lon }]);
}

export function changeAlternate(
  plan: PlanDocument,
  index: number,
  change: Partial<AlternateDocument>,
): PlanDocument {
  return withAlternates(plan, changed(plan.alternates, index, change));
}

/** Sets a text of an alternate; an empty one takes the key away. */
export function setAlternateText(
  plan: PlanDocument,
  index: number,
  key: "name" | "height",
  text: string,
): PlanDocument {
  const alternates = (plan.alternates ?? []).map((old, at) => {
    if (at !== index) return old;
    const { [key]: _old, ...rest } = old;
    return text.trim() === "" ? rest : { ...rest, [key]: text };
  });
  return withAlternates(plan, alternates);
}

/** What an alternate is called: one that the plan does not name, by its number. */
export function alternateName({ name }: AlternateDocument, index: number): string {
  return name ?? `Alternate ${index + 1}`;
}

export function deleteAlternate(plan: PlanDocument, index: number): PlanDocument {
  return withAlternates(plan, without(plan.alternates, index));
}

export function addWhatIf(plan: PlanDocument, whatIf: WhatIfDocument): PlanDocument {
  return withWhatIfs(plan, [...(plan.whatIf ?? []), whatIf]);
}

/** Replaces a what-if. */
export function setWhatIf(plan: PlanDocument, index: number, whatIf: WhatIfDocument): PlanDocument {
  return withWhatIfs(
    plan,
    (plan.whatIf ?? []).map((old, at) => (at === index ? whatIf : old)),
  );
}

export function deleteWhatIf(plan: PlanDocument, index: number): PlanDocument {
  return withWhatIfs(plan, without(plan.whatIf, index));
}

/** States how wrong all files of a role may be; `null` takes the statement away, and with the last one the confidence held against them. */
export function setError(
  plan: PlanDocument,
  role: FieldDocument["role"],
  error: ErrorDocument | null,
): PlanDocument {
  const fields = (plan.fields ?? []).map((field): FieldDocument => {
    if (field.role !== role) return field;
    const { error: _old, ...rest } = field;
    return error === null ? rest : { ...rest, error };
  });
  const { confidence: _confidence, ...rest } = plan;
  const isStated = fields.some((field) => field.error !== undefined);
  return { ...(isStated ? plan : rest), fields };
}

function changed<T>(list: readonly T[] | undefined, index: number, change: Partial<T>): readonly T[] {
  return (list ?? []).map((item, at) => (at === index ? { ...item, ...change } : item));
}

function without<T>(list: readonly T[] | undefined, index: number): readonly T[] {
  return (list ?? []).filter((_, at) => at !== index);
}

function withAlternates(plan: PlanDocument, alternates: readonly AlternateDocument[]): PlanDocument {
  const { alternates: _old, ...rest } = plan;
  return alternates.length === 0 ? rest : { ...rest, alternates };
}

function withWhatIfs(plan: PlanDocument, whatIf: readonly WhatIfDocument[]): PlanDocument {
  const { whatIf: _old, ...rest } = plan;
  return whatIf.length === 0 ? rest : { ...rest, whatIf };
}
