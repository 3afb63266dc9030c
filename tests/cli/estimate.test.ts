import { spawnSync } from "node:child_process";
import {
  existsSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  symlinkSync,
  writeFileSync,
} from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { ADVISORY } from "../../src/constants.ts";
import { displayWidth } from "../../src/report/plain-text.ts";
import { type BuiltCommand, builtCommand } from "./built-command.ts";

const GPX_SCHEMA = new URL("../report/gpx-from-memory.xsd", import.meta.url).pathname;

let legwork: BuiltCommand;
let folder: string;
let islands: string;
let ocean: string;

beforeAll(async () => {
  legwork = await builtCommand();
  folder = mkdtempSync(join(tmpdir(), "legwork-"));
  const demo = join(folder, "demo");
  legwork.run(["demo", demo]);
  islands = join(demo, "islands.plan.json");
  ocean = join(demo, "ocean.plan.json");
}, 60_000);

afterAll(() => {
  legwork.remove();
  rmSync(folder, { recursive: true, force: true });
});

/** A plan of one route in a folder of its own: an inline craft and a file of a steady eastward wind. */
function smallPlan(name: string, change: (plan: Record<string, unknown>) => void = () => undefined): string {
  const where = join(folder, name);
  mkdirSync(where);
  const nodes = [9, 10, 11].flatMap((lat) => [19, 20, 21].map((lon) => `${lat},${lon},5,0`));
  writeFileSync(join(where, "wind.csv"), `lat,lon,u,v\n${nodes.join("\n")}\n`);
  const plan: Record<string, unknown> = {
    format: "legwork-plan/1",
    title: "A degree east",
    departure: "2027-05-04T06:00:00Z",
    craft: {
      name: "Glider",
      moves: "air",
      speed: "20 m/s",
      power: { model: "constant", rate: "100 W" },
      store: { capacity: "1 kWh" },
    },
    fields: [{ role: "wind", file: "wind.csv" }],
    routes: [
      {
        name: "East",
        waypoints: [
          { name: "A", lat: 10, lon: 19.5 },
          { name: "B", lat: 10, lon: 20.5, path: "rhumb" },
        ],
      },
    ],
  };
  change(plan);
  const file = join(where, "small.plan.json");
  writeFileSync(file, JSON.stringify(plan));
  return file;
}

describe("legwork estimate", () => {
  it("prints the leg table within 80 columns, nothing on standard error, and 1 where a route stops", () => {
    const { status, out, err } = legwork.run(["estimate", islands]);
    expect({ status, err }).toEqual({ status: 1, err: "" });
    expect(Math.max(...out.split("\n").map(displayWidth))).toBe(80);
    expect(out).toContain("\nRoutes compared ");
    expect(out.replace(/\n/g, " ")).toContain(ADVISORY);
  });

  it("gives 0 where every route is clear or has cautions only", () => {
    expect(legwork.run(["estimate", ocean]).status).toBe(0);
  });

  it("prints what the triangle gives for a uniform tail wind: 109,639 m at 25 m/s", () => {
    // A degree of the parallel of 10° on WGS84 is 109,639 m (from memory of any table of lengths of a degree); 4385.6 s at 20 + 5 m/s,
    // 5482 s in still air, 121.8 Wh of 1000.
    const { out } = legwork.run(["estimate", smallPlan("uniform"), "--units", "metric"]);
    expect(out).toMatch(
      /090 \S+ +109\.6 +\+5\.0 +0\.0 +20\.0 +25\.0 +090 +1:13:06 +07:13:06 +121\.8 +878\.2\n/,
    );
    expect(out).toMatch(/^ +1 +1:31:22 +-0:18:16 +0:00:00 +1:13:06 /m);
  });

  it("writes JSON, CSV, GeoJSON and GPX that their readers take", () => {
    const text = (format: string) => legwork.run(["estimate", ocean, "--format", format]).out;
    const estimate = JSON.parse(text("json"));
    expect(estimate.format).toBe("legwork-estimate/1");
    const legs = estimate.routes.flatMap((route: { legs: unknown[] }) => route.legs).length;
    expect(text("csv").split("\r\n")).toHaveLength(legs + 2);
    expect(JSON.parse(text("geojson")).type).toBe("FeatureCollection");
    const checked = spawnSync("xmllint", ["--noout", "--nonet", "--schema", GPX_SCHEMA, "-"], {
      input: text("gpx"),
      encoding: "utf8",
    });
    expect(checked.stderr).toBe("- validates\n");
  });

  it("says the same bytes twice", () => {
    for (const format of ["table", "json", "geojson"]) {
      expect(legwork.run(["estimate", islands, "--format", format]).out).toBe(
        legwork.run(["estimate", islands, "--format", format]).out,
      );
    }
  });

  it("takes the routes asked for, in the order asked for", () => {
    const names = (args: readonly string[]) =>
      JSON.parse(legwork.run(["estimate", islands, "--format", "json", ...args]).out).routes.map(
        (route: { name: string }) => route.name,
      );
    expect(names(["--route", "West about"])).toEqual(["West about"]);
    expect(names(["--route", "West about", "--route", "Sound"])).toEqual(["West about", "Sound"]);
    expect(legwork.run(["estimate", islands, "--route", "West about"]).status).toBe(0);
  });

  it("tells how far one can still turn back, where the plan has alternates or the option asks for it", () => {
    const plain = smallPlan("plain");
    const named = smallPlan("named", (plan) => {
      plan.alternates = [{ name: "Field", lat: 10.2, lon: 20 }];
    });
    const turns = (file: string, ...args: string[]) =>
      JSON.parse(legwork.run(["estimate", file, "--format", "json", ...args]).out).routes[0].turnBack;
    expect(turns(plain)).toBeUndefined();
    expect(turns(plain, "--turn-back").equalTime).toHaveLength(1);
    expect(turns(named).goals.map((goal: { name: string }) => goal.name)).toEqual(["A", "B", "Field"]);
    const { out, status } = legwork.run(["estimate", named]);
    expect(status).toBe(0);
    expect(out).toContain("\nTurning back, at once and without stays, the reserve kept\n");
    expect(Math.max(...out.split("\n").map(displayWidth))).toBeLessThanOrEqual(80);
  });

  it("names the routes there are where one is not", () => {
    const { status, out, err } = legwork.run(["estimate", islands, "--route", "west"]);
    expect({ status, out }).toEqual({ status: 2, out: "" });
    expect(err).toMatch(/^legwork: .*"Sound".*"West about".*found "west"\n$/);
  });

  it("takes another departure, with a zone, and refuses one without", () => {
    const departure = (time: string) =>
      legwork.run(["estimate", ocean, "--format", "json", "--departure", time]);
    expect(JSON.parse(departure("2027-11-04T02:00:00+02:00").out).routes[0].departure).toBe(
      "2027-11-04T00:00:00.000Z",
    );
    for (const time of ["2027-11-04T02:00:00", "tomorrow", "", "2027-13-04T00:00:00Z"]) {
      const { status, out, err } = departure(time);
      expect({ status, out }).toEqual({ status: 2, out: "" });
      expect(err).toMatch(/^legwork: --departure[^\n]*\n$/);
    }
  });

  it("writes to --out what it would print", () => {
    const file = join(folder, "legs.csv");
    const { status, out, err } = legwork.run(["estimate", islands, "--format", "csv", "--out", file]);
    expect({ status, out, err }).toEqual({ status: 1, out: "", err: "" });
    expect(readFileSync(file, "utf8")).toBe(legwork.run(["estimate", islands, "--format", "csv"]).out);
  });

  it("does not write over the plan, nor over a file that it names", () => {
    const plan = smallPlan("inputs");
    const wind = join(folder, "inputs", "wind.csv");
    for (const file of [plan, wind]) {
      const before = readFileSync(file, "utf8");
      const { status, out, err } = legwork.run(["estimate", plan, "--out", file]);
      expect({ status, out }).toEqual({ status: 2, out: "" });
      expect(err).toBe(
        `legwork: ${file}: --out names a file of its own; found one that the answer is made from\n`,
      );
      expect(readFileSync(file, "utf8")).toBe(before);
    }
  });

  it("names the plan in which the craft cannot do a leg even without wind", () => {
    const plan = smallPlan("weak", (document) => {
      document.craft = {
        name: "Multirotor",
        moves: "air",
        power: { model: "cube", reference: { speed: "10 m/s", power: "100 W" } },
        speeds: { min: "8 m/s", max: "12 m/s" },
        store: { capacity: "1 kWh" },
      };
      document.pace = { hold: "power", power: "1 W" };
    });
    const { status, err } = legwork.run(["estimate", plan]);
    expect(status).toBe(2);
    expect(err).toMatch(
      new RegExp(
        `^legwork: ${plan}: leg 1 of route "East" to B: the pace takes a speed within the power model`,
      ),
    );
    const window = ["--from", "2027-05-04T06:00Z", "--to", "2027-05-04T07:00Z", "--every", "1h"];
    expect(legwork.run(["window", plan, ...window]).err).toBe(err);
  });

  it("says that units change nothing where the format is not the table", () => {
    const plain = legwork.run(["estimate", islands, "--format", "csv"]);
    const asked = legwork.run(["estimate", islands, "--format", "csv", "--units", "sea"]);
    expect(asked.out).toBe(plain.out);
    expect(asked.status).toBe(plain.status);
    expect(asked.err).toBe("legwork: --units is for the table alone; csv is in its own units\n");
  });

  it("leaves --out alone on bad input, whether a file is there or not", () => {
    const there = join(folder, "there.txt");
    writeFileSync(there, "mine");
    const fresh = join(folder, "fresh.txt");
    const broken = smallPlan("broken", (plan) => {
      plan.fields = [{ role: "wind", file: "nowhere.csv" }];
    });
    for (const file of [there, fresh])
      expect(legwork.run(["estimate", broken, "--out", file]).status).toBe(2);
    expect(readFileSync(there, "utf8")).toBe("mine");
    expect(existsSync(fresh)).toBe(false);
    expect(readdirSync(folder).filter((name) => name.startsWith(".legwork"))).toEqual([]);
  });

  it("names the file that is not there", () => {
    const broken = smallPlan("missing", (plan) => {
      plan.fields = [{ role: "wind", file: "no/where.csv" }];
    });
    const { status, err } = legwork.run(["estimate", broken]);
    expect(status).toBe(2);
    expect(err).toBe(`legwork: ${join(folder, "missing", "no", "where.csv")}: there is no such file\n`);
  });

  it("finds files beside the plan from any folder, and through symbolic links", () => {
    const plan = smallPlan("linked", (each) => {
      each.fields = [{ role: "wind", file: "link.csv" }];
    });
    symlinkSync("wind.csv", join(folder, "linked", "link.csv"));
    const elsewhere = legwork.run(["estimate", "linked/small.plan.json"], folder);
    expect(elsewhere.err).toBe("");
    expect(legwork.run(["estimate", plan], tmpdir()).out).toBe(elsewhere.out);
  });

  it("answers bad plans in one line with status 2", () => {
    const bad: readonly [name: string, text: string, message: RegExp][] = [
      ["empty", "", /small\.plan\.json/],
      ["not-json", "{", /small\.plan\.json/],
      ["array", "[]", /small\.plan\.json/],
      ["format", '{"format":"legwork-plan/2"}', /format/],
      [
        "typo",
        JSON.stringify({ ...JSON.parse(readFileSync(smallPlan("good"), "utf8")), depature: 1 }),
        /depature.*departure/,
      ],
    ];
    for (const [name, text, message] of bad) {
      const file = smallPlan(name);
      writeFileSync(file, text);
      const { status, out, err } = legwork.run(["estimate", file]);
      expect({ status, out }, err).toEqual({ status: 2, out: "" });
      expect(err).toMatch(/^legwork: [^\n]{1,1491}\n$/);
      expect(err).toMatch(message);
    }
  });

  it("ends without a word when its reader closes its end", () => {
    const script = `"${process.execPath}" "${legwork.file}" estimate "${ocean}" --format geojson | head -c 1; echo " \${PIPESTATUS[0]}"`;
    const { stdout, stderr } = spawnSync("bash", ["-c", script], { encoding: "utf8" });
    expect({ stdout, stderr }).toEqual({ stdout: "{ 0\n", stderr: "" });
  });
});

describe("legwork check", () => {
  it("says what is in order", () => {
    expect(legwork.run(["check", islands])).toEqual({
      status: 0,
      out: `${islands}: in order; 3 routes, 10 legs, 2 field files; craft: Battery workboat, 12 m\n`,
      err: "",
    });
  });
  it("says what there is to note of the fields", () => {
    const twice = smallPlan("twice", (plan) => {
      const [field] = plan.fields as unknown[];
      plan.fields = [field, field];
    });
    const { status, out } = legwork.run(["check", twice]);
    expect(status).toBe(0);
    expect(out).toMatch(
      /: in order; .*\n {2}note: (\S+) is left out: \1, named before it, covers all of its area and times\n$/,
    );
  });
  it("finds what estimate would", () => {
    const broken = smallPlan("unchecked", (plan) => {
      plan.reserve = "20 kg";
    });
    const { status, err } = legwork.run(["check", broken]);
    expect(status).toBe(2);
    expect(err).toBe(legwork.run(["estimate", broken]).err);
  });
});

describe("legwork inspect", () => {
  it("says what a field holds", () => {
    const { status, out, err } = legwork.run(["inspect", join(folder, "demo", "survey-wind.csv")]);
    expect({ status, err }).toEqual({ status: 0, err: "" });
    expect(out).toMatch(/^Height: +3: 10 to 120 m, steps of 50 m to 60 m$/m);
    expect(out).toMatch(/^Times: +7: 2027-09-14 00:30 to 2027-09-14 03:30 UTC, every 30 min$/m);
    for (const line of out.split("\n")) expect(displayWidth(line)).toBeLessThanOrEqual(80);
  });

  it("writes JSON, and takes a role and columns by their own headers", () => {
    const file = join(folder, "odd.csv");
    writeFileSync(file, "y;x;e;n;spare\n1;1;0,5;0;a\n1;2;0,5;0;b\n2;1;0,5;0;c\n2;2;;0;d\n");
    const map = ["lat=y", "lon=x", "u=e", "v=n"].flatMap((pair) => ["--map", pair]);
    const { status, out, err } = legwork.run([
      "inspect",
      file,
      "--role",
      "current",
      "--format",
      "json",
      ...map,
    ]);
    expect({ status, err }).toEqual({ status: 0, err: "" });
    expect(JSON.parse(out)).toMatchObject({
      role: "current",
      nodes: 4,
      missing: 1,
      ignoredColumns: ["spare"],
      speed: { min: 0.5, max: 0.5 },
    });
  });

  it("answers a file that is not a field in one line with status 2", () => {
    const file = join(folder, "not-a-field.csv");
    writeFileSync(file, "a,b\n1,2\n");
    const { status, out, err } = legwork.run(["inspect", file]);
    expect({ status, out }).toEqual({ status: 2, out: "" });
    expect(err).toMatch(/^legwork: [^\n]*not-a-field\.csv[^\n]*\n$/);
  });

  it("says what a file that is no text looks like", () => {
    const file = join(folder, "winds.grb");
    writeFileSync(file, "GRIB\0\0\0\u0002");
    const { status, out, err } = legwork.run(["inspect", file]);
    expect({ status, out }).toEqual({ status: 2, out: "" });
    expect(err).toMatch(
      /^legwork: [^\n]*winds\.grb: [^\n]*; found what looks like GRIB: export it as CSV[^\n]*\n$/,
    );
  });
});
