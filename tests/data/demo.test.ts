import { readdirSync, readFileSync } from "node:fs";
import { beforeAll, describe, expect, it } from "vitest";
import { demoFiles, SEED } from "../../data/demo/recipe.mjs";

const FOLDER = new URL("../../data/demo/", import.meta.url);
const RAD = Math.PI / 180;

let files: Record<string, string>;
beforeAll(() => {
  files = demoFiles(SEED);
});

/** Rows of a demo CSV as numbers by column name (a time in ms, an empty cell NaN). */
function table(name: string, separator = ","): Record<string, number>[] {
  const lines = (files[name] ?? "").split("\n").filter((line) => line !== "" && !line.startsWith("#"));
  const header = (lines[0] ?? "").split(separator);
  return lines.slice(1).map((line) => {
    const cells = line.split(separator);
    return Object.fromEntries(header.map((column, i) => [column, cellNumber(column, cells[i] ?? "")]));
  });
}

function cellNumber(column: string, cell: string): number {
  if (column === "time") return Date.parse(cell);
  return cell === "" ? Number.NaN : Number(cell);
}

describe("the files of the demo scenarios", () => {
  it("are those that the recipe makes, byte for byte", () => {
    const stored = readdirSync(FOLDER).filter((name) => /\.(json|csv)$/.test(name));
    expect(stored.sort()).toEqual(Object.keys(files).sort());
    for (const name of stored) {
      expect(readFileSync(new URL(name, FOLDER), "utf8") === files[name], name).toBe(true);
    }
  });

  it("come out the same twice, and another seed gives other fields", () => {
    expect(demoFiles(SEED)).toEqual(files);
    const other = demoFiles(SEED + 1);
    for (const name of Object.keys(files).filter((each) => each.endsWith(".csv"))) {
      expect(other[name] === files[name], name).toBe(false);
    }
  });

  it("are at most 1.5 MB each and 8 MB together", () => {
    const sizes = Object.values(files).map((text) => Buffer.byteLength(text));
    expect(Math.max(...sizes)).toBeLessThanOrEqual(1.5e6);
    expect(sizes.reduce((sum, size) => sum + size, 0)).toBeLessThanOrEqual(8e6);
  });

  it("say in the notes of every field that it is invented, and its licence", () => {
    for (const name of Object.keys(files).filter((each) => each.endsWith(".csv"))) {
      expect(files[name], name).toMatch(/^# .*\n# Invented data.*\n# .*CC0 1\.0\.\n[a-z]/);
    }
  });

  it("name only files that are there", () => {
    for (const name of Object.keys(files).filter((each) => each.endsWith(".plan.json"))) {
      const plan = JSON.parse(files[name] ?? "") as { craft: { file: string }; fields: { file: string }[] };
      for (const file of [plan.craft.file, ...plan.fields.map((field) => field.file)]) {
        expect(Object.keys(files)).toContain(file);
      }
    }
  });
});

/** Columns of a current on a grid of one spacing, and its spacings in degrees. */
interface CurrentGrid {
  readonly u: (time: number, lat: number, lon: number) => number;
  readonly v: (time: number, lat: number, lon: number) => number;
  readonly nodes: { time: number; lat: number; lon: number }[];
  readonly dLat: number;
  readonly dLon: number;
}

function currentGrid(
  rows: Record<string, number>[],
  names: { lat: string; lon: string; u: string; v: string },
  step: { dLat: number; dLon: number },
): CurrentGrid {
  const key = (time: number, lat: number, lon: number) =>
    `${time} ${lat.toFixed(4)} ${(((lon % 360) + 360) % 360).toFixed(4)}`;
  const read = (row: Record<string, number>, name: string) => row[name] ?? Number.NaN;
  const nodes = rows.map((row) => ({
    time: row.time ?? 0,
    lat: read(row, names.lat),
    lon: read(row, names.lon),
  }));
  const u = new Map(rows.map((row, i) => [nodeKey(i), read(row, names.u)]));
  const v = new Map(rows.map((row, i) => [nodeKey(i), read(row, names.v)]));
  function nodeKey(i: number): string {
    const node = nodes[i];
    return node === undefined ? "" : key(node.time, node.lat, node.lon);
  }
  return {
    u: (time, lat, lon) => u.get(key(time, lat, lon)) ?? Number.NaN,
    v: (time, lat, lon) => v.get(key(time, lat, lon)) ?? Number.NaN,
    nodes,
    ...step,
  };
}

/**
 * Largest of |δu/δλ + δ(v cos φ)/δφ| over the nodes whose four neighbours are given, in m/s per grid step of latitude,
 * and the largest of its two terms, for scale.
 */
function divergence(grid: CurrentGrid): { sum: number; term: number; nodes: number } {
  let sum = 0;
  let term = 0;
  let nodes = 0;
  for (const { time, lat, lon } of grid.nodes) {
    const east = (grid.u(time, lat, lon + grid.dLon) - grid.u(time, lat, lon - grid.dLon)) / (2 * grid.dLon);
    const flux = (at: number) => grid.v(time, at, lon) * Math.cos(at * RAD);
    const north = (flux(lat + grid.dLat) - flux(lat - grid.dLat)) / (2 * grid.dLat);
    if (Number.isNaN(east + north)) continue;
    nodes += 1;
    sum = Math.max(sum, Math.abs(east + north) * grid.dLat);
    term = Math.max(term, Math.abs(north) * grid.dLat);
  }
  return { sum, term, nodes };
}

const ISLANDS = {
  names: {
    lat: "latitude",
    lon: "longitude",
    u: "eastward_sea_water_velocity",
    v: "northward_sea_water_velocity",
  },
  step: { dLat: 0.0125, dLon: 0.02 },
};
const OCEAN = {
  names: { lat: "latitude", lon: "longitude", u: "u [m/s]", v: "v [m/s]" },
  step: { dLat: 0.25, dLon: 0.5 },
};

describe("the currents", () => {
  it("have no divergence beyond the rounding of their three decimals", () => {
    // Each of four values is off by at most 0.0005 m/s: (2 · 0.0005) (1 + Δφ/Δλ) / 2 for the two differences.
    for (const [name, { names, step }] of [
      ["islands-current.csv", ISLANDS],
      ["ocean-current.csv", OCEAN],
    ] as const) {
      const found = divergence(currentGrid(table(name), names, step));
      expect(found.sum, name).toBeLessThanOrEqual(0.0005 * (1 + step.dLat / step.dLon) + 1e-12);
      expect(found.term, name).toBeGreaterThan(0.05);
      expect(found.nodes, name).toBeGreaterThan(5000);
    }
  });

  it("among the islands turns clockwise through a tidal period of 12.42 h, far from land", () => {
    // The corner in the south-west; over the 12 hours of the file the direction turns by 12 / 12.42 of a turn.
    const rows = table("islands-current.csv").filter((row) => row.latitude === 53.3 && row.longitude === -14);
    const directions = rows.map((row) =>
      Math.atan2(row.eastward_sea_water_velocity ?? 0, row.northward_sea_water_velocity ?? 0),
    );
    const turned = directions.slice(1).reduce((sum, direction, i) => {
      const step = direction - (directions[i] ?? 0);
      return sum + step - 2 * Math.PI * Math.round(step / (2 * Math.PI));
    }, 0);
    // The steady eddies bend the hodograph's ends, hence the width.
    expect(turned / (2 * Math.PI)).toBeGreaterThan(0.9);
    expect(turned / (2 * Math.PI)).toBeLessThan(1.05);
  });

  it("runs two to three times as hard in the sound between the islands as to seaward of them", () => {
    const rows = table("islands-current.csv").filter((row) => row.time === Date.UTC(2027, 4, 4, 12));
    const speed = (lat: number, lon: number) => {
      const row = rows.find((each) => each.latitude === lat && each.longitude === lon) ?? {};
      return Math.hypot(
        row.eastward_sea_water_velocity ?? Number.NaN,
        row.northward_sea_water_velocity ?? Number.NaN,
      );
    };
    const ratio = speed(53.55, -13.6) / speed(53.55, -13.8);
    expect(ratio).toBeGreaterThan(2);
    expect(ratio).toBeLessThan(3.5);
  });

  it("leaves out the nodes on the islands, the same ones at every time", () => {
    const rows = table("islands-current.csv");
    const dry = rows.filter((row) => Number.isNaN(row.eastward_sea_water_velocity ?? Number.NaN));
    const places = new Set(dry.map((row) => `${row.latitude} ${row.longitude}`));
    expect(dry.length).toBe(places.size * 13);
    // Area of the four invented ellipses, π a b: 207 km²; a cell is 1.39 km × 1.32 km = 1.84 km².
    expect(places.size).toBeGreaterThan(100);
    expect(places.size).toBeLessThan(125);
  });
});

describe("the winds", () => {
  it("of the low turn anticlockwise around its centre, as a northern low does, and blow inward", () => {
    const rows = table("ocean-wind-1.csv").filter((row) => row.time === Date.UTC(2027, 10, 5, 0));
    const at = (lat: number, lon: number) => {
      const row = rows.find((each) => each.lat === lat && each.lon === lon) ?? {};
      return { u: row.eastward_wind ?? Number.NaN, v: row.northward_wind ?? Number.NaN };
    };
    // 48 h after the first time the centre is near 37.7 N 167 E.
    const mean = (a: number, b: number) => (a + b) / 2;
    const circulation = at(34.5, 166.5).u - at(42, 166.5).u + at(37.5, 171).v - at(37.5, 162).v;
    expect(circulation).toBeGreaterThan(30);
    // Means of opposite sides take the westerlies out: inflow is what is left.
    const inward = at(34.5, 166.5).v - at(42, 166.5).v + at(37.5, 162).u - at(37.5, 171).u;
    expect(inward).toBeGreaterThan(5);
    expect(mean(at(34.5, 166.5).u, at(42, 166.5).u)).toBeGreaterThan(0);
  });

  it("over the islands builds onshore in the afternoon and veers", () => {
    const rows = table("islands-wind.csv").filter((row) => row.lat === 53.55 && row.lon === 346.4);
    const at = (hour: number) => rows.find((row) => row.time === Date.UTC(2027, 4, 4, hour)) ?? {};
    const morning = at(8)["wind_speed [kn]"] ?? Number.NaN;
    const afternoon = at(15)["wind_speed [kn]"] ?? Number.NaN;
    expect(afternoon).toBeGreaterThan(2 * morning);
    const directions = [9, 11, 13, 15, 17].map((hour) => at(hour)["wind_from_direction [deg]"] ?? Number.NaN);
    expect(directions).toEqual([...directions].sort((a, b) => a - b));
    expect(Math.min(...directions)).toBeGreaterThan(200);
    expect(Math.max(...directions)).toBeLessThan(330);
  });

  it("over the plain is stronger at each greater height, at every node and time, in every member", () => {
    for (const name of ["survey-wind.csv", "survey-wind-members.csv"]) {
      const rows = table(name, "\t");
      const key = (row: Record<string, number>, height: unknown) =>
        `${row.member} ${row.time} ${row.lat} ${row.lon} ${height}`;
      const speeds = new Map(rows.map((row) => [key(row, row.height), row.speed]));
      for (const row of rows.filter((each) => each.height === 10)) {
        const speed = (height: number) => speeds.get(key(row, height)) ?? Number.NaN;
        expect(speed(60)).toBeGreaterThan(speed(10));
        expect(speed(120)).toBeGreaterThan(speed(60));
      }
    }
  });
});

/** Rows without their member, as text, of one member or of a file without members. */
function rowsOf(name: string, member?: number): string[] {
  const lines = (files[name] ?? "").split("\n").filter((line) => line !== "" && !line.startsWith("#"));
  const rows = lines.slice(1);
  if (member === undefined) return rows;
  const own = new RegExp(`^${member}[,\\t]`);
  return rows.filter((row) => own.test(row)).map((row) => row.replace(own, ""));
}

/** Means by member over the rows that pass. */
function meansByMember(
  rows: Record<string, number>[],
  passes: (row: Record<string, number>) => boolean,
  value: (row: Record<string, number>) => number,
): number[] {
  const groups = new Map<number, number[]>();
  for (const row of rows.filter(passes)) {
    const member = row.member ?? Number.NaN;
    groups.set(member, [...(groups.get(member) ?? []), value(row)]);
  }
  return [...groups.values()].map((values) => values.reduce((sum, each) => sum + each, 0) / values.length);
}

describe("the ensembles", () => {
  it("have the wind of the plain estimate as member 0, row for row", () => {
    expect(rowsOf("islands-wind-members.csv", 0)).toEqual(rowsOf("islands-wind.csv"));
    const plain = new Set(rowsOf("survey-wind.csv"));
    const control = rowsOf("survey-wind-members.csv", 0);
    // Five of its ten times, and a part of the plain: 8 × 11 nodes on three heights.
    expect(control.filter((row) => plain.has(row))).toHaveLength(5 * 3 * 8 * 11);
  });

  it("give each of seven members the same nodes and times", () => {
    for (const [name, separator] of [
      ["islands-wind-members.csv", ","],
      ["survey-wind-members.csv", "\t"],
    ] as const) {
      const places = (member: number) =>
        table(name, separator)
          .filter((row) => row.member === member)
          .map((row) => `${row.time} ${row.lat} ${row.lon} ${row.height}`);
      for (const member of [1, 2, 3, 4, 5, 6]) expect(places(member)).toEqual(places(0));
      expect(places(7)).toEqual([]);
    }
  });

  it("differ among themselves about the control: the afternoon's breeze, the wind at 120 m", () => {
    const breeze = meansByMember(
      table("islands-wind-members.csv"),
      (row) => row.time === Date.UTC(2027, 4, 4, 15) && (row.lon ?? 0) >= 346.2,
      (row) => row["wind_speed [kn]"] ?? Number.NaN,
    );
    const aloft = meansByMember(
      table("survey-wind-members.csv", "\t"),
      (row) => row.time === Date.UTC(2027, 8, 14, 1, 30) && row.height === 120,
      (row) => row.speed ?? Number.NaN,
    );
    for (const [first = Number.NaN, ...others] of [breeze, aloft]) {
      expect(others).toHaveLength(6);
      expect(Math.min(...others)).toBeLessThan(0.95 * first);
      expect(Math.max(...others)).toBeGreaterThan(1.05 * first);
      // Pairs of opposite sign: what is left of their mean is of second order.
      const mean = others.reduce((sum, each) => sum + each, 0) / others.length;
      expect(Math.abs(mean / first - 1)).toBeLessThan(0.05);
    }
  });

  it("keep each member's low turning anticlockwise, wherever it went", () => {
    const centres = [1, 2, 3, 4].map((member) => {
      const rows = table(`ocean-wind-member-${member}.csv`).filter(
        (row) => row.time === Date.UTC(2027, 10, 5, 0),
      );
      const at = (lat: number, lon: number) => {
        const row = rows.find((each) => each.lat === lat && each.lon === lon) ?? {};
        return { u: row.u ?? Number.NaN, v: row.v ?? Number.NaN };
      };
      const circulation = at(34.5, 166.5).u - at(42, 166.5).u + at(37.5, 171).v - at(37.5, 162).v;
      expect(circulation).toBeGreaterThan(20);
      return circulation;
    });
    expect(new Set(centres).size).toBe(4);
  });

  it("over the plain start with the night's jet, which is gone at 00:30", () => {
    const ratio = (instant: number) => {
      const speed = (height: number) =>
        meansByMember(
          table("survey-wind-members.csv", "\t"),
          (row) => row.member === 0 && row.time === instant && row.height === height,
          (row) => row.speed ?? Number.NaN,
        )[0] ?? Number.NaN;
      return speed(120) / speed(10);
    };
    // The logarithmic profile alone: ln(120 / 0.3) / ln(10 / 0.3) = 1.709; eddies are the same on all heights.
    expect(ratio(Date.UTC(2027, 8, 14, 0, 30))).toBeLessThan(1.8);
    expect(ratio(Date.UTC(2027, 8, 13, 22, 30))).toBeGreaterThan(2.5);
  });
});
