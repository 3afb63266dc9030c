import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, test } from "vitest";
import * as surface from "../src/index.ts";
import { readCraft } from "../src/plan/read-craft.ts";
import { readPlanDocument } from "../src/plan/read-plan.ts";

const root = new URL("..", import.meta.url).pathname;

/** An `@example` in the docstring of an exported name. */
interface Example {
  readonly file: string;
  readonly name: string;
  readonly code: string;
}

function sources(folder: string): string[] {
  return readdirSync(join(root, folder), { withFileTypes: true }).flatMap((entry) => {
    const path = `${folder}/${entry.name}`;
    if (entry.isDirectory()) return sources(path);
    return entry.name.endsWith(".ts") && !entry.name.endsWith(".d.ts") ? [path] : [];
  });
}

const DOCUMENTED =
  /\/\*\*((?:(?!\*\/)[\s\S])*)\*\/\s*export (?:async )?(?:function\*?|const|class|interface) (\w+)/g;

function examplesOf(file: string): Example[] {
  const text = readFileSync(join(root, file), "utf8");
  return [...text.matchAll(DOCUMENTED)].flatMap(([, comment = "", name = ""]) => {
    const lines = comment.split("\n").map((line) => line.replace(/^\s*\*? ?/, ""));
    const at = lines.findIndex((line) => line.startsWith("@example"));
    if (at < 0) return [];
    const rest = lines.slice(at + 1);
    const end = rest.findIndex((line) => line.startsWith("@"));
    const code = (end < 0 ? rest : rest.slice(0, end))
      .filter((line) => !line.startsWith("```"))
      .join("\n")
      .trim();
    return [{ file, name, code }];
  });
}

const examples = sources("src").flatMap(examplesOf);

/** An expression of an example with what comes before it, and the value that it tells. */
interface Told {
  readonly before: string;
  readonly expression: string;
  readonly told: string;
}

/** Statements, then an expression whose value stands behind `// →`; more of both may follow. */
function toldIn({ code }: Example): Told[] {
  const before: string[] = [];
  return [...code.matchAll(/([\s\S]*?)\/\/ →([^\n]*)(?:\n|$)/g)].map(([, part = "", told = ""]) => {
    const lines = part.trim().replace(/;$/, "").split("\n");
    const last = lines.findLastIndex((line) => /^\S/.test(line) && !/^[)\]}.]/.test(line));
    before.push(...lines.slice(0, last));
    return { before: before.join("\n"), expression: lines.slice(last).join("\n"), told: told.trim() };
  });
}

async function evaluated({ before, expression }: Told, file: string): Promise<unknown> {
  const own = (await import(join(root, file))) as Record<string, unknown>;
  const scope: Record<string, unknown> = { ...surface, ...own };
  const Async = Object.getPrototypeOf(async () => undefined).constructor as new (
    ...parts: string[]
  ) => (...values: unknown[]) => Promise<unknown>;
  return new Async(...Object.keys(scope), `${before}\nreturn (${expression}\n);`)(...Object.values(scope));
}

/** Numbers agree to the digits that are shown. */
function agrees(value: unknown, told: unknown, text: string): boolean {
  if (typeof told === "number" && typeof value === "number") {
    const shown = Math.max(0, ...[...text.matchAll(/\.(\d+)/g)].map(([, digits = ""]) => digits.length));
    return Math.abs(value - told) <= 0.5 * 10 ** -shown + 1e-9 * Math.abs(told);
  }
  if (told !== null && typeof told === "object" && value !== null && typeof value === "object") {
    const list = ArrayBuffer.isView(value) ? Array.from(value as unknown as number[]) : value;
    return Object.entries(told).every(([key, part]) =>
      agrees((list as Record<string, unknown>)[key], part, text),
    );
  }
  return Object.is(value, told);
}

describe("the examples in the docstrings", () => {
  test.each(examples.map((example) => [`${example.name} (${example.file})`, example] as const))(
    "%s",
    async (_, example) => {
      const all = toldIn(example);
      expect(all.length, "an example tells a value behind // →").toBeGreaterThan(0);
      for (const one of all) {
        const value = await evaluated(one, example.file);
        const expected: unknown = new Function(`return (${one.told});`)();
        expect(agrees(value, expected, one.told), `${one.expression} is ${JSON.stringify(value)}`).toBe(true);
      }
    },
  );

  test("there is one for every public function", () => {
    const shown = new Set(examples.map(({ name }) => name));
    const missing = Object.entries(surface)
      .filter(
        ([name, value]) => typeof value === "function" && !/^class\s/.test(String(value)) && !shown.has(name),
      )
      .map(([name]) => name);
    expect(missing).toEqual([]);
  });
});

describe("README", () => {
  const readme = readFileSync(join(root, "README.md"), "utf8");
  const blocks = [...readme.matchAll(/```json\n([\s\S]*?)```/g)].map(([, json = ""]) => json);

  test("its plan and its craft are read by the code", async () => {
    const craft = blocks.find((block) => block.includes('"moves"')) ?? "";
    const plan = blocks.find((block) => block.includes("legwork-plan/1")) ?? "";
    expect(readCraft(craft).name).toBe("Nine-metre tender");
    const open = async function* () {
      yield new TextEncoder().encode(craft);
    };
    expect((await readPlanDocument(JSON.parse(plan), { open })).routes).toHaveLength(1);
  });

  test("names only npm scripts and files that are there", () => {
    const text = readme + readFileSync(join(root, "DEVELOPERS.md"), "utf8");
    const { scripts } = JSON.parse(readFileSync(join(root, "package.json"), "utf8")) as {
      scripts: Record<string, string>;
    };
    const named = [...text.matchAll(/npm run ([\w:]+)/g)].map(([, script = ""]) => script);
    expect(named.filter((script) => scripts[script] === undefined)).toEqual([]);
    const files = [...text.matchAll(/`((?:src|tests|data|web|\.ci)\/[\w./-]+\.\w+)`/g)].map(
      ([, file = ""]) => file,
    );
    expect(files.filter((file) => !exists(file))).toEqual([]);
  });
});

function exists(file: string): boolean {
  try {
    readFileSync(join(root, file));
    return true;
  } catch {
    return false;
  }
}
