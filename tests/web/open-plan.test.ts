import { readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { openPlan } from "../../web/shell/open-plan.ts";
import { EMPTY_PLAN } from "../../web/state/empty-plan.ts";
import { createPageState, type Engine, type PageState } from "../../web/state/page-state.ts";

const demo = (name: string): string =>
  readFileSync(new URL(`../../data/demo/${name}`, import.meta.url), "utf8");

function emptyPage(): PageState {
  const engine = { keepFile: async () => {} } as unknown as Engine;
  return createPageState(EMPTY_PLAN, engine);
}

/** Opens a demo with its craft file and without its fields. */
async function open(page: PageState, name: "survey" | "ocean"): Promise<void> {
  const plan = { ...JSON.parse(demo(`${name}.plan.json`)), fields: [] };
  await openPlan(page, name, JSON.stringify(plan), async (file) => new Blob([demo(file)]));
}

describe("the units of a plan that is opened", () => {
  test("are those of its craft: air in the air, sea on the water", async () => {
    const page = emptyPage();
    await open(page, "survey");
    expect(page.view.units.value).toBe("air");
    await open(page, "ocean");
    expect(page.view.units.value).toBe("sea");
  });

  test("are those of a craft within the plan alike", async () => {
    const page = emptyPage();
    const plan = { ...EMPTY_PLAN, craft: { moves: "air" } };
    await openPlan(page, "own", JSON.stringify(plan), async () => null);
    expect(page.view.units.value).toBe("air");
  });

  test("stay as they are once the user chose some, or where the craft's file is missing or no craft", async () => {
    const chosen = emptyPage();
    chosen.view.units.value = "metric";
    chosen.view.unitsChosen.value = true;
    await open(chosen, "survey");
    expect(chosen.view.units.value).toBe("metric");
    for (const content of [null, new Blob(["no craft"])]) {
      const page = emptyPage();
      page.view.units.value = "air";
      const plan = { ...EMPTY_PLAN, craft: { file: "lost.craft.json" } };
      await openPlan(page, "own", JSON.stringify(plan), async () => content);
      expect(page.view.units.value).toBe("air");
    }
  });
});
