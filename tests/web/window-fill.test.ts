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
    windowSure: async (...asked: Parameters<Deciding["windowSure"]>) => deciding.windowSure(...asked),
  };
}

function windowed(demo: "islands" | "islands-decide" = "islands"): {
  plan: PlanDocument;
  hand: (most: number) => ReturnType<typeof slowHand>;
} {
  const { plan, reader } = demoEngine(demo);
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
    expect(fill.fault.value).toMatch(/^"Every" of the departures takes a number/);
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

describe("a window of a plan with members, what-ifs and a stated error", () => {
  const own = (plan: PlanDocument, refine: boolean) =>
    windowPlan(JSON.stringify(plan), { file: "islands.plan.json", open: bytesOfDemo, refine });

  test("has its bests put to the test as the command does, to the last bit, and to the minute too", async () => {
    const { plan, hand } = windowed("islands-decide");
    const [first, second] = [hand(4), hand(4)];
    const fill = createWindowFill([() => first, () => second]);
    await fill.ask(plan);
    expect(fill.filled.value?.sure).toEqual((await own(plan, false)).sure);
    await fill.refine();
    expect(fill.filled.value?.sure).toEqual((await own(plan, true)).sure);
  });

  test("is not tried where the plan names nothing to do so with", async () => {
    const { plan, hand } = windowed();
    const only = hand(8);
    let asked = 0;
    const counting = {
      ...only,
      windowSure: async (...question: Parameters<Deciding["windowSure"]>) => {
        asked += 1;
        return only.windowSure(...question);
      },
    };
    const fill = createWindowFill([() => counting]);
    await fill.ask(plan);
    expect([fill.filled.value?.shape.tried, fill.filled.value?.sure, asked]).toEqual([false, null, 0]);
  });

  test("is no longer tried once another is asked for", async () => {
    const { plan, hand } = windowed("islands-decide");
    const only = hand(8);
    const answers: number[] = [];
    let begun: () => void = () => undefined;
    const first = new Promise<void>((resolve) => {
      begun = resolve;
    });
    const slow = {
      ...only,
      windowSure: async (
        ticket: number,
        question: Parameters<Deciding["windowSure"]>[1],
        _budget: number,
      ) => {
        answers.push(ticket);
        begun();
        // One step at a time.
        return only.windowSure(ticket, question, 0);
      },
    };
    const fill = createWindowFill([() => slow]);
    const old = fill.ask(plan);
    await first;
    const short = { ...plan, window: { ...WINDOW, from: "2027-05-04T15:00Z", to: "2027-05-04T16:00Z" } };
    await Promise.all([old, fill.ask(short)]);
    const last = answers.at(-1);
    expect(answers.filter((ticket) => ticket !== last).length).toBeLessThan(3);
    expect(fill.filled.value?.plan).toBe(short);
    expect(fill.filled.value?.sure).toEqual((await own(short, false)).sure);
  });

  test("says in a sentence which what-if cannot be tried", async () => {
    const { plan, hand } = windowed("islands-decide");
    const only = hand(8);
    const fill = createWindowFill([() => only]);
    await fill.ask({ ...plan, whatIf: [{ name: "Faster", speed: "20 kn" }] });
    expect(fill.filled.value?.sure).toBeNull();
    expect(fill.filled.value?.sureFault).toMatch(/^the what-if "Faster" keeps the speed above 0 and within/);
    expect(fill.filled.value?.bests).not.toBeNull();
  });
});

describe("what a window rests on", () => {
  test("stays the same under another departure, title or alternate, not under another pace, error or what-if", () => {
    const { plan } = windowed();
    const key = windowKey(plan, WINDOW, false);
    const fields = plan.fields?.map((field) => ({
      ...field,
      error: { speed: "1 m/s", length: "50 km", time: "6 h" },
    }));
    const alternates = [{ name: "Quay", lat: 53.5, lon: -13.6 }];
    const same = { ...plan, title: "Other", departure: "2027-05-04T09:00Z", alternates };
    expect(windowKey(same, WINDOW, false)).toBe(key);
    expect(windowKey({ ...plan, fields: fields ?? [] }, WINDOW, false)).not.toBe(key);
    expect(windowKey({ ...plan, whatIf: [{ late: "1 h" }] }, WINDOW, false)).not.toBe(key);
    expect(windowKey({ ...plan, pace: { hold: "least-energy" } }, WINDOW, false)).not.toBe(key);
    expect(windowKey(plan, { ...WINDOW, every: "2 h" }, false)).not.toBe(key);
    expect(windowKey(plan, WINDOW, true)).not.toBe(key);
  });
});
