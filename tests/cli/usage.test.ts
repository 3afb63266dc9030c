import { spawnSync } from "node:child_process";
import {
  accessSync,
  constants,
  existsSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  writeFileSync,
} from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { ADVISORY } from "../../src/constants.ts";
import { type BuiltCommand, builtCommand } from "./built-command.ts";

let legwork: BuiltCommand;
let folder: string;

beforeAll(async () => {
  legwork = await builtCommand();
  folder = mkdtempSync(join(tmpdir(), "legwork-"));
}, 60_000);

afterAll(() => {
  legwork.remove();
  rmSync(folder, { recursive: true, force: true });
});

describe("help and version", () => {
  for (const args of [
    ["--help"],
    ["estimate", "--help"],
    ["inspect", "--help"],
    ["check", "--help"],
    ["demo", "--help"],
  ]) {
    it(`legwork ${args.join(" ")} fits 80 columns, with examples and the advisory`, () => {
      const { status, out, err } = legwork.run(args);
      expect(status).toBe(0);
      expect(err).toBe("");
      for (const line of out.split("\n")) expect(line.length, line).toBeLessThanOrEqual(80);
      expect(out).toMatch(/^Examples:\n {2}legwork /m);
      expect(out.replace(/\n/g, " ")).toContain(ADVISORY);
    });
  }

  it("the version is that of the package", () => {
    const { version } = JSON.parse(readFileSync(new URL("../../package.json", import.meta.url), "utf8"));
    expect(legwork.run(["--version"])).toEqual({ status: 0, out: `${version}\n`, err: "" });
  });

  it("the built file has its run bit and its interpreter", () => {
    accessSync(legwork.file, constants.X_OK);
    expect(readFileSync(legwork.file, "utf8").startsWith("#!/usr/bin/env node\n")).toBe(true);
  });
});

describe("a fault of usage", () => {
  const faults: readonly [args: readonly string[], message: string][] = [
    [[], "a command is needed: estimate, window, inspect, check or demo"],
    [["estmate", "x"], "unknown command 'estmate' (Did you mean estimate?)"],
    [["frobnicate"], "the command is estimate, window, inspect, check or demo"],
    [["--versoin"], "(Did you mean --version?)"],
    [["estimate"], "missing required argument 'plan'"],
    [["estimate", "a", "b"], "legwork: estimate takes 1 argument; found 2; see legwork --help"],
    [["estimate", "x", "--fomat", "csv"], "unknown option '--fomat' (Did you mean --format?)"],
    [
      ["estimate", "x", "--format", "xml"],
      'legwork: --format takes one of table, csv, json, geojson, gpx; found "xml"; see legwork --help',
    ],
    [["estimate", "x", "--units", "imperial"], '--units takes one of sea, air, metric; found "imperial"'],
    [["estimate", "x", "--units", ""], '--units takes one of sea, air, metric; found ""'],
    [["estimate", "x", "--units", "sea", "--units=air"], '--units is given once; found "sea" and "air"'],
    [
      ["estimate", "x", "--format", "csv", "--format", "csv"],
      '--format is given once; found "csv" and "csv"',
    ],
    [["estimate", "x", "--out", "a", "--out", "b"], '--out is given once; found "a" and "b"'],
    [["estimate", "x", "--out", "--turn-back"], "--out takes a value; found the option --turn-back"],
    [["estimate", "x", "--route", "--out", "a"], "--route takes a value; found the option --out"],
    [["estimate", "x", "--route"], "--route takes a value (name); found nothing"],
    [["estimate", "x", "--departure"], "--departure takes a value (time); found nothing"],
    [["estimate", "x", "--departure", "noon"], "--departure takes an ISO 8601 date and time"],
    [["window", "x", "--speeds", "8kn", "--speeds", "9kn"], '--speeds is given once; found "8kn" and "9kn"'],
    [["window", "x", "--every"], "--every takes a value (step); found nothing"],
    [["window", "x", "--refine=no"], "unknown option '--refine=no'"],
    [["inspect", "x.csv", "--role", "rain"], '--role takes one of wind, current; found "rain"'],
    [["inspect", "x.csv", "--map"], "--map takes a value (axis=header); found nothing"],
    [["inspect", "x.csv", "--map", "lon= "], '--map is AXIS=HEADER, as lon=longitude; found "lon= "'],
    [["inspect", "x.csv", "--map", "lon=x", "--map", "lon=y"], '--map names an axis once; found "lon" twice'],
    [["inspect", "x.csv", "--map", "lon"], '--map is AXIS=HEADER, as lon=longitude; found "lon"'],
    [["inspect", "x.csv", "--map", "=x"], '--map is AXIS=HEADER, as lon=longitude; found "=x"'],
    [["inspect", ""], 'legwork: <field> names a file; found ""; see legwork --help'],
    [["estimate", ""], 'legwork: <plan> names a file; found ""; see legwork --help'],
    [["window", " "], "<plan> names a file; found"],
    [["check", ""], '<plan> names a file; found ""'],
    [["demo", ""], '<folder> names a folder; found ""'],
    [["check"], "missing required argument 'plan'"],
    [["demo"], "missing required argument 'folder'"],
    [["estimate", "nowhere/x.plan.json"], "nowhere/x.plan.json: there is no such file"],
    [["estimate", "."], ".: a file is needed; found a folder"],
    [["check", "nowhere.plan.json"], "nowhere.plan.json: there is no such file"],
    [["inspect", "nowhere.csv"], "nowhere.csv: there is no such file"],
    [["estimate", "package.json/x"], "package.json/x: a folder of its path is a file"],
  ];
  for (const [args, message] of faults) {
    it(`legwork ${args.join(" ")}: one line on standard error, status 2`, () => {
      const { status, out, err } = legwork.run(args);
      expect(err).toContain(message);
      expect(err).toMatch(/^legwork: [^\n]+\n$/);
      expect(err.length).toBeLessThanOrEqual(1501);
      expect(out).toBe("");
      expect(status).toBe(2);
    });
  }

  it("stays on one line of at most 1,500 characters, without controls, whatever the argument", () => {
    const { status, err } = legwork.run(["estimate", `x\n\u001b[31m\u202e${"y".repeat(5000)}`]);
    expect(status).toBe(2);
    expect(err).toMatch(/^legwork: [^\n]+\n$/);
    expect(err.slice(0, -1)).not.toMatch(/\p{Cc}|\u202e/u);
    expect(err.length).toBeLessThanOrEqual(1501);
  });

  it("is said of a plan that is not UTF-8 text", () => {
    const file = join(folder, "latin.plan.json");
    writeFileSync(file, Buffer.from([0x7b, 0xe9, 0x7d]));
    expect(legwork.run(["estimate", file])).toEqual({
      status: 2,
      out: "",
      err: `legwork: ${file}: the text is UTF-8; found bytes that are not\n`,
    });
  });
});

describe("legwork demo", () => {
  it("writes plans, craft and fields, and says what to run next", () => {
    const target = join(folder, "new", "demo");
    const { status, out, err } = legwork.run(["demo", target]);
    expect({ status, err }).toEqual({ status: 0, err: "" });
    const names = readdirSync(target);
    expect(names).toContain("islands.plan.json");
    expect(names.every((name) => /\.(plan|craft)\.json$|\.csv$/.test(name))).toBe(true);
    expect(out).toContain(
      `${names.length} files are in ${target}. Run next:\n  legwork estimate ${join(target, "islands.plan.json")}\n`,
    );
    for (const name of names) {
      expect(
        readFileSync(join(target, name)).equals(
          readFileSync(new URL(`../../data/demo/${name}`, import.meta.url)),
        ),
      ).toBe(true);
    }
  });

  it("every file that a demo plan names is among them", () => {
    const target = join(folder, "whole");
    legwork.run(["demo", target]);
    for (const name of readdirSync(target).filter((each) => each.endsWith(".plan.json"))) {
      const plan = JSON.parse(readFileSync(join(target, name), "utf8"));
      const files = [plan.craft.file, ...plan.fields.map((field: { file: string }) => field.file)];
      for (const file of files) expect(existsSync(join(target, file)), file).toBe(true);
    }
  });

  it("may be run again, but overwrites no file of other content, and then writes nothing", () => {
    const target = join(folder, "again");
    expect(legwork.run(["demo", target]).status).toBe(0);
    expect(legwork.run(["demo", target]).status).toBe(0);
    const changed = join(target, "islands.plan.json");
    writeFileSync(changed, "mine");
    rmSync(join(target, "survey.plan.json"));
    const { status, out, err } = legwork.run(["demo", target]);
    expect({ status, out }).toEqual({ status: 2, out: "" });
    expect(err).toBe(
      `legwork: ${changed}: a file of other content is there and is not overwritten; name another folder\n`,
    );
    expect(readFileSync(changed, "utf8")).toBe("mine");
    expect(existsSync(join(target, "survey.plan.json"))).toBe(false);
  });

  it("needs a folder, not a file", () => {
    const file = join(folder, "file");
    writeFileSync(file, "");
    expect(legwork.run(["demo", file])).toEqual({
      status: 2,
      out: "",
      err: `legwork: ${file}: a folder is needed; found a file\n`,
    });
  });
});

describe("a folder that the system does not make", () => {
  it.runIf(existsSync("/proc/self"))("is said in one line, and does not hang", () => {
    expect(legwork.run(["demo", "/proc/nowhere/demo"])).toEqual({
      status: 2,
      out: "",
      err: "legwork: /proc/nowhere: the system makes no folder there\n",
    });
  });
});

describe("a column mapping that does not fit the file", () => {
  const field = new URL("../../data/demo/islands-current.csv", import.meta.url).pathname;
  it.each([
    ["foo=longitude", "--map: a column mapping names one of time, latitude, "],
    [
      "lon=east",
      '--map: the column mapping of "lon" names a header of the file; "east" is none: found "time", ',
    ],
  ])("%s is told of its option, not of the file", (pair, message) => {
    const { status, out, err } = legwork.run(["inspect", field, "--map", pair]);
    expect([status, out]).toEqual([2, ""]);
    expect(err.startsWith(`legwork: ${message}`), err).toBe(true);
  });
});

describe("a role that does not fit the file", () => {
  it("is told of its option beside the file's line of headers", () => {
    const field = new URL("../../data/demo/islands-current.csv", import.meta.url).pathname;
    const { status, out, err } = legwork.run(["inspect", field, "--role", "wind"]);
    expect([status, out]).toEqual([2, ""]);
    expect(
      err.startsWith(`legwork: ${field}, line 4, --role: the file has columns for the wind: `),
      err,
    ).toBe(true);
    expect(err).toContain("while the file's role is wind");
    const either = join(folder, "either.csv");
    writeFileSync(either, "lat,lon,eastward_wind,northward_sea_water_velocity\n0,0,1,1\n");
    expect(legwork.run(["inspect", either]).err).toMatch(
      /either\.csv, line 1: the file has columns for the wind: /,
    );
  });
});

describe("standard output that cannot be written", () => {
  it("is said in one line, status 2", () => {
    const { status, stderr } = spawnSync(
      "bash",
      ["-c", `"${process.execPath}" "${legwork.file}" --help > /dev/full`],
      {
        encoding: "utf8",
      },
    );
    expect({ status, stderr }).toEqual({
      status: 2,
      stderr: "legwork: standard output cannot be written: the system answers ENOSPC\n",
    });
  });
});

describe("a reader that closes its end", () => {
  it("ends the command without a word", () => {
    const { stderr } = spawnSync(
      "bash",
      ["-c", `"${process.execPath}" "${legwork.file}" --help | head -c 1`],
      { encoding: "utf8" },
    );
    expect(stderr).toBe("");
  });
});
