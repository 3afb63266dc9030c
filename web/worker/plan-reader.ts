import type { PlanDocument } from "../state/plan-document.ts";
import {
  comparedStep,
  type EstimateInput,
  type Field,
  fieldsInUse,
  type LandFinder,
  type MemberFields,
  type Plan,
  type PreparedRoute,
  prepareRoute,
  readPlanDocument,
} from "./core.ts";
import type { FieldSource } from "./field-shelf.ts";
import type { FileShelf } from "./file-shelf.ts";

/** A plan as read, with all that an estimate or a decision rests on. */
export interface PlanRead {
  readonly plan: Plan;
  readonly input: EstimateInput;
  readonly prepared: readonly PreparedRoute[];
  /** Every member of an ensemble; empty where there are fewer than two. */
  readonly members: readonly MemberFields[];
}

/** Reads plans, keeping what it prepared for routes that did not change. */
export interface PlanReader {
  /** @throws InputError in one sentence for what is wrong in the plan or its files */
  read(document: PlanDocument): Promise<PlanRead>;
}

/** Where a reader's files, fields and land come from: its own worker's shelves, or another's. */
export interface PlanSources {
  readonly files: Pick<FileShelf, "open">;
  readonly fields: FieldSource;
  /** `null` while the coast is not loaded. */
  readonly land: () => LandFinder | null | Promise<LandFinder | null>;
}

export function createPlanReader({ files, fields, land }: PlanSources): PlanReader {
  const prepare = createPreparation();
  return {
    async read(document) {
      const plan = await readPlanDocument(document, { open: files.open });
      const { title, departure, craft, pace, reserve, routes } = plan;
      const merged = await fields.merged(plan.fields);
      const input: EstimateInput = {
        title,
        departure,
        craft,
        pace,
        reserve,
        routes,
        fields: merged.fields,
        land: craft.moves === "water" ? await land() : null,
        ...comparedStep(plan),
      };
      return { plan, input, prepared: prepare(input), members: merged.members };
    },
  };
}

/** Prepares routes; those that are as they were on the same fields and land are not prepared again. */
function createPreparation(): (input: EstimateInput) => PreparedRoute[] {
  let kept = new Map<string, PreparedRoute>();
  let on: { readonly fields: readonly Field[]; readonly land: LandFinder | null } = {
    fields: [],
    land: null,
  };
  return ({ routes, craft, fields: all, land, every_s = null }) => {
    const fields = fieldsInUse(craft, all);
    const same =
      land === on.land &&
      fields.length === on.fields.length &&
      fields.every((field, at) => field === on.fields[at]);
    const known: ReadonlyMap<string, PreparedRoute> = same ? kept : new Map();
    on = { fields, land };
    kept = new Map();
    return routes.map((route) => {
      const key = JSON.stringify(route);
      const before = known.get(key) ?? prepareRoute(route, fields, land);
      // The same object as long as nothing changes: what is drawn of a route is kept by it.
      const prepared = before.every_s === every_s ? before : { ...before, every_s };
      kept.set(key, prepared);
      return prepared;
    });
  };
}
