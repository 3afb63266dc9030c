import type { PlanStore } from "../state/plan-store.ts";

/** Undo and redo by keyboard, except where a text field has an undo of its own. */
export function listenForKeys(store: PlanStore): void {
  window.addEventListener("keydown", (event) => {
    if (!(event.ctrlKey || event.metaKey) || isText(event.target)) return;
    const key = event.key.toLowerCase();
    if (key === "z" && !event.shiftKey) store.undo();
    else if (key === "y" || (key === "z" && event.shiftKey)) store.redo();
    else return;
    event.preventDefault();
  });
}

function isText(target: EventTarget | null): boolean {
  return target instanceof HTMLInputElement ? target.type === "text" : target instanceof HTMLTextAreaElement;
}
