// @vitest-environment happy-dom
import { describe, expect, test } from "vitest";
import { checkPlan } from "../../src/plan/estimate-plan.ts";
import { windowPlan } from "../../src/plan/window-plan.ts";
import type { PlanDocument } from "../../web/state/plan-document.ts";
import { cellOrder, coarseToFine } from "../../web/window/fill-order.ts";
import { createWindowFill } from "../../web/window/window-fill.ts";
import { windowKey } from "../../web/window/window-plan.ts";
import { createDeciding, type Deciding } from "../../web/worker/deciding.ts";
import { bytesOfDemo, demoEngine } from "./demo-engine.ts";

const WINDOW = { from: "2027-05-04T08:00Z", to: "2027-05-04T13:00Z", every: "1 h" };

/** A hand that takes no more than a few cells at a time. */
function slowHand(deciding: Deciding, most: number) {
  return {
    beginWindow: deciding.beginWindow,
    windowSlice: async (ticket: number, indices: Int32Array, budget: number) =>
      deciding.windowSlice(ticket, indices.subarray(0, most), budget),
    windowBests: async (ticket: number, cells: Parameters<Deciding["windowBests"]>[1], refine: boolean) =>
      deciding.windowBests(ticket, cells, refine),
  };
}

function windowed(): { plan: PlanDocument; hand: (most: number) => ReturnType<typeof slowHand> } {
  const { plan, reader } = demoEngine("islands");
  return { plan: { ...plan, window: WINDOW }, hand: (most) => slowHand(createDeciding(reader), most) };
}

describe("the order in which a window fills", () => {
  test("is coarse first, then finer, and misses nothing", () => {
    expect(coarseToFine(6)).toEqual([0, 4, 2, 1, 3, 5]);
    for (const count of [0, 1, 2, 3, 17, 64]) {
      expect([...coarseToFine(count)].sort((a, b) => a - b)).toEqual([...Array(count).keys()]);
    }
  });

  test("takes all cells of a departure together", () => {
    expect([...cellOrder(3, 2)]).toEqual([0, 1, 4, 5, 2, 3]);
  });
});

describe("a window filled by two hands", () => {
  test("has the cells and the bests of the command, to the last bit", async () => {
    const { plan, hand } = windowed();
    const [first, second] = [hand(1), hand(3)];
    const fill = createWindowFill([() => first, () => second]);
    await fill.ask(plan);
    const own = await windowPlan(JSON.stringify(plan), { file: "islands.plan.json", open: bytesOfDemo });
    expect(fill.filled.value?.cells).toEqual(own.cells);
    expect(fill.filled.value?.bests?.summary).toEqual(own.summary);
    expect(fill.fault.value).toBeNull();
  });

  test("stops for a newer one, whose cells alone are shown", async () => {
    const { plan, hand } = windowed();
    const only = hand(1);
    const fill = createWindowFill([() => only]);
    const old = fill.ask(plan);
    const short = { ...plan, window: { ...WINDOW, to: "2027-05-04T09:00Z" } };
    await Promise.all([old, fill.ask(short)]);
    expect(fill.filled.value?.plan).toBe(short);
    expect(fill.filled.value?.cells.length).toBe(2 * plan.routes.length);
    expect(fill.filled.value?.cells.every((cell) => cell !== null)).toBe(true);
  });

  test("says in a sentence what is wrong with it", async () => {
    const { plan, hand } = windowed();
    const [first, second] = [hand(1), hand(1)];
    const fill = createWindowFill([() => first, () => second]);
    await fill.ask({ ...plan, window: { ...WINDOW, every: "1 furlong" } });
    expect(fill.fault.value).toContain("every");
    expect(fill.filled.value).toBeNull();
  });

  test("refines its bests to the minute when asked", async () => {
    const { plan, hand } = windowed();
    const only = hand(8);
    const fill = createWindowFill([() => only]);
    await fill.ask(plan);
    await fill.refine();
    const { input } = await checkPlan(JSON.stringify(plan), { file: "islands.plan.json", open: bytesOfDemo });
    const { summary, refined } = fill.filled.value?.bests ?? {};
    expect(input.routes.length).toBe(refined?.routes.length);
    expect(refined?.best.use?.use).toBeLessThanOrEqual(summary?.best.use?.use ?? 0);
  });
});

describe("what a window rests on", () => {
  test("stays the same under another departure, title or stated error, not under another pace", () => {
    const { plan } = windowed();
    const key = windowKey(plan, WINDOW, false);
    const fields = plan.fields?.map((field) => ({
      ...field,
      error: { speed: "1 m/s", length: "50 km", time: "6 h" },
    }));
    const same = { ...plan, title: "Other", departure: "2027-05-04T09:00Z", fields: fields ?? [] };
    expect(windowKey(same, WINDOW, false)).toBe(key);
    expect(windowKey({ ...plan, pace: { hold: "least-energy" } }, WINDOW, false)).not.toBe(key);
    expect(windowKey(plan, { ...WINDOW, every: "2 h" }, false)).not.toBe(key);
    expect(windowKey(plan, WINDOW, true)).not.toBe(key);
  });
});
