import { effect } from "@preact/signals";
import { createStore, del, get, keys, set, setMany } from "idb-keyval";
import { openPlan } from "../shell/open-plan.ts";
import type { PageState } from "../state/page-state.ts";
import type { PlanDocument } from "../state/plan-document.ts";
import { writeBehind } from "./write-behind.ts";

/** A plan is written this long after the last change, ms: a drag is one write. */
const SETTLED = 300;
/** However long changes go on, no more than so much is lost in a crash, ms. */
const AT_MOST = 2000;
const PLAN = "plan";
/** Whether the plan kept is in no file yet. */
const UNSAVED = "unsaved";
const FILE = "file:";

/** Whether the device holds what the page shows. */
export interface Keeping {
  readonly safe: () => boolean;
  /** Writes what is not yet written; says whether the device now holds it all. */
  readonly flush: () => Promise<boolean>;
}

const database = () => createStore("legwork", "plan");

/** Brings back the plan that the device holds, with its files; says whether there was one. */
export async function restorePlan(page: PageState): Promise<boolean> {
  try {
    const store = database();
    const plan = await get<PlanDocument>(PLAN, store);
    if (plan === undefined) return false;
    const unsaved = await get<boolean>(UNSAVED, store);
    const opened = await openPlan(
      page,
      "the plan kept on this device",
      JSON.stringify(plan),
      async (name) => {
        const file = await get<Blob>(FILE + name, store);
        return file ?? null;
      },
    );
    if (opened && unsaved === true) page.store.markUnsaved();
    return opened;
  } catch {
    // A browser may deny the storage altogether; the page then begins as on a first visit.
    return false;
  }
}

/** Keeps the plan and its files on the device from now on. */
export function keepPlan(page: PageState): Keeping {
  const store = database();
  const kept = new Map<string, Blob>();
  let safe = true;
  let failed = false;

  const write = async (): Promise<void> => {
    const plan = page.store.plan.peek();
    const files = page.store.files.peek();
    const unsaved = page.store.unsaved.peek();
    try {
      for (const [name, content] of files) {
        if (kept.get(name) === content) continue;
        await set(FILE + name, content, store);
        kept.set(name, content);
      }
      // Together, so that a crash leaves either the plan before or the plan after.
      await setMany(
        [
          [PLAN, plan],
          [UNSAVED, unsaved],
        ],
        store,
      );
      await forgetUnnamed(plan);
      safe =
        plan === page.store.plan.peek() &&
        files === page.store.files.peek() &&
        unsaved === page.store.unsaved.peek();
      failed = false;
    } catch {
      safe = false;
      failed = true;
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
  const writing = writeBehind(write, SETTLED, AT_MOST);

  effect(() => {
    page.store.plan.value;
    page.store.unsaved.value;
    page.store.files.value;
    safe = false;
    writing.later();
  });
  // A page that is hidden may never be shown again.
  document.addEventListener("visibilitychange", () => {
    if (document.visibilityState === "hidden" && !safe) void writing.now();
  });
  return {
    safe: () => safe,
    async flush() {
      // What is changed while it is written is written again.
      while (!safe) {
        await writing.now();
        if (failed) return false;
      }
      return true;
    },
  };
}

/** Asks before the page is left while something is neither in a file nor on the device. */
export function warnBeforeLoss({ store }: PageState, { safe }: Keeping): void {
  window.addEventListener("beforeunload", (event) => {
    if (store.unsaved.peek() && !safe()) event.preventDefault();
  });
}

/** The names of the files that a plan refers to. */
function filesOf({ craft, fields = [] }: PlanDocument): string[] {
  const own = "file" in craft && typeof craft.file === "string" ? [craft.file] : [];
  return [...own, ...fields.map(({ file }) => file)];
}
