/*
 * Unlimited undo and redo over values that are never changed in place. Both stacks are linked lists, so that a step costs the
 * same at the first edit and at the ten-thousandth.
 */

interface Step<T> {
  readonly value: T;
  /** What the edit that leads from the older to the newer value did, for the buttons' names. */
  readonly label: string;
  readonly rest: Step<T> | null;
}

export interface History<T> {
  readonly present: T;
  readonly past: Step<T> | null;
  readonly future: Step<T> | null;
  /** Edits with this key still join the newest step; `null` once it is settled. */
  readonly open: string | null;
}

export function beginHistory<T>(present: T): History<T> {
  return { present, past: null, future: null, open: null };
}

/**
 * Records an edit. With a `merge` key, an edit that follows one of the same key joins its step, so that a drag of a thousand
 * moves is undone as one; anything else, or `settle`, ends the step. What was undone before can no longer be redone.
 */
export function record<T>(
  history: History<T>,
  next: T,
  label: string,
  merge: string | null = null,
): History<T> {
  if (next === history.present) return history;
  if (merge !== null && merge === history.open) return { ...history, present: next, future: null };
  return {
    present: next,
    past: { value: history.present, label, rest: history.past },
    future: null,
    open: merge,
  };
}

/** Ends the step that is open, so that the next edit starts another. */
export function settle<T>(history: History<T>): History<T> {
  return history.open === null ? history : { ...history, open: null };
}

export function undo<T>(history: History<T>): History<T> {
  const { past, present, future } = history;
  if (past === null) return history;
  return {
    present: past.value,
    past: past.rest,
    future: { value: present, label: past.label, rest: future },
    open: null,
  };
}

export function redo<T>(history: History<T>): History<T> {
  const { past, present, future } = history;
  if (future === null) return history;
  return {
    present: future.value,
    past: { value: present, label: future.label, rest: past },
    future: future.rest,
    open: null,
  };
}
