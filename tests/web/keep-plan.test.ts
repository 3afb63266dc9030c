// @vitest-environment happy-dom
import { setMany } from "idb-keyval";
import { beforeEach, expect, test, vi } from "vitest";
import { keepPlan } from "../../web/keeping/keep-plan.ts";
import { EMPTY_PLAN } from "../../web/state/empty-plan.ts";
import { createPageState, type Engine } from "../../web/state/page-state.ts";

vi.mock("idb-keyval", () => ({
  createStore: () => null,
  del: async () => undefined,
  get: async () => undefined,
  keys: async () => [],
  set: async () => undefined,
  setMany: vi.fn(),
}));

const write = vi.mocked(setMany);

beforeEach(() => void write.mockReset());

/** An empty plan that is kept on the device, and what renames it. */
function keptPlan() {
  const page = createPageState(EMPTY_PLAN, {} as Engine);
  const rename = (title: string): void => page.store.edit("Rename", (plan) => ({ ...plan, title }));
  return { page, rename, keeping: keepPlan(page) };
}

/** The titles that were written, in turn. */
const written = () => write.mock.calls.map(([[plan]]) => Reflect.get(Object(plan?.[1]), "title"));

test("what is changed while the plan is written is written again before it counts as kept", async () => {
  const { rename, keeping } = keptPlan();
  write.mockImplementationOnce(async () => rename("second"));
  rename("first");
  expect(await keeping.flush()).toBe(true);
  expect(written()).toEqual(["first", "second"]);
  expect(keeping.safe()).toBe(true);
});

test("whether the plan is in a file is part of what is kept", async () => {
  const { page, rename, keeping } = keptPlan();
  rename("in a file");
  write.mockImplementationOnce(async () => page.store.markSaved());
  expect(await keeping.flush()).toBe(true);
  expect(write.mock.calls.map(([[, unsaved]]) => unsaved?.[1])).toEqual([true, false]);
});

test("a device that refuses is said not to hold the plan, and asked again at the next call", async () => {
  const { rename, keeping } = keptPlan();
  write.mockRejectedValueOnce(new Error("the disk is full"));
  rename("too much");
  expect(await keeping.flush()).toBe(false);
  expect(await keeping.flush()).toBe(true);
});
