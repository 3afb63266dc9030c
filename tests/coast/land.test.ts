import { describe, expect, it } from "vitest";
import { prepareLand } from "../../src/coast/land.ts";
import { isOnLand } from "../../src/coast/land-crossings.ts";
import { naturalEarth } from "./natural-earth.ts";

const topology = naturalEarth();
const before = JSON.stringify(topology).length;
const land = prepareLand(topology);

/** Positions from memory of the atlas, each tens of km from the nearest coast unless said. */
const ON_LAND: [string, number, number][] = [
  ["Central Europe", 48.1, 11.6],
  ["the Amazon basin", -5, -62],
  ["the Sahara", 23, 10],
  ["Siberia", 62, 105],
  ["Siberia east of the antimeridian", 66.5, -176],
  ["Siberia on the antimeridian", 67.5, 180],
  ["Central Australia", -25, 134],
  ["Madagascar", -19, 47],
  ["Iceland", 64.9, -18.5],
  ["Tasmania", -42, 146.6],
  ["Wrangel Island, cut by the antimeridian, its western half", 71.2, 179.5],
  ["Wrangel Island, its eastern half", 71.2, -178.7],
  ["the South Pole", -90, 0],
  ["Antarctica", -85, 100],
  ["Antarctica on the antimeridian", -86, 180],
  ["Greenland", 75, -40],
];

const AT_SEA: [string, number, number][] = [
  ["the North Atlantic", 45, -35],
  ["the Gulf of Guinea at 0, 0, where the data has a placeholder island", 0, 0],
  ["the North Sea", 56, 3],
  ["the Mediterranean", 34, 20],
  ["the Black Sea", 43, 34],
  ["the Baltic", 58.5, 20],
  ["the Red Sea", 20, 38.5],
  ["the Persian Gulf", 27, 51.5],
  ["Hudson Bay", 60, -86],
  ["the Bering Sea on the antimeridian", 58, 180],
  ["the Pacific on the antimeridian", 0, -180],
  ["the North Pole", 90, 0],
  ["the Southern Ocean", -62, 40],
  ["the English Channel", 50, -2],
  ["the Caspian Sea, which the data cuts out", 42, 50.5],
  ["the Ross Ice Shelf, which is no land", -81, -175],
];

describe("land of Natural Earth 1:10m", () => {
  it.each(ON_LAND)("has %s on it", (_, lat, lon) => {
    expect(isOnLand(land, { lat, lon })).toBe(true);
    expect(isOnLand(land, { lat, lon: lon + 360 })).toBe(true);
    expect(isOnLand(land, { lat, lon: lon - 360 })).toBe(true);
  });

  it.each(AT_SEA)("leaves %s at sea", (_, lat, lon) => {
    expect(isOnLand(land, { lat, lon })).toBe(false);
    expect(isOnLand(land, { lat, lon: lon + 360 })).toBe(false);
    expect(isOnLand(land, { lat, lon: lon - 360 })).toBe(false);
  });

  it.each([
    ["Lake Superior", 47.7, -87.5],
    ["Lake Victoria", -1, 33],
    ["Lake Baikal", 53.5, 108.2],
  ])("counts %s as land, since it has no lakes cut out", (_, lat, lon) => {
    expect(isOnLand(land, { lat, lon })).toBe(true);
  });

  it("is prepared without a change to the topology", () => {
    expect(JSON.stringify(topology).length).toBe(before);
  });

  it("holds every ring within one cell and every number finite", () => {
    const ranges = [...land.ringRange];
    const rings = ranges.reduce((sum, at, i) => sum + (i % 2 === 0 ? -at : at), 0);
    expect(rings).toBe(land.ringStart.length - 1);
    expect(land.ringStart.at(-1)).toBe(land.xy.length);
    expect(land.xy.every(Number.isFinite)).toBe(true);
  });
});

/** A topology of one polygon whose rings are given, closed, in degrees. */
const topologyOf = (...rings: [number, number][][]) =>
  ({
    type: "Topology",
    arcs: rings,
    objects: { land: { type: "Polygon", arcs: rings.map((_, i) => [i]) } },
  }) as const;

describe("land of a made topology", () => {
  it("has a hole where a ring lies within another", () => {
    const made = prepareLand(
      topologyOf(
        [
          [10, 10],
          [20, 10],
          [20, 20],
          [10, 20],
          [10, 10],
        ],
        [
          [13, 13],
          [13, 17],
          [17, 17],
          [17, 13],
          [13, 13],
        ],
      ),
    );
    expect(isOnLand(made, { lat: 11, lon: 15 })).toBe(true);
    expect(isOnLand(made, { lat: 15, lon: 15 })).toBe(false);
    expect(isOnLand(made, { lat: 15, lon: 19 })).toBe(true);
    expect(isOnLand(made, { lat: 15, lon: 21 })).toBe(false);
  });

  it("is what any polygon covers where two overlap", () => {
    const square = (west: number): [number, number][] => [
      [west, 0],
      [west + 4, 0],
      [west + 4, 4],
      [west, 4],
      [west, 0],
    ];
    const made = prepareLand({
      type: "Topology",
      arcs: [square(10), square(12)],
      objects: { land: { type: "MultiPolygon", arcs: [[[0]], [[1]]] } },
    });
    for (const lon of [11, 13, 15]) expect(isOnLand(made, { lat: 2, lon })).toBe(true);
    expect(isOnLand(made, { lat: 2, lon: 17 })).toBe(false);
  });

  it("is joined across the antimeridian where a ring steps from 180 to -180", () => {
    const made = prepareLand(
      topologyOf([
        [170, -10],
        [-170, -10],
        [-170, 10],
        [170, 10],
        [170, -10],
      ]),
    );
    for (const lon of [171, 179.999, 180, -180, -179.999, -171, 185, 535]) {
      expect(isOnLand(made, { lat: 3, lon })).toBe(true);
    }
    for (const lon of [0, 169, -169, 90, -90]) expect(isOnLand(made, { lat: 3, lon })).toBe(false);
  });

  it.each([
    ["north", 1],
    ["south", -1],
  ])("covers the %s pole where a ring goes round it", (_, sign) => {
    const ring = Array.from({ length: 36 }, (__, i): [number, number] => [-180 + 10 * i, 80 * sign]);
    const made = prepareLand(topologyOf([...ring, [-180, 80 * sign]]));
    for (const lon of [-180, -17, 0, 99.5, 180]) {
      expect(isOnLand(made, { lat: 80.5 * sign, lon })).toBe(true);
      expect(isOnLand(made, { lat: 90 * sign, lon })).toBe(true);
      expect(isOnLand(made, { lat: 79.5 * sign, lon })).toBe(false);
      expect(isOnLand(made, { lat: -85 * sign, lon })).toBe(false);
    }
  });

  it("is refused where the topology has none", () => {
    const empty = { type: "Topology", arcs: [], objects: {} } as unknown as Parameters<typeof prepareLand>[0];
    expect(() => prepareLand(empty)).toThrow(TypeError);
  });
});
