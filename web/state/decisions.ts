import { type ReadonlySignal, signal } from "@preact/signals";
import type { DecidedRoute, SensitivityProfile } from "../core.ts";
import type { Answered, DecideAnswer } from "../worker/protocol.ts";
import { estimable } from "./estimable.ts";
import { latestWins, SUPERSEDED } from "./latest-wins.ts";
import type { PlanDocument } from "./plan-document.ts";

/** What was decided for a plan, indexed as the plan's routes. */
interface Decided {
  readonly plan: PlanDocument;
  readonly routes: readonly (DecidedRoute | null)[];
  readonly sensitivities: readonly (SensitivityProfile | null)[];
}

export interface Decisions {
  /** The newest; of the plan that it names, which may no longer be the one on the page. */
  readonly decided: ReadonlySignal<Decided | null>;
  ask(plan: PlanDocument, turnBack: boolean): Promise<void>;
}

/** Whether a plan wants anything decided beyond its estimate; an ensemble does by itself. */
export function wantsDecisions(
  { alternates = [], whatIf = [], fields = [] }: PlanDocument,
  ensemble: boolean,
): boolean {
  return ensemble || alternates.length + whatIf.length > 0 || fields.some(({ error }) => error !== undefined);
}

/**
 * Whether the estimates of two plans are the same: alternates may differ, since no route's own figures rest on them. While one is
 * dragged, what was decided a moment before so stays in view.
 */
export function estimatesAlike(a: PlanDocument, b: PlanDocument): boolean {
  const { alternates: _a, ...mine } = a;
  const { alternates: _b, ...other } = b;
  const keys = new Set([...Object.keys(mine), ...Object.keys(other)]);
  return [...keys].every((key) => Reflect.get(mine, key) === Reflect.get(other, key));
}

export function createDecisions(
  decide: (plan: PlanDocument, turnBack: boolean) => Promise<Answered<DecideAnswer>>,
): Decisions {
  const decided = signal<Decided | null>(null);
  const newest = latestWins(({ plan, turnBack }: { plan: PlanDocument; turnBack: boolean }) =>
    decide(plan, turnBack),
  );
  return {
    decided,
    async ask(plan, turnBack) {
      const part = estimable(plan);
      if (part === null) return;
      const found = await newest({ plan: part.plan, turnBack });
      // What is wrong with the plan its estimate says already.
      if (found === SUPERSEDED || !found.ok) return;
      const place = plan.routes.map((_, index) => part.routes.indexOf(index));
      decided.value = {
        plan,
        routes: place.map((at) => found.routes[at] ?? null),
        sensitivities: place.map((at) => found.sensitivities[at] ?? null),
      };
    },
  };
}
