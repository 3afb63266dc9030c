import { readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { schemaFiles } from "./write-schema.ts";

describe("the JSON schemas of the files", () => {
  test.each([...schemaFiles()])("the committed %s is what the code generates", (file, content) => {
    expect(readFileSync(file, "utf8")).toBe(content);
  });

  test("a quantity's pattern takes every unit of the dimension and no bare number", () => {
    const schema = JSON.parse(schemaFiles().get("data/schema/craft.schema.json") ?? "");
    const pattern = new RegExp(schema.properties.speed.pattern, "u");
    for (const text of ["12 kn", "12kn", "6.1 m/s", "1e1 km/h", "100 ft/min"]) expect(text).toMatch(pattern);
    for (const text of ["12", "12 KN", "kn", "1,5 kn", "12 kg"]) expect(text).not.toMatch(pattern);
  });

  test("required keys are those of the contract", () => {
    const plan = JSON.parse(schemaFiles().get("data/schema/plan.schema.json") ?? "");
    expect(plan.required).toEqual(["format", "departure", "craft", "routes"]);
    const craft = JSON.parse(schemaFiles().get("data/schema/craft.schema.json") ?? "");
    expect(craft.required).toEqual(["name", "moves", "power", "store"]);
  });
});
