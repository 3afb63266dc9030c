import fc from "fast-check";
import { describe, expect, test } from "vitest";
import type { GridFile } from "../../src/field/grid-file.ts";
import { nodesOf, readText } from "./read-text.ts";

/** Axes and values of a random grid, with the rows that give it. */
interface Case {
  readonly lat: readonly number[];
  readonly lon: readonly number[];
  readonly height: readonly number[];
  readonly hours: readonly number[];
  /** Per node; `null` is not given at all. */
  readonly cells: readonly (string | null)[];
}

const axis = (from: number, to: number, size: number) =>
  fc
    .uniqueArray(fc.integer({ min: from * 4, max: to * 4 }), { minLength: 1, maxLength: size })
    .map((quarters) => quarters.map((quarter) => quarter / 4));

const cell = fc.oneof(
  {
    weight: 8,
    arbitrary: fc
      .tuple(fc.integer({ min: -9999, max: 9999 }), fc.integer({ min: -99, max: 99 }))
      .map(([u, v]) => `${u / 1000},${v / 10},${Math.abs(v)}`),
  },
  { weight: 1, arbitrary: fc.constant("NaN,1,3") },
  { weight: 1, arbitrary: fc.constant(",,") },
);

const grids: fc.Arbitrary<Case> = fc
  .record({ lat: axis(-90, 90, 5), lon: axis(-180, 179, 6), height: axis(0, 500, 2), hours: axis(0, 23, 3) })
  .chain((axes) => {
    const count = axes.lat.length * axes.lon.length * axes.height.length * axes.hours.length;
    return fc.array(cell, { minLength: count, maxLength: count }).map((cells) => ({ ...axes, cells }));
  });

function rowsOf(grid: Case): string[] {
  const rows: string[] = [];
  let node = 0;
  for (const hour of grid.hours) {
    for (const height of grid.height) {
      for (const lat of grid.lat) {
        for (const lon of grid.lon) {
          const time = new Date(Date.UTC(2027, 4, 4) + hour * 3_600_000).toISOString();
          rows.push(`${time},${height},${lat},${lon},${grid.cells[node++]}`);
        }
      }
    }
  }
  return rows;
}

const HEADER = "time,height,lat,lon,u,v,gust";
const fileOf = (rows: readonly string[]) => `${[HEADER, ...rows].join("\n")}\n`;

function shuffled<T>(items: readonly T[], keys: readonly number[]): T[] {
  return items
    .map((item, index) => [keys[index % keys.length] as number, item] as const)
    .sort(([a], [b]) => a - b)
    .map(([, item]) => item);
}

describe("a grid does not depend on how its file is written", () => {
  test("rows in any order give the same grid", async () => {
    await fc.assert(
      fc.asyncProperty(grids, fc.array(fc.nat(), { minLength: 300, maxLength: 300 }), async (grid, keys) => {
        const rows = rowsOf(grid);
        expect(nodesOf(await readText(fileOf(shuffled(rows, keys))))).toEqual(
          nodesOf(await readText(fileOf(rows))),
        );
      }),
      { numRuns: 100 },
    );
  });

  test("descending axes give the same grid as ascending ones", async () => {
    const sorted = (values: readonly number[], sign: number) => [...values].sort((a, b) => sign * (a - b));
    await fc.assert(
      fc.asyncProperty(grids, async (grid) => {
        const rows = rowsOf(grid);
        const latOf = (row: string) => Number(row.split(",")[2]);
        const lats = sorted(rows.map(latOf), -1);
        const down = lats
          .filter((lat, index) => lats.indexOf(lat) === index)
          .flatMap((lat) => rows.filter((row) => latOf(row) === lat));
        expect(nodesOf(await readText(fileOf(down)))).toEqual(nodesOf(await readText(fileOf(rows))));
      }),
      { numRuns: 100 },
    );
  });

  test("longitudes of 0..360 and of -180..180 give the same grid", async () => {
    await fc.assert(
      fc.asyncProperty(grids, fc.integer({ min: -2, max: 2 }), async (grid, turns) => {
        const turned = { ...grid, lon: grid.lon.map((lon) => (lon < 0 ? lon + 360 : lon) + 360 * turns) };
        expect(nodesOf(await readText(fileOf(rowsOf(turned))))).toEqual(
          nodesOf(await readText(fileOf(rowsOf(grid)))),
        );
      }),
      { numRuns: 100 },
    );
  });

  test("pieces of any size give the same grid, a byte at a time included", async () => {
    const file =
      '\uFEFF# Höhenwind\r\nlat;lon;wind_speed [kn];wind_from_direction;"Bemerkung"\r\n50,5;-3;"10,5";90;"ä\r\n;""x"""\r\n50,5;-2;7;NaN;–\r\n51;-3;;;\r\n51;-2;3,25;359,5;z';
    const whole = await readText(file);
    expect(whole.notes).toEqual(["Höhenwind"]);
    const { length } = new TextEncoder().encode(file);
    for (let pieceBytes = 1; pieceBytes <= length; pieceBytes++) {
      expect(await readText(file, { pieceBytes }), `pieces of ${pieceBytes} bytes`).toEqual(whole);
    }
  });

  test("pieces and blocks cut at any byte give the same grid in a file of many blocks", async () => {
    const rows = Array.from(
      { length: 20_000 },
      (_, row) => `${(row % 173) / 2},${Math.floor(row / 173)},${row % 13},"${row % 7}"`,
    );
    const file = ["lat,lon,u,v", ...rows].join("\n");
    const whole = await readText(file);
    for (const pieceBytes of [1000, 4096, 65_535, 65_536, 65_537, 131_073]) {
      expect(await readText(file, { pieceBytes }), `pieces of ${pieceBytes} bytes`).toEqual(whole);
    }
    // A note of every length up to a row's moves every cut of a block through a row.
    for (let shift = 0; shift < 12; shift++) {
      const grid = await readText(`#${"x".repeat(shift)}\n${file}`);
      expect(nodesOf(grid), `shifted by ${shift} bytes`).toEqual(nodesOf(whole));
    }
  });

  test("a file sorted with any axis innermost, or with none, gives the same grid", async () => {
    const cells = (t: number, j: number, i: number) =>
      `${new Date(Date.UTC(2027, 0, 1, t)).toISOString()},${j / 4},${i / 2},${t + j},${i}`;
    const [times, lats, lons] = [6, 70, 90];
    const rows: [string, number, number, number][] = [];
    for (let t = 0; t < times; t++) {
      for (let j = 0; j < lats; j++) for (let i = 0; i < lons; i++) rows.push([cells(t, j, i), t, j, i]);
    }
    const read = (order: readonly [string, number, number, number][]) =>
      readText(["time,lat,lon,u,v", ...order.map(([row]) => row)].join("\n"));
    const expected = await read(rows);
    const keys: ((row: (typeof rows)[number]) => number)[] = [
      ([, t, j, i]) => (j * lons + i) * times + t,
      ([, t, j, i]) => (i * lats + j) * times + t,
      ([, t, j, i]) => (i * times + t) * lats + j,
      ([, t, j, i]) => (t * lons + i) * lats - j,
      ([, t, j, i]) => (((t * lats + j) * lons + i) * 7919) % (times * lats * lons),
    ];
    for (const key of keys) {
      expect(nodesOf(await read([...rows].sort((a, b) => key(a) - key(b))))).toEqual(nodesOf(expected));
    }
  });
});

describe("what is read", () => {
  test("is what was written, node by node", async () => {
    await fc.assert(
      fc.asyncProperty(grids, async (grid) => {
        const read = await readText(fileOf(rowsOf(grid)));
        const sum = (values: Iterable<number>) => [...values].reduce((total, value) => total + value, 0);
        const written = grid.cells.map((one) =>
          (one as string).split(",").map((part) => (part === "" ? Number.NaN : Number(part))),
        );
        const given = written.filter(([u]) => !Number.isNaN(u as number));
        const unique = read.global ? read.lon.length - 1 : read.lon.length;
        let found = 0;
        for (const [time, slice] of read.slices.entries()) {
          for (let node = 0; node < slice.length / 2; node++) {
            if (node % read.lon.length < unique && (read.masks[time]?.[node] ?? 0) === 0)
              found += slice[2 * node] as number;
          }
        }
        expect(found).toBeCloseTo(sum(given.map(([u]) => u as number)), 8);
        expectSound(read);
      }),
      { numRuns: 100 },
    );
  });
});

describe("whatever the bytes", () => {
  test("random bytes are read or refused as a user's error", async () => {
    await fc.assert(fc.asyncProperty(fc.uint8Array({ maxLength: 400 }), readOrRefuse), { numRuns: 800 });
  });

  test("random text of a table's own letters is read or refused", async () => {
    const letters = fc.constantFrom(
      ...'0159.,;\t\n\r"#-+eEnNaA [] latonuv',
      "lat,lon,u,v\n",
      "NaN",
      "\n0,0,1,1",
      '""',
    );
    const texts = fc
      .array(letters, { maxLength: 80 })
      .map((parts) => new TextEncoder().encode(`lat,lon,u,v\n0,0,1,1\n${parts.join("")}`));
    await fc.assert(fc.asyncProperty(texts, readOrRefuse), { numRuns: 800 });
  });

  test("a file with bytes changed, left out or doubled is read or refused", async () => {
    const change = fc.record({
      at: fc.nat(),
      byte: fc.nat(255),
      kind: fc.constantFrom("change", "drop", "double"),
    });
    await fc.assert(
      fc.asyncProperty(grids, fc.array(change, { minLength: 1, maxLength: 6 }), async (grid, changes) => {
        const bytes = [...new TextEncoder().encode(fileOf(rowsOf(grid)))];
        for (const { at, byte, kind } of changes) {
          const index = at % bytes.length;
          if (kind === "change") bytes[index] = byte;
          else if (kind === "drop") bytes.splice(index, 1 + (byte % 20));
          else bytes.splice(index, 0, ...bytes.slice(index, index + byte));
          if (bytes.length === 0) return;
        }
        await readOrRefuse(Uint8Array.from(bytes));
      }),
      { numRuns: 500 },
    );
  });
});

async function readOrRefuse(bytes: Uint8Array): Promise<void> {
  try {
    expectSound(await readText(bytes));
  } catch (error) {
    if (!(error instanceof Error) || error.name !== "InputError") throw error;
    expect(error.message).toMatch(/^winds\.csv/);
    expect(error.message.length).toBeLessThan(1500);
    expect(error.message).not.toMatch(/undefined|\[object/);
  }
}

/** Axes strictly ascending, every array of its size, no vector that is not a number. */
function expectSound(grid: GridFile): void {
  const axes = [grid.lon, grid.lat, grid.height, grid.times].flatMap((one) => (one === null ? [] : [one]));
  for (const values of axes) {
    for (let index = 1; index < values.length; index++)
      expect(values[index]).toBeGreaterThan(values[index - 1] as number);
  }
  const nodes = grid.lon.length * grid.lat.length * (grid.height?.length ?? 1);
  expect(grid.slices.length).toBe(grid.times?.length ?? 1);
  for (const slice of grid.slices) {
    expect(slice.length).toBe(2 * nodes);
    expect(slice.every(Number.isFinite)).toBe(true);
  }
  for (const mask of grid.masks) if (mask !== null) expect(mask.length).toBe(nodes);
}
