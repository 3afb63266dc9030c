import { mkdtempSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, expect, it } from "vitest";
import { type BuiltCommand, builtCommand } from "./built-command.ts";

let legwork: BuiltCommand;
let folder: string;

beforeAll(async () => {
  legwork = await builtCommand();
  folder = mkdtempSync(join(tmpdir(), "legwork-readme-"));
  legwork.run(["demo", join(folder, "demo")]);
}, 60_000);

afterAll(() => {
  legwork.remove();
  rmSync(folder, { recursive: true, force: true });
});

it("the README's excerpts are lines that the commands named there write, in their order", () => {
  const readme = readFileSync(new URL("../../README.md", import.meta.url), "utf8");
  const excerpts = [...readme.matchAll(/```text\n([\s\S]*?)```/g)].map(([, text = ""]) => text);
  const commands = [...readme.matchAll(/`npx legwork ((?:estimate|window) demo\/[\w-]+\.plan\.json)`/g)].map(
    ([, words = ""]) => words.split(" "),
  );
  expect(commands).toHaveLength(3);
  expect(excerpts).toHaveLength(3);
  for (const [n, [command = "", plan = ""]] of commands.entries()) {
    const { out, err } = legwork.run([command, join(folder, plan)]);
    expect(err).toBe("");
    const lines = out.split("\n");
    let place = 0;
    for (const line of (excerpts[n] ?? "").split("\n").filter((each) => each !== "")) {
      const found = lines.indexOf(line, place);
      expect(found, line).toBeGreaterThanOrEqual(0);
      place = found + 1;
    }
  }
});
