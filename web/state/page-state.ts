import { computed, type ReadonlySignal, type Signal, signal } from "@preact/signals";
import { type DecidedRoute, type FieldInspection, routesClock } from "../core.ts";
import type { Worker } from "../worker/protocol.ts";
import { type Answers, createAnswers } from "./answers.ts";
import { createDecisions, type Decisions, estimatesAlike } from "./decisions.ts";
import { departingAt } from "./departing-at.ts";
import { createDesk, type Desk } from "./desk.ts";
import { createPageView, type PageView } from "./page-view.ts";
import type { FieldDocument, PlanDocument } from "./plan-document.ts";
import { createPlanStore, type PlanStore } from "./plan-store.ts";

/** The worker as the page sees it: every call answers later. */
export type Engine = {
  [Call in keyof Worker]: (...args: Parameters<Worker[Call]>) => Promise<Awaited<ReturnType<Worker[Call]>>>;
};

/** A field file that is being read. */
interface Reading {
  readonly ticket: number;
  readonly file: string;
  /** 0..1 */
  readonly share: number;
}

/** A field file whose meaning the user is asked. */
interface FieldQuestion {
  readonly content: File;
  /** Ends the question; `null` leaves the file out. */
  answer(field: FieldDocument | null): void;
}

/** Everything that the parts of the page share. */
export interface PageState {
  readonly store: PlanStore;
  readonly view: PageView;
  readonly answers: Answers;
  readonly engine: Engine;
  /** A second worker for what takes longer, begun when it is first asked for. */
  readonly second: () => Engine;
  readonly desk: Desk;
  readonly decisions: Decisions;
  /** The plan that is estimated and shown: the plan on the page, or the departure that is looked at. */
  readonly shown: ReadonlySignal<PlanDocument>;
  /** The routes as shown, with what is decided on top of them once that is there. */
  readonly routes: ReadonlySignal<readonly (DecidedRoute | null)[]>;
  readonly asking: Signal<FieldQuestion | null>;
  /** The files that the worker has, by the names that plans use; those of the plan are its store's. */
  readonly files: Map<string, Blob>;
  /** Names of the craft in craft files, by the file. */
  readonly craftNames: Signal<Readonly<Record<string, string>>>;
  readonly readings: Signal<readonly Reading[]>;
  /** What each field file that was read holds, by its name. */
  readonly inspections: Signal<Readonly<Record<string, FieldInspection>>>;
}

/** @param startSecond starts a second worker that uses the files and fields of the first */
export function createPageState(
  plan: PlanDocument,
  engine: Engine,
  startSecond: () => Engine = () => engine,
): PageState {
  const store = createPlanStore(plan);
  const desk = createDesk();
  const answers = createAnswers((asked) => engine.estimate(asked));
  let begun: Engine | null = null;
  const second = (): Engine => {
    begun ??= startSecond();
    return begun;
  };
  const decisions = createDecisions((asked, turnBack) => second().decide(asked, turnBack));
  const shown = computed(() => {
    const preview = desk.preview.value;
    return preview === null ? store.plan.value : departingAt(store.plan.value, preview);
  });
  return {
    store,
    view: createPageView(computed(() => routesClock(answers.answer.value.estimate?.routes ?? []))),
    answers,
    engine,
    second,
    desk,
    decisions,
    shown,
    routes: computed(() => {
      const { routes } = answers.answer.value;
      const decided = decisions.decided.value;
      if (decided === null || !estimatesAlike(decided.plan, shown.value)) return routes;
      return routes.map((route, at) => (route === null ? null : (decided.routes[at] ?? route)));
    }),
    asking: signal<FieldQuestion | null>(null),
    files: new Map(),
    craftNames: signal<Readonly<Record<string, string>>>({}),
    readings: signal<readonly Reading[]>([]),
    inspections: signal<Readonly<Record<string, FieldInspection>>>({}),
  };
}

/** The instant that the chart shows: the chosen one, or the departure. `null` where the departure can't be read. */
export function shownInstant({ view, shown }: PageState): number | null {
  const chosen = view.instant.value;
  if (chosen !== null) return chosen;
  const departure = Date.parse(shown.value.departure);
  return Number.isNaN(departure) ? null : departure;
}
