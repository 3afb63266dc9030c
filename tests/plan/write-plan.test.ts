import { readdirSync, readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import type { PlanDocument } from "../../src/plan/plan-schema.ts";
import { serializeCraft, serializePlan } from "../../src/plan/write-plan.ts";
import { CUBE, changed, read, SUPPLY_RUN, TENDER, WING } from "./documents.ts";

/** A deep copy with the keys of every object in the opposite order. */
function reversed(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(reversed);
  if (typeof value !== "object" || value === null) return value;
  return Object.fromEntries(
    Object.entries(value)
      .reverse()
      .map(([key, item]) => [key, reversed(item)]),
  );
}

describe("a plan written", () => {
  test("is the same document when read back, as the user wrote it", () => {
    expect(JSON.parse(serializePlan(SUPPLY_RUN))).toEqual(SUPPLY_RUN);
    expect(JSON.parse(serializeCraft(TENDER))).toEqual(TENDER);
  });

  test("is the same plan when read back", async () => {
    const again = JSON.parse(serializePlan(SUPPLY_RUN));
    expect(JSON.stringify(await read(again))).toBe(JSON.stringify(await read(SUPPLY_RUN)));
  });

  test("has the same bytes whatever the order of its keys", () => {
    expect(serializePlan(reversed(SUPPLY_RUN) as PlanDocument)).toBe(serializePlan(SUPPLY_RUN));
    for (const power of [TENDER.power, CUBE, WING, { model: "constant", rate: "1 kW" } as const]) {
      const craft = { ...TENDER, power };
      expect(serializeCraft(reversed(craft) as typeof craft)).toBe(serializeCraft(craft));
    }
  });

  test("has its keys in the order of the schema, one waypoint a line", () => {
    const text = serializePlan(SUPPLY_RUN);
    expect(text.endsWith("}\n")).toBe(true);
    expect(Object.keys(JSON.parse(text))).toEqual([
      "format",
      "title",
      "departure",
      "craft",
      "pace",
      "reserve",
      "fields",
      "routes",
    ]);
    expect(text).toContain('        { "name": "Quay", "lat": 58.1032, "lon": -6.3871 },\n');
  });

  test("leaves out keys that are undefined", () => {
    const plan = { ...SUPPLY_RUN, title: undefined, reserve: undefined };
    expect(JSON.parse(serializePlan(plan))).toEqual(
      changed(SUPPLY_RUN, ["title", undefined], ["reserve", undefined]),
    );
  });

  test("writes a craft's file as the plan names it", () => {
    const plan = { ...SUPPLY_RUN, craft: { file: "tender.craft.json" } };
    expect(serializePlan(plan)).toContain('  "craft": { "file": "tender.craft.json" },\n');
  });

  test.each(readdirSync("data/demo").filter((name) => name.endsWith(".plan.json")))(
    "keeps %s of the demo",
    (name) => {
      const document = JSON.parse(readFileSync(`data/demo/${name}`, "utf8"));
      expect(JSON.parse(serializePlan(document))).toEqual(document);
    },
  );
});
