import {
  chmodSync,
  linkSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  statSync,
  symlinkSync,
  writeFileSync,
} from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { InputError } from "../../src/cli/core.ts";
import { fileFault } from "../../src/cli/file-fault.ts";
import { messageLine } from "../../src/cli/message.ts";
import { writeResult } from "../../src/cli/output.ts";

let folder: string;
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), "legwork-out-"));
});
afterEach(() => rmSync(folder, { recursive: true, force: true }));

describe("--out", () => {
  it("makes a file, replaces one with its mode kept, and leaves no draft behind", async () => {
    const file = join(folder, "legs.csv");
    await writeResult("one", file);
    expect(readFileSync(file, "utf8")).toBe("one");
    chmodSync(file, 0o640);
    await writeResult("two", file);
    expect(readFileSync(file, "utf8")).toBe("two");
    expect(statSync(file).mode & 0o777).toBe(0o640);
    expect(readdirSync(folder)).toEqual(["legs.csv"]);
  });

  it("writes through a symbolic link to the file behind it", async () => {
    mkdirSync(join(folder, "real"));
    writeFileSync(join(folder, "real", "x"), "old");
    symlinkSync(join("real", "x"), join(folder, "link"));
    await writeResult("new", join(folder, "link"));
    expect(readFileSync(join(folder, "real", "x"), "utf8")).toBe("new");
    expect(readdirSync(folder).sort()).toEqual(["link", "real"]);
  });

  it("writes to a device without replacing it", async () => {
    await writeResult("gone", "/dev/null");
    expect(statSync("/dev/null").isCharacterDevice()).toBe(true);
  });

  it("refuses a file that the answer is made from, by whatever name, and leaves it alone", async () => {
    const plan = join(folder, "plan.json");
    writeFileSync(plan, "plan");
    symlinkSync("plan.json", join(folder, "link"));
    linkSync(plan, join(folder, "hard"));
    for (const name of ["plan.json", "link", "hard"]) {
      const file = join(folder, name);
      await expect(writeResult("x", file, ["/dev/null", plan])).rejects.toThrow(
        `${file}: --out names a file of its own; found one that the answer is made from`,
      );
    }
    expect(readFileSync(plan, "utf8")).toBe("plan");
    await writeResult("x", join(folder, "legs.csv"), [join(folder, "gone"), plan]);
    expect(readFileSync(join(folder, "legs.csv"), "utf8")).toBe("x");
  });

  it("refuses an empty name", async () => {
    await expect(writeResult("x", "")).rejects.toThrow('--out names a file; found ""');
  });

  it("refuses a folder, and a folder that is not there, in one sentence", async () => {
    await expect(writeResult("x", folder)).rejects.toThrow(`${folder}: --out names a file; found a folder`);
    const nowhere = join(folder, "nowhere", "x");
    await expect(writeResult("x", nowhere)).rejects.toThrow(
      `${nowhere}: the folder to write it in does not exist`,
    );
    await expect(writeResult("x", nowhere)).rejects.toBeInstanceOf(InputError);
    expect(readdirSync(folder)).toEqual([]);
  });
});

describe("a fault of the file system", () => {
  it("becomes a sentence with the file's name", () => {
    const fault = Object.assign(new Error("EIO: i/o error, read"), { code: "EIO", syscall: "read" });
    expect(fileFault(fault, "a.csv")).toMatchObject({
      name: "InputError",
      message: "a.csv: the system answers EIO",
    });
  });
  it("is told from a defect, which stays as it is", () => {
    const defect = new TypeError("x is not a function");
    expect(fileFault(defect, "a.csv")).toBe(defect);
  });
});

describe("a message", () => {
  it("is one line without controls, cut at 1,500 characters", () => {
    expect(messageLine("a\n b\u001b[2J\u2028c")).toBe("legwork: a b [2J c\n");
    const long = messageLine("🚤".repeat(2000));
    expect(long.length).toBeLessThanOrEqual(1501);
    expect(long).not.toMatch(/[\uD800-\uDBFF](?![\uDC00-\uDFFF])/);
    expect(long.endsWith("…\n")).toBe(true);
  });
});
