import { type ReadonlySignal, signal } from "@preact/signals";
import type { FieldSheet, Worker } from "../worker/protocol.ts";
import { type Answers, createAnswers } from "./answers.ts";
import { createPageView, type PageView } from "./page-view.ts";
import type { PlanDocument } from "./plan-document.ts";
import { createPlanStore, type PlanStore } from "./plan-store.ts";

/** The worker as the page sees it: every call answers later. */
export type Engine = {
  [Call in keyof Worker]: (...args: Parameters<Worker[Call]>) => Promise<Awaited<ReturnType<Worker[Call]>>>;
};

/** Everything that the parts of the page share. */
export interface PageState {
  readonly store: PlanStore;
  readonly view: PageView;
  readonly answers: Answers;
  readonly engine: Engine;
  /** The fields that are read, in the plan's order. */
  readonly sheets: ReadonlySignal<readonly FieldSheet[]>;
}

export function createPageState(plan: PlanDocument, engine: Engine): PageState {
  return {
    store: createPlanStore(plan),
    view: createPageView(),
    answers: createAnswers((asked) => engine.estimate(asked)),
    engine,
    sheets: signal<readonly FieldSheet[]>([]),
  };
}

/** The instant that the chart shows: the chosen one, or the departure. `null` where the departure can't be read. */
export function shownInstant({ view, store }: PageState): number | null {
  const chosen = view.instant.value;
  if (chosen !== null) return chosen;
  const departure = Date.parse(store.plan.value.departure);
  return Number.isNaN(departure) ? null : departure;
}
