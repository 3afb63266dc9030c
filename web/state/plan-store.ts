import { computed, type ReadonlySignal, signal } from "@preact/signals";
import { beginHistory, record, redo, settle, undo } from "./history.ts";
import type { PlanDocument } from "./plan-document.ts";

/** The chosen route and waypoint, counted from 0. `waypoint` is `null` where the route as a whole is meant. */
export interface Selection {
  readonly route: number;
  readonly waypoint: number | null;
}

/** Files by the names that plans use. */
type Files = ReadonlyMap<string, Blob>;

interface EditOptions {
  /** Edits in a row with the same key are undone as one. */
  readonly merge?: string;
  /** What is chosen after the edit; otherwise what was chosen before, as far as it still exists. */
  readonly select?: Selection;
  /** Files that come with the edit, in place of those of the same names; undo brings those back. */
  readonly files?: Files;
}

interface Held {
  readonly plan: PlanDocument;
  readonly selection: Selection;
  readonly files: Files;
}

/**
 * The plan on the page with its history. The selection travels with it, so that undo shows what it undid, and so do the files that its
 * names stand for, so that undo shows the figures that were there.
 */
export interface PlanStore {
  readonly plan: ReadonlySignal<PlanDocument>;
  readonly files: ReadonlySignal<Files>;
  readonly selection: ReadonlySignal<Selection>;
  /** What undo and redo would take back or bring again; `null` where there is nothing. */
  readonly undoLabel: ReadonlySignal<string | null>;
  readonly redoLabel: ReadonlySignal<string | null>;
  /** Whether the plan differs from what was last opened or saved. */
  readonly unsaved: ReadonlySignal<boolean>;
  edit(label: string, change: (plan: PlanDocument) => PlanDocument, options?: EditOptions): void;
  settle(): void;
  undo(): void;
  redo(): void;
  select(selection: Selection): void;
  /** Replaces the plan, as an edit that can be undone; the new plan counts as saved. */
  open(plan: PlanDocument, label: string, files?: Files): void;
  /** Begins anew with a plan: nothing before it can be undone. */
  restart(plan: PlanDocument, files?: Files): void;
  markSaved(): void;
  /** Says that the plan as it stands is in no file. */
  markUnsaved(): void;
}

export function createPlanStore(initial: PlanDocument): PlanStore {
  const history = signal(beginHistory(heldAs(initial, NO_FILES)));
  const saved = signal<PlanDocument | null>(initial);
  const held = computed(() => history.value.present);

  const write = (label: string, next: Held, merge: string | null): void => {
    history.value = record(history.value, next, label, merge);
  };

  return {
    plan: computed(() => held.value.plan),
    files: computed(() => held.value.files),
    selection: computed(() => held.value.selection),
    undoLabel: computed(() => history.value.past?.label ?? null),
    redoLabel: computed(() => history.value.future?.label ?? null),
    unsaved: computed(() => held.value.plan !== saved.value),
    edit(label, change, options = {}) {
      const { plan, selection, files } = history.peek().present;
      const next = change(plan);
      if (next === plan) return;
      write(
        label,
        {
          plan: next,
          selection: existing(next, options.select ?? selection),
          files: withFiles(files, options.files),
        },
        options.merge ?? null,
      );
    },
    settle() {
      history.value = settle(history.peek());
    },
    undo() {
      history.value = undo(history.peek());
    },
    redo() {
      history.value = redo(history.peek());
    },
    select(selection) {
      const { present } = history.peek();
      const next = existing(present.plan, selection);
      if (next.route === present.selection.route && next.waypoint === present.selection.waypoint) return;
      history.value = { ...history.peek(), present: { ...present, selection: next } };
    },
    open(plan, label, files) {
      write(label, heldAs(plan, withFiles(history.peek().present.files, files)), null);
      saved.value = plan;
    },
    restart(plan, files) {
      history.value = beginHistory(heldAs(plan, withFiles(history.peek().present.files, files)));
      saved.value = plan;
    },
    markSaved() {
      saved.value = history.peek().present.plan;
    },
    markUnsaved() {
      saved.value = null;
    },
  };
}

const NO_FILES: Files = new Map();

const heldAs = (plan: PlanDocument, files: Files): Held => ({
  plan,
  selection: { route: 0, waypoint: null },
  files,
});

const withFiles = (files: Files, more: Files | undefined): Files =>
  more === undefined ? files : new Map([...files, ...more]);

/** The nearest selection that exists in the plan. */
function existing(plan: PlanDocument, { route, waypoint }: Selection): Selection {
  const lastRoute = Math.max(plan.routes.length - 1, 0);
  const chosen = Math.min(Math.max(route, 0), lastRoute);
  const lastWaypoint = (plan.routes[chosen]?.waypoints.length ?? 0) - 1;
  if (waypoint === null || lastWaypoint < 0 || chosen !== route) return { route: chosen, waypoint: null };
  return { route: chosen, waypoint: Math.min(waypoint, lastWaypoint) };
}
