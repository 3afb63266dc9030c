import type { PageState } from "../state/page-state.ts";
import { openPlan } from "./open-plan.ts";

const LARGEST_PLAN = 5_000_000;

/** Opens the files that the user chose: a plan, and beside it the craft and the fields that it names. */
export async function openPlanFiles(page: PageState, files: readonly File[]): Promise<void> {
  const plan =
    files.find(({ name }) => name.endsWith(".plan.json")) ?? files.find(({ name }) => name.endsWith(".json"));
  if (plan === undefined) {
    page.view.announcement.value = "A plan is a file that ends in .plan.json";
    return;
  }
  if (plan.size > LARGEST_PLAN) {
    page.view.announcement.value = `${plan.name} is larger than any plan (${Math.round(plan.size / 1e6)} MB)`;
    return;
  }
  const byName = new Map(files.map((file) => [file.name, file]));
  await openPlan(
    page,
    plan.name,
    await plan.text(),
    async (file) => byName.get(file.split("/").at(-1) ?? file) ?? null,
  );
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
