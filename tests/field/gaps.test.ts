import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { NODE_FILLED, NODE_GIVEN, NODE_MISSING } from "../../src/field/field.ts";
import { applyGapPolicy } from "../../src/field/gaps.ts";
import type { GridFile } from "../../src/field/grid-file.ts";
import { makeGrid } from "./make-grid.ts";

/** A grid drawn from north to south, as on a chart: a number is a node's u (its v is the negative), a dot a missing node. */
function drawn(rows: readonly string[], global = false): GridFile {
  const cells = rows.map((row) => row.trim().split(/\s+/)).reverse();
  const width = (cells[0] as string[]).length;
  return makeGrid({
    lon: Array.from({ length: width }, (_, i) => (global ? (360 / (width - 1)) * i : i)),
    lat: cells.map((_, j) => j),
    global,
    at: (lon, lat) => {
      const cell = cells[lat]?.[global ? Math.round((lon * (width - 1)) / 360) : lon] as string;
      return cell === "." ? null : [Number(cell), -Number(cell)];
    },
  });
}

/** The same drawing of a grid's first slice, with filled nodes in brackets. */
function drawing(grid: GridFile): string[] {
  const width = grid.lon.length;
  const cells = Array.from({ length: width * grid.lat.length }, (_, node) => {
    const state = grid.masks[0]?.[node] ?? NODE_GIVEN;
    const u = grid.slices[0]?.[2 * node] as number;
    expect(grid.slices[0]?.[2 * node + 1]).toBe(u === 0 ? grid.slices[0]?.[2 * node + 1] : -u);
    if (state === NODE_MISSING) expect(u).toBe(0);
    return state === NODE_MISSING ? "." : state === NODE_FILLED ? `(${u})` : `${u}`;
  });
  const rows = Array.from(grid.lat, (_, j) => cells.slice(j * width, (j + 1) * width).join(" "));
  return rows.reverse();
}

describe("the policy nearest", () => {
  test("takes the nearest of the neighbours", () => {
    expect(drawing(applyGapPolicy(drawn(["1 2 3", ". . 6", ". . 9"]), "nearest"))).toEqual([
      "1 2 3",
      "(1) (6) 6",
      "(9) (9) 9",
    ]);
  });

  test("prefers the more southern of equals, then the more western", () => {
    expect(drawing(applyGapPolicy(drawn(["7 1 7", "2 . 3", "7 4 7"]), "nearest"))[1]).toBe("2 (4) 3");
    expect(drawing(applyGapPolicy(drawn(["7 1 7", "2 . 3", "7 . 7"]), "nearest"))[1]).toBe("2 (2) 3");
    expect(drawing(applyGapPolicy(drawn(["7 1 7", ". . 3", "7 . 7"]), "nearest"))[1]).toBe("(7) (3) 3");
    expect(drawing(applyGapPolicy(drawn(["8 1 9", ". . .", "6 . 5"]), "nearest"))[1]).toBe("(6) (1) (5)");
  });

  test("takes a diagonal neighbour before one two steps away", () => {
    expect(drawing(applyGapPolicy(drawn([". . .", ". 8 .", ". . 7"]), "nearest"))[2]).toBe("(8) (7) 7");
    expect(drawing(applyGapPolicy(drawn(["5 . .", ". . .", ". 6 ."]), "nearest"))[1]).toBe("(5) (6) (6)");
  });

  test("reaches two steps on either axis, corners included, and no further", () => {
    expect(drawing(applyGapPolicy(drawn([". . . 1", ". . . .", ". . . .", ". . . ."]), "nearest"))).toEqual([
      ". (1) (1) 1",
      ". (1) (1) (1)",
      ". (1) (1) (1)",
      ". . . .",
    ]);
  });

  test("takes only given nodes, never one filled before", () => {
    expect(drawing(applyGapPolicy(drawn(["1 . . . . . 2"]), "nearest"))).toEqual(["1 (1) (1) . (2) (2) 2"]);
  });

  test("goes around a global grid, whose last meridian is its first", () => {
    expect(drawing(applyGapPolicy(drawn([". . . . 5 .", "1 2 3 4 . 1"], true), "nearest"))).toEqual([
      "(1) (2) (3) (4) 5 (1)",
      "1 2 3 4 (4) 1",
    ]);
    expect(drawing(applyGapPolicy(drawn([". 2 . . 5 ."], true), "nearest"))).toEqual(["(5) 2 (2) (5) 5 (5)"]);
    expect(drawing(applyGapPolicy(drawn([". . . . 5 ."], true), "nearest"))).toEqual([
      "(5) (5) (5) (5) 5 (5)",
    ]);
  });

  test("stays within the level and the time", () => {
    const grid = makeGrid({
      lon: [0, 1],
      lat: [0],
      height: [0, 10],
      times: [0, 1],
      at: (lon, _, height, time) =>
        time === 0 && height === 0
          ? lon === 0
            ? null
            : [7, 7]
          : time === 1 && height === 10
            ? null
            : [1, 1],
    });
    const filled = applyGapPolicy(grid, "nearest");
    expect([...(filled.slices[0] as Float64Array)]).toEqual([7, 7, 7, 7, 1, 1, 1, 1]);
    expect([...(filled.masks[1] as Uint8Array)]).toEqual([0, 0, NODE_MISSING, NODE_MISSING]);
  });

  test("is the least Δi² + Δj² of all valid nodes within two steps, found by looking at all of them", () => {
    const maps = fc.array(fc.array(fc.boolean(), { minLength: 7, maxLength: 7 }), {
      minLength: 6,
      maxLength: 6,
    });
    fc.assert(
      fc.property(maps, (given) => {
        const grid = makeGrid({
          lon: [0, 1, 2, 3, 4, 5, 6],
          lat: [0, 1, 2, 3, 4, 5],
          at: (lon, lat) => (given[lat]?.[lon] ? [1 + 10 * lat + lon, 0] : null),
        });
        const filled = applyGapPolicy(grid, "nearest");
        for (let j = 0; j < 6; j++) {
          for (let i = 0; i < 7; i++) {
            if (given[j]?.[i]) continue;
            const around = given.flatMap((row, jj) =>
              row.flatMap((is, ii) =>
                is && Math.abs(ii - i) <= 2 && Math.abs(jj - j) <= 2 ? [[jj, ii] as const] : [],
              ),
            );
            const [best] = around.sort(
              (a, b) =>
                (a[0] - j) ** 2 + (a[1] - i) ** 2 - (b[0] - j) ** 2 - (b[1] - i) ** 2 ||
                a[0] - b[0] ||
                a[1] - b[1],
            );
            const node = j * 7 + i;
            expect(filled.masks[0]?.[node]).toBe(best === undefined ? NODE_MISSING : NODE_FILLED);
            expect(filled.slices[0]?.[2 * node]).toBe(best === undefined ? 0 : 1 + 10 * best[0] + best[1]);
          }
        }
      }),
      { numRuns: 200 },
    );
  });
});

describe("the other policies", () => {
  test("zero fills with nothing moving, stop leaves the gap", () => {
    expect(drawing(applyGapPolicy(drawn(["1 . . . . . 2"]), "zero"))).toEqual(["1 (0) (0) (0) (0) (0) 2"]);
    expect(drawing(applyGapPolicy(drawn(["1 . 2"]), "stop"))).toEqual(["1 . 2"]);
  });

  test("can take one another's place", () => {
    const grid = drawn(["1 . . 2"]);
    const nearest = applyGapPolicy(grid, "nearest");
    expect(drawing(applyGapPolicy(nearest, "zero"))).toEqual(["1 (0) (0) 2"]);
    expect(drawing(applyGapPolicy(nearest, "nearest"))).toEqual(["1 (1) (2) 2"]);
    expect(drawing(applyGapPolicy(nearest, "stop"))).toEqual(["1 . . 2"]);
  });

  test("leave a grid without gaps, and its gusts, as they are", () => {
    const grid = makeGrid({
      lon: [0, 1],
      lat: [0],
      at: () => [1, 2],
      gust: (lon) => (lon === 0 ? Number.NaN : 9),
    });
    const same = applyGapPolicy(grid, "nearest");
    expect(same.masks).toEqual([null]);
    expect(same.gusts).toEqual([Float64Array.of(Number.NaN, 9)]);
  });

  test("keep one mask for times that share their gaps", () => {
    const grid = makeGrid({
      lon: [0, 1],
      lat: [0],
      times: [0, 1],
      at: (lon, _, __, time) => (lon === 0 ? null : [time, time]),
    });
    const shared = { ...grid, masks: [grid.masks[0] as Uint8Array, grid.masks[0] as Uint8Array] };
    const filled = applyGapPolicy(shared, "nearest");
    expect(filled.masks[0]).toBe(filled.masks[1]);
    expect(filled.slices.map((slice) => slice[0])).toEqual([0, 1]);
  });
});
