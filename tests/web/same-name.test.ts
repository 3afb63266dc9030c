import { Blob as NodeBlob } from "node:buffer";
import { effect } from "@preact/signals";
import { afterEach, describe, expect, test } from "vitest";
import { takeFiles } from "../../web/files/take-files.ts";
import { giveFiles } from "../../web/shell/give-files.ts";
import { EMPTY_PLAN } from "../../web/state/empty-plan.ts";
import { createPageState, type Engine, type PageState } from "../../web/state/page-state.ts";
import { createEstimator } from "../../web/worker/estimator.ts";
import { previewField } from "../../web/worker/field-preview.ts";
import { createFieldShelf } from "../../web/worker/field-shelf.ts";
import { createFileShelf } from "../../web/worker/file-shelf.ts";
import { createLandShelf } from "../../web/worker/land-shelf.ts";
import { createPlanReader } from "../../web/worker/plan-reader.ts";

const PLAN = {
  format: "legwork-plan/1",
  departure: "2027-05-04T06:00:00Z",
  craft: {
    name: "Drone",
    moves: "air",
    speed: "10 m/s",
    power: { model: "constant", rate: "1 kW" },
    store: { capacity: "10 kWh" },
  },
  fields: [{ role: "wind", file: "wind.csv" }],
  routes: [
    {
      name: "East",
      path: "rhumb",
      waypoints: [
        { name: "A", lat: 0, lon: 0 },
        { name: "B", lat: 0, lon: 0.1 },
      ],
    },
  ],
};
/** 0.1° of the equator, m. */
const LENGTH = (0.1 * Math.PI * 6378137) / 180;

const file = (name: string, text: string): File => {
  const blob = new NodeBlob([text]) as unknown as File;
  return Object.defineProperty(blob, "name", { value: name });
};
/** A wind of so many m/s from the west. */
const wind = (u: number | string): File =>
  file("wind.csv", `lat,lon,u,v\n-1,-1,${u},0\n-1,1,${u},0\n1,-1,${u},0\n1,1,${u},0\n`);
const planFile = (name: string, more: object = {}): File =>
  file(`${name}.plan.json`, JSON.stringify({ ...PLAN, title: name, ...more }));

let stop: (() => void) | undefined;
afterEach(() => stop?.());

/** The page before its parts, with a worker's parts behind it and the effect that keeps its estimate new. */
function openPage(): PageState {
  const files = createFileShelf();
  const fields = createFieldShelf(files);
  const land = createLandShelf(() => Promise.reject(new Error("no land in this test")));
  const estimator = createEstimator(createPlanReader({ files, fields, land: land.finder }));
  const engine = {
    async keepFile(name: string, content: Blob) {
      files.keep(name, content);
      fields.forget(name);
    },
    openField: fields.open,
    estimate: estimator.estimate,
    preview: previewField,
  } as unknown as Engine;
  const page = createPageState(EMPTY_PLAN, engine);
  stop = effect(() => {
    giveFiles(page);
    void page.answers.ask(page.shown.value);
  });
  return page;
}

/** The speed of the wind by the estimate that is shown, once it settles. */
async function windShown({ answers, store }: PageState): Promise<number> {
  await expect.poll(() => [answers.working.value, answers.answer.value.fault]).toEqual([false, null]);
  const [route] = answers.answer.value.routes;
  expect(answers.answer.value.estimate?.plan.title).toBe(store.plan.value.title);
  return LENGTH / (route?.totals.time_s ?? Number.NaN) - 10;
}

describe("a file's name stands for the file that came with the plan", () => {
  test("after undo and redo between two plans that name theirs alike", async () => {
    const page = openPage();
    await takeFiles(page, [planFile("one"), wind(2)]);
    expect(await windShown(page)).toBeCloseTo(2, 6);
    await takeFiles(page, [planFile("two"), wind(5)]);
    expect(await windShown(page)).toBeCloseTo(5, 6);
    expect(page.inspections.value["wind.csv"]?.speed?.max).toBe(5);
    for (const expected of [2, 5, 2]) {
      if (expected === 2) page.store.undo();
      else page.store.redo();
      expect(await windShown(page)).toBeCloseTo(expected, 6);
      await expect.poll(() => page.inspections.value["wind.csv"]?.speed?.max).toBe(expected);
    }
  });

  test("after a file given anew under its name is undone, and given once more", async () => {
    const page = openPage();
    await takeFiles(page, [planFile("one"), wind(2)]);
    await takeFiles(page, [wind(-3)]);
    expect(await windShown(page)).toBeCloseTo(-3, 6);
    expect(page.store.undoLabel.value).toBe("Replace field file");
    page.store.undo();
    expect(await windShown(page)).toBeCloseTo(2, 6);
    await takeFiles(page, [wind(4)]);
    expect(await windShown(page)).toBeCloseTo(4, 6);
    page.store.undo();
    expect(await windShown(page)).toBeCloseTo(2, 6);
  });

  test("where the file given anew is none, and the plan is edited after that", async () => {
    const page = openPage();
    await takeFiles(page, [planFile("one"), wind(2)]);
    await windShown(page);
    await takeFiles(page, [wind("calm")]);
    expect(page.view.notice.value).toContain("wind.csv, line 2");
    page.store.edit("Title", (plan) => ({ ...plan, title: "still one" }));
    expect(await windShown(page)).toBeCloseTo(2, 6);
  });

  test("where craft files have one name", async () => {
    const page = openPage();
    const craft = (speed: string) => file("drone.craft.json", JSON.stringify({ ...PLAN.craft, speed }));
    const named = { craft: { file: "drone.craft.json" }, fields: [] };
    await takeFiles(page, [planFile("one", named), craft("12 m/s")]);
    await takeFiles(page, [planFile("two", named), craft("17 m/s")]);
    expect(await windShown(page)).toBeCloseTo(7, 6);
    page.store.undo();
    expect(await windShown(page)).toBeCloseTo(2, 6);
    await takeFiles(page, [craft("11 m/s")]);
    expect(await windShown(page)).toBeCloseTo(1, 6);
    page.store.undo();
    expect(await windShown(page)).toBeCloseTo(2, 6);
  });

  test("and a plan that comes without it takes the one that is here only with a word", async () => {
    const page = openPage();
    await takeFiles(page, [planFile("one"), wind(2)]);
    await takeFiles(page, [planFile("two")]);
    expect(page.view.notice.value).toBe(
      "wind.csv did not come with two.plan.json: the file of that name that was here is used",
    );
    expect(await windShown(page)).toBeCloseTo(2, 6);
  });
});
