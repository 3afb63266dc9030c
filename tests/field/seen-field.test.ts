import fc from "fast-check";
import { describe, expect, test } from "vitest";
import type { GridFile } from "../../src/field/grid-file.ts";
import { type FieldSource, mergeField } from "../../src/field/merge.ts";
import { sampleField } from "../../src/field/sample.ts";
import { seenField } from "../../src/field/seen-field.ts";
import { makeGrid } from "./make-grid.ts";

const HOUR = 3_600_000;

function grid(file: string, more: Partial<Parameters<typeof makeGrid>[0]> = {}): GridFile {
  return makeGrid({ lon: [0, 1, 2], lat: [50, 51], file, at: () => [1, 0], ...more });
}
const hours = (...list: readonly number[]) => ({ times: list.map((hour) => hour * HOUR) });
function source(of: GridFile, policies: Partial<FieldSource> = {}): FieldSource {
  return { grid: of, gaps: "nearest", beyond: "stop", outside: "stop", ...policies };
}
/** Each hidden file with those that cover it, as `b<a`. */
function hiddenOf(...sources: readonly FieldSource[]): string[] {
  return seenField("wind", sources).hidden.map(
    ({ source: own, by }) => `${own.grid.file}<${by.map((each) => each.grid.file).join("+")}`,
  );
}

describe("a file that earlier ones cover", () => {
  test.each<[string, readonly FieldSource[], readonly string[]]>([
    ["the same steady grid", [source(grid("a")), source(grid("b"))], ["b<a"]],
    ["the same times", [source(grid("a", hours(0, 6))), source(grid("b", hours(0, 6)))], ["b<a"]],
    ["times between", [source(grid("a", hours(0, 6))), source(grid("b", hours(1, 2, 3)))], ["b<a"]],
    [
      "times that two earlier ones span",
      [source(grid("a", hours(0, 6))), source(grid("b", hours(7, 9))), source(grid("c", hours(6, 8)))],
      ["c<a+b"],
    ],
    [
      "a finer grid within",
      [source(grid("a", hours(0, 6))), source(grid("b", { lon: [0.5, 0.75], lat: [50.5], ...hours(2, 4) }))],
      ["b<a"],
    ],
    [
      "an area of a world-wide grid, whatever its turn",
      [
        source(grid("a", { lon: [0, 90, 180, 270, 360], global: true })),
        source(grid("b", { lon: [-20, -10] })),
      ],
      ["b<a"],
    ],
    [
      "an area a turn away",
      [source(grid("a", { lon: [350, 360, 370] })), source(grid("b", { lon: [-9, 9] }))],
      ["b<a"],
    ],
    ["a timed file after a steady one", [source(grid("a")), source(grid("b", hours(0, 6)))], ["b<a"]],
    ["another height", [source(grid("a")), source(grid("b", { height: [100] }))], ["b<a"]],
    [
      "last values held as the earlier one's are",
      [
        source(grid("a", hours(0, 6)), { beyond: "hold" }),
        source(grid("b", { lat: [50, 50.5], ...hours(0, 6) }), { beyond: "hold" }),
      ],
      ["b<a"],
    ],
  ])("is named with them: %s", (_, sources, hidden) => {
    expect(hiddenOf(...sources)).toEqual(hidden);
    const { field } = seenField("wind", sources);
    const files = field.tiles.flatMap(({ files: own }) => own);
    for (const each of hidden) expect(files).not.toContain(each.split("<")[0]);
  });

  test.each<[string, readonly FieldSource[]]>([
    ["a time more", [source(grid("a", hours(0, 6))), source(grid("b", hours(0, 7)))]],
    [
      "a time between two files' spans",
      [source(grid("a", hours(0, 3))), source(grid("b", hours(6, 9))), source(grid("c", hours(4, 5)))],
    ],
    ["a larger area", [source(grid("a")), source(grid("b", { lon: [0, 1, 2, 3] }))]],
    ["an area across the edge", [source(grid("a")), source(grid("b", { lon: [-1, 1] }))]],
    ["an area in another turn", [source(grid("a")), source(grid("b", { lon: [180, 181] }))]],
    ["a steady file after a timed one", [source(grid("a", hours(0, 6))), source(grid("b"))]],
    [
      "last values held where the earlier one's are not",
      [
        source(grid("a", hours(0, 6))),
        source(grid("b", { lat: [50, 50.5], ...hours(0, 6) }), { beyond: "hold" }),
      ],
    ],
  ])("is not one with %s", (_, sources) => {
    expect(hiddenOf(...sources)).toEqual([]);
  });

  test("holds nowhere: what is left gives the same everywhere and at all times", () => {
    const axis = fc.uniqueArray(fc.integer({ min: 0, max: 4 }), { minLength: 1, maxLength: 3 });
    const ascending = (values: readonly number[]) => [...values].sort((a, b) => a - b);
    const any = fc.record({
      lon: axis,
      lat: axis,
      times: fc.option(axis),
      beyond: fc.constantFrom("stop", "hold"),
    });
    const halves = Array.from({ length: 12 }, (_, n) => n / 2 - 0.5);
    let hiddenInAll = 0;
    fc.assert(
      fc.property(fc.array(any, { minLength: 1, maxLength: 5 }), (all) => {
        const sources = all.map(({ lon, lat, times, beyond }, n) =>
          source(
            grid(`${n}`, {
              lon: ascending(lon),
              lat: ascending(lat),
              at: () => [n, 1],
              ...(times === null ? {} : hours(...ascending(times))),
            }),
            { beyond },
          ),
        );
        const { field, hidden } = seenField("wind", sources);
        const whole = mergeField("wind", sources);
        for (const place of halves)
          for (const lon of halves)
            for (const hour of halves)
              expect(sampleField(field, place, lon, null, hour * HOUR)).toEqual(
                sampleField(whole, place, lon, null, hour * HOUR),
              );
        const used = field.tiles.flatMap((tile) => tile.files);
        expect([...used, ...hidden.map(({ source: own }) => own.grid.file)].sort()).toEqual(
          all.map((_, n) => `${n}`),
        );
        for (const { by } of hidden) {
          expect(by.length).toBeGreaterThan(0);
          for (const each of by) expect(used).toContain(each.grid.file);
        }
        hiddenInAll += hidden.length;
      }),
      { numRuns: 60, endOnFailure: true },
    );
    expect(hiddenInAll).toBeGreaterThan(0);
  });
});
