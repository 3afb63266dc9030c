import { type Signal, signal } from "@preact/signals";
import type { FieldInspection } from "../core.ts";
import type { Worker } from "../worker/protocol.ts";
import { type Answers, createAnswers } from "./answers.ts";
import { createPageView, type PageView } from "./page-view.ts";
import type { FieldDocument, PlanDocument } from "./plan-document.ts";
import { createPlanStore, type PlanStore } from "./plan-store.ts";

/** The worker as the page sees it: every call answers later. */
export type Engine = {
  [Call in keyof Worker]: (...args: Parameters<Worker[Call]>) => Promise<Awaited<ReturnType<Worker[Call]>>>;
};

/** A field file that is being read. */
export interface Reading {
  readonly ticket: number;
  readonly file: string;
  /** 0..1 */
  readonly share: number;
}

/** A field file whose meaning the user is asked. */
export interface FieldQuestion {
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
  readonly asking: Signal<FieldQuestion | null>;
  /** The files that the user gave, by the names that plans use. */
  readonly files: Signal<ReadonlyMap<string, Blob>>;
  /** Names of the craft in craft files, by the file. */
  readonly craftNames: Signal<Readonly<Record<string, string>>>;
  readonly readings: Signal<readonly Reading[]>;
  /** What each field file that was read holds, by its name. */
  readonly inspections: Signal<Readonly<Record<string, FieldInspection>>>;
}

export function createPageState(plan: PlanDocument, engine: Engine): PageState {
  return {
    store: createPlanStore(plan),
    view: createPageView(),
    answers: createAnswers((asked) => engine.estimate(asked)),
    engine,
    asking: signal<FieldQuestion | null>(null),
    files: signal<ReadonlyMap<string, Blob>>(new Map()),
    craftNames: signal<Readonly<Record<string, string>>>({}),
    readings: signal<readonly Reading[]>([]),
    inspections: signal<Readonly<Record<string, FieldInspection>>>({}),
  };
}

/** The instant that the chart shows: the chosen one, or the departure. `null` where the departure can't be read. */
export function shownInstant({ view, store }: PageState): number | null {
  const chosen = view.instant.value;
  if (chosen !== null) return chosen;
  const departure = Date.parse(store.plan.value.departure);
  return Number.isNaN(departure) ? null : departure;
}
