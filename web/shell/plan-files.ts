import type { PageState } from "../state/page-state.ts";

/** Hands the plan to the browser to keep as a file, written as the library writes plans. */
export async function savePlan({ store, view, engine }: PageState): Promise<void> {
  const plan = store.plan.value;
  const name = `${fileStem(plan.title ?? "plan")}.plan.json`;
  saveFile(name, await engine.planText(plan), "application/json");
  // What was changed while it was being written is not in the file.
  if (store.plan.peek() === plan) store.markSaved();
  view.announcement.value = `Saved ${name}`;
}

/** Hands the plan with its craft and fields to the browser to keep as one file. */
export async function saveArchive({ store, view, engine }: PageState): Promise<void> {
  const plan = store.plan.value;
  const stem = fileStem(plan.title ?? "plan");
  const answer = await engine.packArchive(plan, stem);
  if (!answer.ok) {
    view.notice.value = answer.fault;
    return;
  }
  const name = `${stem}.legwork.zip`;
  saveFile(name, answer.content, "application/zip");
  if (store.plan.peek() === plan) store.markSaved();
  view.announcement.value = `Saved ${name}`;
}

export function saveFile(name: string, content: string | Blob, type: string): void {
  const address = URL.createObjectURL(new Blob([content], { type }));
  const link = document.createElement("a");
  link.href = address;
  link.download = name;
  link.click();
  URL.revokeObjectURL(address);
}

/** A name that every file system takes. */
export function fileStem(title: string): string {
  const stem = title
    .toLowerCase()
    .replace(/[^\p{L}\p{N}]+/gu, "-")
    .replace(/^-+|-+$/g, "")
    .slice(0, 60);
  return stem === "" ? "plan" : stem;
}
