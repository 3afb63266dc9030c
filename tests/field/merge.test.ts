import { describe, expect, test } from "vitest";
import type { GridFile } from "../../src/field/grid-file.ts";
import { type FieldSource, mergeField } from "../../src/field/merge.ts";
import { makeGrid } from "./make-grid.ts";

const HOUR = 3_600_000;

/** A two by one grid whose u is the file's number, with times in hours. */
function timed(
  number: number,
  hours: readonly number[],
  more: Partial<Parameters<typeof makeGrid>[0]> = {},
): GridFile {
  const times = hours.map((hour) => hour * HOUR);
  return makeGrid({ lon: [0, 1], lat: [50], times, file: `${number}.csv`, at: () => [number, 0], ...more });
}

function source(grid: GridFile, policies: Partial<FieldSource> = {}): FieldSource {
  return { grid, gaps: "nearest", beyond: "stop", outside: "stop", ...policies };
}

/** Times in hours with the number of the file that each comes from. */
function timetable(tile: {
  readonly times: Float64Array | null;
  readonly slices: readonly Float64Array[];
}): string {
  return [...(tile.times ?? [])].map((time, index) => `${time / HOUR}:${tile.slices[index]?.[0]}`).join(" ");
}

describe("files of one role", () => {
  test("with the same axes are joined along time, in any order, without copying", () => {
    const [first, second] = [timed(1, [0, 3, 6]), timed(2, [9, 12])];
    const field = mergeField("wind", [source(second), source(first)]);
    expect(field.tiles.length).toBe(1);
    expect(timetable(field.tiles[0] as never)).toBe("0:1 3:1 6:1 9:2 12:2");
    expect(field.tiles[0]?.slices[3]).toBe(second.slices[0]);
    expect(field.tiles[0]?.files).toEqual(["2.csv", "1.csv"]);
  });

  test("that overlap in time leave what the earlier in the list spans to it", () => {
    const [a, b, c] = [timed(1, [0, 3, 6]), timed(2, [1, 6, 7, 12]), timed(3, [-3, 5, 9, 15])];
    const merged = mergeField("wind", [source(a), source(b), source(c)]);
    expect(timetable(merged.tiles[0] as never)).toBe("-3:3 0:1 3:1 6:1 7:2 12:2 15:3");
  });

  test("that have nothing to add are not among the tile's files", () => {
    const merged = mergeField("wind", [source(timed(1, [0, 6])), source(timed(2, [1, 5]))]);
    expect(merged.tiles[0]?.files).toEqual(["1.csv"]);
  });

  test("with other latitudes, longitudes or heights are tiles in the order of the list", () => {
    const grids = [
      timed(1, [0]),
      timed(2, [0], { lat: [51] }),
      timed(3, [0], { lon: [0, 1.001] }),
      timed(4, [0], { height: [10] }),
      timed(5, [1]),
      timed(6, [1], { height: [20] }),
    ];
    const { tiles } = mergeField(
      "wind",
      grids.map((grid) => source(grid)),
    );
    expect(tiles.map(({ files }) => files.join("+"))).toEqual([
      "1.csv+5.csv",
      "2.csv",
      "3.csv",
      "4.csv",
      "6.csv",
    ]);
  });

  test("with axes that differ by the rounding of their numbers are joined", () => {
    const { tiles } = mergeField("wind", [
      source(timed(1, [0])),
      source(timed(2, [1], { lon: [0, 1 + 1e-12] })),
    ]);
    expect(tiles.length).toBe(1);
  });

  test("of which one is steady stay apart", () => {
    const steady = makeGrid({ lon: [0, 1], lat: [50], file: "steady.csv", at: () => [9, 9] });
    const { tiles } = mergeField("wind", [
      source(steady),
      source(timed(1, [0])),
      source({ ...steady, file: "other.csv" }),
    ]);
    expect(tiles.map(({ times }) => times?.length ?? null)).toEqual([null, 1, null]);
  });

  test("hold beyond their last time by the policy of the file that has it", () => {
    const late = source(timed(1, [6]), { beyond: "hold" });
    const early = source(timed(2, [0]), { beyond: "stop" });
    expect(mergeField("wind", [late, early]).tiles[0]?.beyond).toBe("hold");
    expect(mergeField("wind", [source(timed(1, [6])), { ...early, beyond: "hold" }]).tiles[0]?.beyond).toBe(
      "stop",
    );
  });

  test("are zero outside where any of them says so", () => {
    expect(
      mergeField("wind", [source(timed(1, [0])), source(timed(2, [1]), { outside: "zero" })]).outside,
    ).toBe("zero");
    expect(mergeField("current", [source(timed(1, [0]))]).outside).toBe("stop");
  });

  test("each fill their gaps by their own policy", () => {
    const gap: Partial<Parameters<typeof makeGrid>[0]> = { at: (lon) => (lon === 0 ? [7, 7] : null) };
    const sources = [
      source(timed(1, [0], gap)),
      source(timed(2, [1], gap), { gaps: "zero" }),
      source(timed(3, [2], gap), { gaps: "stop" }),
    ];
    const tile = mergeField("wind", sources).tiles[0];
    expect(tile?.slices.map((slice) => slice[2])).toEqual([7, 0, 0]);
    expect(tile?.masks.map((mask) => mask?.[1])).toEqual([1, 1, 2]);
  });

  test("of which one lacks gusts have missing gusts at its times", () => {
    const { tiles } = mergeField("wind", [source(timed(1, [0], { gust: () => 5 })), source(timed(2, [1]))]);
    expect(tiles[0]?.gusts).toEqual([Float64Array.of(5, 5), Float64Array.of(Number.NaN, Number.NaN)]);
    expect(mergeField("wind", [source(timed(1, [0]))]).tiles[0]?.gusts).toBeNull();
  });
});
