import { writeFileSync } from "node:fs";
import { craftJsonSchema, planJsonSchema } from "../../src/plan/json-schema.ts";

// To write the committed schemas anew, from the project's root:
// node -e 'import("vite").then((vite) => vite.runnerImport("tests/schema/write-schema.ts")).then(({ module }) => module.writeSchemas())'

/** File name → schema, as committed. */
export function schemaFiles(): ReadonlyMap<string, string> {
  return new Map([
    ["data/schema/plan.schema.json", text("Plan file of Legwork", planJsonSchema())],
    ["data/schema/craft.schema.json", text("Craft file of Legwork", craftJsonSchema())],
  ]);
}

function text(title: string, schema: object): string {
  const { $schema, ...rest } = schema as { $schema?: string };
  return `${JSON.stringify({ $schema, title, ...rest }, null, 2)}\n`;
}

/** Writes the schema files. */
export function writeSchemas(): void {
  for (const [file, content] of schemaFiles()) writeFileSync(file, content);
}
