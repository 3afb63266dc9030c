import { readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { indexCoast } from "../../web/worker/coast-index.ts";
import { createCoastShelf } from "../../web/worker/coast-shelf.ts";

const coarse: unknown = JSON.parse(
  readFileSync(new URL("../../node_modules/world-atlas/land-110m.json", import.meta.url), "utf8"),
);

describe("the coastline index", () => {
  const index = indexCoast(coarse, "50m");

  test("cuts the whole world into rings that close", () => {
    const tile = index.tile(0, 0, 0);
    expect(tile.ends.length).toBeGreaterThan(50);
    expect(tile.ends.at(-1)).toBe(tile.points.length / 2);
    let start = 0;
    for (const end of tile.ends) {
      expect(tile.points.slice(2 * start, 2 * start + 2)).toEqual(tile.points.slice(2 * end - 2, 2 * end));
      start = end;
    }
  });

  test("covers the middle of a continent from edge to edge", () => {
    // 10° E, 20° N lies in the Sahara: at zoom 8 tile x = (10 + 180) / 360 · 256 = 135, y = 113.
    const { points, ends } = index.tile(8, 135, 113);
    expect(ends.length).toBe(1);
    const xs = points.filter((_, at) => at % 2 === 0);
    expect(Math.min(...xs)).toBeLessThanOrEqual(0);
    expect(Math.max(...xs)).toBeGreaterThanOrEqual(4096);
  });

  test("draws no line around the world where land crosses the antimeridian", () => {
    // A ring that stepped across it would span a tile of the whole world from side to side; only Antarctica's does.
    const { points, ends } = index.tile(0, 0, 0);
    let start = 0;
    const wide: number[] = [];
    for (const end of ends) {
      const xs = points.slice(2 * start, 2 * end).filter((_, at) => at % 2 === 0);
      const ys = points.slice(2 * start, 2 * end).filter((_, at) => at % 2 === 1);
      if (Math.max(...xs) - Math.min(...xs) > 4000) wide.push(Math.min(...ys));
      start = end;
    }
    expect(wide.length).toBe(1);
    // 63° S, the tip of the peninsula, stands at about 0.73 of the square.
    expect(wide[0]).toBeGreaterThan(0.7 * 4096);
  });

  test("is empty in the middle of an ocean", () => {
    expect(index.tile(6, 5, 32).ends.length).toBe(0);
  });

  test("refuses a topology without land", () => {
    expect(() => indexCoast({ objects: {} }, "10m")).toThrow("no land in the 10m coastline");
  });
});

describe("the shelf of coastlines", () => {
  test("fetches each coast once, and gives the coarse one until the fine one is there", async () => {
    const fetched: string[] = [];
    const shelf = createCoastShelf(async (detail) => {
      fetched.push(detail);
      return coarse;
    });
    expect((await shelf.tile(3, 4, 3, "10m")).detail).toBe("50m");
    await shelf.load("10m");
    expect((await shelf.tile(3, 4, 3, "10m")).detail).toBe("10m");
    await shelf.tile(3, 4, 2, "50m");
    expect(fetched).toEqual(["50m", "10m"]);
  });

  test("tries again after a failure", async () => {
    let online = false;
    const shelf = createCoastShelf(async () => {
      if (!online) throw new Error("offline");
      return coarse;
    });
    await expect(shelf.tile(0, 0, 0, "50m")).rejects.toThrow("offline");
    online = true;
    expect((await shelf.tile(0, 0, 0, "50m")).ends.length).toBeGreaterThan(0);
  });
});
