import type { PageState } from "../state/page-state.ts";
import type { PlanDocument } from "../state/plan-document.ts";

const LARGEST_PLAN = 5_000_000;

/** Opens a plan file as an edit that can be undone; what is wrong with it is said in the live region. */
export async function openPlanFile({ store, view }: PageState, file: File): Promise<void> {
  if (file.size > LARGEST_PLAN) {
    view.announcement.value = `${file.name} is larger than any plan (${Math.round(file.size / 1e6)} MB)`;
    return;
  }
  const plan = planOf(await file.text());
  if (plan === null) {
    view.announcement.value = `${file.name} is no plan file: "format" is "legwork-plan/1" in one`;
    return;
  }
  store.open(plan, `Open ${file.name}`);
  view.announcement.value = `Opened ${file.name}`;
}

/** Hands the plan to the browser to keep as a file. */
export function savePlan({ store, view }: PageState): void {
  const plan = store.plan.value;
  const name = `${fileStem(plan.title ?? "plan")}.plan.json`;
  saveFile(name, `${JSON.stringify(plan, null, 2)}\n`, "application/json");
  store.markSaved();
  view.announcement.value = `Saved ${name}`;
}

export function saveFile(name: string, content: string, type: string): void {
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

function planOf(text: string): PlanDocument | null {
  let value: unknown;
  try {
    value = JSON.parse(text);
  } catch {
    return null;
  }
  return isPlan(value) ? value : null;
}

function isPlan(value: unknown): value is PlanDocument {
  return (
    typeof value === "object" &&
    value !== null &&
    "format" in value &&
    value.format === "legwork-plan/1" &&
    "routes" in value &&
    Array.isArray(value.routes)
  );
}
