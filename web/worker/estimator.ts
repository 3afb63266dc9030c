import type { PlanDocument } from "../state/plan-document.ts";
import { askedOf } from "./asked-of.ts";
import { type EstimateAnswer as CoreAnswer, estimatePrepared, InputError, type ReportInput } from "./core.ts";
import { faultText } from "./fault-text.ts";
import type { PlanRead, PlanReader } from "./plan-reader.ts";
import type { EstimateAnswer } from "./protocol.ts";
import { drawRoute } from "./route-drawing.ts";

/** Answers plans. */
export interface Estimator {
  estimate(plan: PlanDocument): Promise<EstimateAnswer>;
  /** What the estimate last made can be written from, with what the plan wants decided; `null` where there is none. */
  answered(): Promise<ReportInput | null>;
  /** The pace of the estimate last made. */
  pace(): ReportInput["pace"] | null;
  /** The routes of the estimate last made. */
  prepared(): PlanRead["prepared"];
}

export function createEstimator(reader: PlanReader): Estimator {
  let last: { readonly read: PlanRead; readonly answer: CoreAnswer } | null = null;

  const answer = async (document: PlanDocument): Promise<EstimateAnswer> => {
    const read = await reader.read(document);
    const found = await estimateRead(read);
    // The drawings' columns are handed over to the page; what is decided later needs them here too.
    last = { read, answer: { ...found, profiles: structuredClone(found.profiles) } };
    const drawings = read.prepared.flatMap((route, at) => {
      const profile = found.profiles[at];
      return profile === undefined ? [] : [drawRoute(route, profile)];
    });
    const { craft, land } = read.input;
    return {
      ok: true,
      estimate: found.estimate,
      drawings,
      landPending: craft.moves === "water" && land === null,
      ensemble: read.members.length > 1,
    };
  };

  return {
    async estimate(plan) {
      try {
        return await answer(plan);
      } catch (fault) {
        if (!(fault instanceof InputError)) throw fault;
        const { file = "", key = null } = fault.place;
        return { ok: false, fault: await faultText(fault, plan), key: file === "" ? key : null };
      }
    },
    async answered() {
      if (last === null) return null;
      const { read, answer: found } = last;
      const { routes, craft, pace } = read.input;
      return { estimate: await decidedEstimate(read, found), routes, craft, pace };
    },
    pace: () => last?.read.input.pace ?? null,
    prepared: () => last?.read.prepared ?? [],
  };
}

/** At the plan's pace, or at the speeds that make the arrival it asks for. What searches is loaded when it is first wanted. */
async function estimateRead(read: PlanRead): Promise<CoreAnswer> {
  const { plan, input, prepared } = read;
  if (plan.arrive === undefined) return estimatePrepared(prepared, input);
  const { estimateArriving } = await import("./choose.ts");
  return estimateArriving(prepared, input, plan.arrive, askedOf(read));
}

async function decidedEstimate(read: PlanRead, answer: CoreAnswer): Promise<ReportInput["estimate"]> {
  const { plan, members } = read;
  const wanted = [plan.alternates, plan.whatIfs, plan.errors, members].some(
    (list) => (list ?? []).length > 0,
  );
  if (!wanted) return answer.estimate;
  const { decide } = await import("./decide.ts");
  return decide(read, answer, false).estimate;
}
