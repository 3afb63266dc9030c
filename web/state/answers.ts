import { type ReadonlySignal, signal } from "@preact/signals";
import type { Estimate } from "../core.ts";
import type { EstimateAnswer, RouteDrawing } from "../worker/protocol.ts";
import { estimable } from "./estimable.ts";
import { latestWins, SUPERSEDED } from "./latest-wins.ts";
import type { PlanDocument } from "./plan-document.ts";

/** The newest answer to the plan. Arrays of routes are indexed as the plan's; `null` where a route is still being drawn. */
export interface Answer {
  readonly estimate: Estimate | null;
  readonly routes: readonly (Estimate["routes"][number] | null)[];
  readonly drawings: readonly (RouteDrawing | null)[];
  /** The core's sentence about the plan's fault; the figures are then those of the last plan without one. */
  readonly fault: string | null;
  /** The key of the plan that the sentence is about. */
  readonly faultKey: string | null;
  /** Whether the routes are still to be held against land. */
  readonly landPending: boolean;
  /** Whether the fields have several members. */
  readonly ensemble: boolean;
}

/** Whether the figures are those of the plan before a fault. */
export function isStale({ fault, estimate }: Answer): boolean {
  return fault !== null && estimate !== null;
}

export interface Answers {
  readonly answer: ReadonlySignal<Answer>;
  readonly working: ReadonlySignal<boolean>;
  /** Asks for an estimate of this plan; of several asked while one runs, only the last is run. */
  ask(plan: PlanDocument): Promise<void>;
  /** Drops the answer, so that nothing is shown of a plan that is no longer there. */
  forget(): void;
}

const NONE: Answer = {
  estimate: null,
  routes: [],
  drawings: [],
  fault: null,
  faultKey: null,
  landPending: false,
  ensemble: false,
};

export function createAnswers(estimate: (plan: PlanDocument) => Promise<EstimateAnswer>): Answers {
  const answer = signal<Answer>(NONE);
  const working = signal(false);
  const newest = latestWins(estimate);
  let asked = 0;

  return {
    answer,
    working,
    forget() {
      answer.value = NONE;
    },
    async ask(plan) {
      asked += 1;
      const mine = asked;
      const part = estimable(plan);
      if (part === null) {
        answer.value = NONE;
        return;
      }
      working.value = true;
      const found = await newest(part.plan);
      if (mine === asked) working.value = false;
      if (found === SUPERSEDED) return;
      if (!found.ok) {
        answer.value = { ...answer.peek(), fault: found.fault, faultKey: onPage(found.key, part.routes) };
        return;
      }
      const place = plan.routes.map((_, index) => part.routes.indexOf(index));
      answer.value = {
        estimate: found.estimate,
        routes: place.map((at) => found.estimate.routes[at] ?? null),
        drawings: place.map((at) => found.drawings[at] ?? null),
        fault: null,
        faultKey: null,
        landPending: found.landPending,
        ensemble: found.ensemble,
      };
    },
  };
}

/** A key of the part that is estimated, as one of the page's plan: routes still being drawn are between. */
function onPage(key: string | null, routes: readonly number[]): string | null {
  return key?.replace(/^routes\[(\d+)\]/, (_, at) => `routes[${routes[Number(at)]}]`) ?? null;
}
