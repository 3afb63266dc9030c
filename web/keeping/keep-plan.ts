import { effect } from "@preact/signals";
import { createStore, del, get, keys, set } from "idb-keyval";
import { openPlan } from "../shell/open-plan.ts";
import type { PageState } from "../state/page-state.ts";
import type { PlanDocument } from "../state/plan-document.ts";

/** A plan is written this long after the last change, ms: a drag is one write. */
const SETTLED = 400;
const PLAN = "plan";
const FILE = "file:";

/** Whether the device holds what the page shows. */
export interface Keeping {
  readonly safe: () => boolean;
}

const database = () => createStore("legwork", "plan");

/** Brings back the plan that the device holds, with its files; says whether there was one. */
export async function restorePlan(page: PageState): Promise<boolean> {
  try {
    const store = database();
    const plan = await get<PlanDocument>(PLAN, store);
    if (plan === undefined) return false;
    return await openPlan(page, "the plan kept on this device", JSON.stringify(plan), async (name) => {
      const file = await get<Blob>(FILE + name, store);
      return file ?? null;
    });
  } catch {
    // A browser may deny the storage altogether; the page then begins as on a first visit.
    return false;
  }
}

/** Keeps the plan and its files on the device from now on. */
export function keepPlan(page: PageState): Keeping {
  const store = database();
  let waiting: ReturnType<typeof setTimeout> | undefined;
  let safe = true;
  const kept = new Map<string, Blob>();

  const write = async (): Promise<void> => {
    try {
      const plan = page.store.plan.peek();
      for (const [name, content] of page.files.peek()) {
        if (kept.get(name) === content) continue;
        await set(FILE + name, content, store);
        kept.set(name, content);
      }
      await set(PLAN, plan, store);
      await forgetUnnamed(plan);
      safe = plan === page.store.plan.peek();
    } catch {
      safe = false;
    }
  };
  const forgetUnnamed = async (plan: PlanDocument): Promise<void> => {
    const named = new Set(filesOf(plan).map((name) => FILE + name));
    for (const key of await keys<string>(store)) {
      if (!key.startsWith(FILE) || named.has(key)) continue;
      await del(key, store);
      kept.delete(key.slice(FILE.length));
    }
  };

  effect(() => {
    page.store.plan.value;
    page.files.value;
    safe = false;
    clearTimeout(waiting);
    waiting = setTimeout(() => void write(), SETTLED);
  });
  // A page that is hidden may never be shown again.
  document.addEventListener("visibilitychange", () => {
    if (document.visibilityState === "hidden" && !safe) void write();
  });
  return { safe: () => safe };
}

/** Asks before the page is left while something is neither in a file nor on the device. */
export function warnBeforeLoss({ store }: PageState, { safe }: Keeping): void {
  window.addEventListener("beforeunload", (event) => {
    if (store.unsaved.peek() && !safe()) event.preventDefault();
  });
}

/** The names of the files that a plan refers to. */
export function filesOf({ craft, fields = [] }: PlanDocument): string[] {
  const own = "file" in craft && typeof craft.file === "string" ? [craft.file] : [];
  return [...own, ...fields.map(({ file }) => file)];
}
