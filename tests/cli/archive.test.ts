import { mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { strToU8, zipSync } from "fflate";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { readArchive, writeArchive } from "../../src/index.ts";
import type { PlanDocument } from "../../src/plan/plan-schema.ts";
import { type BuiltCommand, builtCommand } from "./built-command.ts";

let legwork: BuiltCommand;
let folder: string;
let demo: string;
let archive: string;

beforeAll(async () => {
  legwork = await builtCommand();
  folder = mkdtempSync(join(tmpdir(), "legwork-"));
  demo = join(folder, "demo");
  legwork.run(["demo", demo]);
  archive = join(folder, "islands.legwork.zip");
  const plan = JSON.parse(readFileSync(join(demo, "islands.plan.json"), "utf8")) as PlanDocument;
  writeFileSync(
    archive,
    writeArchive(plan, "islands", (name) => readFileSync(join(demo, name))),
  );
}, 60_000);

afterAll(() => {
  legwork.remove();
  rmSync(folder, { recursive: true, force: true });
});

describe("an archive in place of a plan", () => {
  it("is estimated as the plan with its files beside it, byte for byte", () => {
    const beside = legwork.run(["estimate", join(demo, "islands.plan.json"), "--format", "json"]);
    const packed = legwork.run(["estimate", archive, "--format", "json"]);
    expect(packed.out).toBe(beside.out);
    expect(packed.status).toBe(beside.status);
    expect(JSON.parse(packed.out).format).toBe("legwork-estimate/1");
  });

  it("is checked", () => {
    expect(legwork.run(["check", archive])).toMatchObject({ status: 0, err: "" });
  });

  it("is refused in one line where a file is missing, or where it is no whole archive", () => {
    const { plan } = readArchive(readFileSync(archive), archive);
    const bare = join(folder, "bare.legwork.zip");
    for (const [bytes, message] of [
      [
        zipSync({ [plan.name]: strToU8(plan.text) }),
        "the archive holds every file that its plan names; found no ",
      ],
      [
        readFileSync(archive).subarray(0, -40),
        "an archive is a whole ZIP file; found one that can't be unpacked",
      ],
    ] as const) {
      writeFileSync(bare, bytes);
      const { status, out, err } = legwork.run(["check", bare]);
      expect([status, out]).toEqual([2, ""]);
      expect(err).toContain(message);
      expect(err.trimEnd().split("\n")).toHaveLength(1);
    }
  });
});
