import type { PlanDocument } from "../state/plan-document.ts";
import {
  type EstimateInput,
  estimatePrepared,
  type Field,
  fieldsInUse,
  InputError,
  type Land,
  type PreparedRoute,
  prepareRoute,
  type ReportInput,
  type Route,
  readPlanDocument,
} from "./core.ts";
import type { FieldShelf } from "./field-shelf.ts";
import type { FileShelf } from "./file-shelf.ts";
import type { LandShelf } from "./land-shelf.ts";
import type { EstimateAnswer } from "./protocol.ts";
import { drawRoute } from "./route-drawing.ts";

/** Answers plans, keeping what it prepared for routes that did not change. */
export interface Estimator {
  estimate(plan: PlanDocument): Promise<EstimateAnswer>;
  /** What the estimate last made can be written from; `null` where there is none. */
  answered(): ReportInput | null;
}

export function createEstimator(files: FileShelf, fields: FieldShelf, land: LandShelf): Estimator {
  const prepare = createPreparation();
  let last: ReportInput | null = null;

  const answer = async (document: PlanDocument): Promise<EstimateAnswer> => {
    const plan = await readPlanDocument(document, { open: files.open });
    const { title, departure, craft, pace, reserve, routes } = plan;
    const isWater = craft.moves === "water";
    const input: EstimateInput = {
      title,
      departure,
      craft,
      pace,
      reserve,
      routes,
      fields: await fields.merged(plan.fields),
      land: isWater ? land.ready() : null,
    };
    const prepared = prepare(routes, fieldsInUse(craft, input.fields), input.land);
    const { estimate, profiles } = estimatePrepared(prepared, input);
    last = { estimate, routes, craft, pace };
    const drawings = prepared.flatMap((route, at) => {
      const profile = profiles[at];
      return profile === undefined ? [] : [drawRoute(route, profile)];
    });
    return { ok: true, estimate, drawings, landPending: isWater && input.land === null };
  };

  return {
    async estimate(plan) {
      try {
        return await answer(plan);
      } catch (fault) {
        if (fault instanceof InputError) return { ok: false, fault: fault.message };
        throw fault;
      }
    },
    answered: () => last,
  };
}

/** Prepares routes; those that are as they were on the same fields and land are not prepared again. */
function createPreparation(): (
  routes: readonly Route[],
  fields: readonly Field[],
  land: Land | null,
) => PreparedRoute[] {
  let kept = new Map<string, PreparedRoute>();
  let on: { readonly fields: readonly Field[]; readonly land: Land | null } = { fields: [], land: null };
  return (routes, fields, land) => {
    const same =
      land === on.land &&
      fields.length === on.fields.length &&
      fields.every((field, at) => field === on.fields[at]);
    const known: ReadonlyMap<string, PreparedRoute> = same ? kept : new Map();
    on = { fields, land };
    kept = new Map();
    return routes.map((route) => {
      const key = JSON.stringify(route);
      const prepared = known.get(key) ?? prepareRoute(route, fields, land);
      kept.set(key, prepared);
      return prepared;
    });
  };
}
