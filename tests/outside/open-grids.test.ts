import { readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { beforeAll, describe, expect, it } from "vitest";
import { constantPower } from "../../src/craft/constant.ts";
import { readGridFile } from "../../src/field/csv.ts";
import type { Field } from "../../src/field/field.ts";
import type { GridFile } from "../../src/field/grid-file.ts";
import { mergeField } from "../../src/field/merge.ts";
import type { PathKind } from "../../src/geodesy/track.ts";
import { craftOf, routeOf, waypoint } from "../estimate/fixtures.ts";
import { opened } from "../field/read-text.ts";
import { expectAgreement, integrateByPeer, type PeerFile, type PeerLeg } from "./peer-leg.ts";

/*
 * Open wind grids (data/; origin and recipe in README.md) through our CSV reader, and legs on them against SciPy, which reads the
 * files for itself.
 */

const path = (name: string): string => fileURLToPath(new URL(`data/${name}`, import.meta.url));
const read = (name: string, columns: Record<string, string> = {}): Promise<GridFile> =>
  readGridFile(opened(readFileSync(path(name)), 50_000), { file: name, role: "wind", columns });

/** Simulated winds over northwestern Europe, 0.25°, longitudes 0.125 … 9.875 and then -9.875 … -0.125. */
const EUROPE: PeerFile = {
  file: path("vega-windvectors.csv"),
  role: "wind",
  // The file does not say what its direction is of: both sides take it as the one that the wind comes from.
  columns: { lat: "latitude", lon: "longitude", speed: "speed", from: "dir" },
  global: false,
  pole: 1,
};
/** A global analysis of the wind at 10 m, 2°, longitudes 0 … 358. */
const GLOBE: PeerFile = {
  file: path("gfs-10m-wind-2023-06-01.csv"),
  role: "wind",
  columns: { lat: "latitude", lon: "longitude", u: "u", v: "v" },
  global: true,
  pole: 1,
};

type Ends = readonly [lat1: number, lon1: number, lat2: number, lon2: number];
const EUROPEAN: readonly (readonly [name: string, PathKind, Ends])[] = [
  ["a geodesic from southwest to northeast over the seam of its rows", "geodesic", [45.9, -8.3, 58.7, 9.2]],
  ["a rhumb line back", "rhumb", [58.7, 9.2, 45.9, -8.3]],
  ["a rhumb line along a parallel of nodes", "rhumb", [52.125, -9.5, 52.125, 9.3]],
];
const GLOBAL: readonly (readonly [name: string, PathKind, Ends])[] = [
  ["a geodesic over the antimeridian", "geodesic", [35.5, 139.8, 37.6, -122.4]],
  ["a rhumb line over the seam at Greenwich", "rhumb", [-34.2, 18.3, 14.7, -17.6]],
  ["a geodesic past the north pole", "geodesic", [71.2, -24.5, 68.9, 171.3]],
  ["a geodesic along a meridian to the north pole", "geodesic", [78.2, 15.6, 90, 15.6]],
];

/** Fast enough for the strongest wind of either file. */
const pace = { hold: "through-speed", speed_m_s: 42 } as const;

const peerLeg = (
  [name, kind, [lat1, lon1, lat2, lon2]]: (typeof EUROPEAN)[number],
  field: Field,
  peerFile: PeerFile,
): PeerLeg => ({
  name,
  route: routeOf(waypoint("from", lat1, lon1), waypoint("to", lat2, lon2, { path: kind })),
  craft: craftOf({ power: constantPower("W", 1000) }),
  pace,
  fields: [field],
  power: { model: "constant", rate: 1000 },
  peerFile,
});
const fieldOf = (grid: GridFile): Field =>
  mergeField("wind", [{ grid, gaps: "stop", beyond: "stop", outside: "stop" }]);

describe("open wind grids", () => {
  let europe: GridFile;
  let globe: GridFile;
  let legs: PeerLeg[] = [];
  let answers: ReturnType<typeof integrateByPeer> = [];
  beforeAll(async () => {
    europe = await read("vega-windvectors.csv", { wind_from_direction: "dir" });
    globe = await read("gfs-10m-wind-2023-06-01.csv");
    legs = [
      ...EUROPEAN.map((leg) => peerLeg(leg, fieldOf(europe), EUROPE)),
      ...GLOBAL.map((leg) => peerLeg(leg, fieldOf(globe), GLOBE)),
    ];
    answers = integrateByPeer(legs);
  }, 120_000);

  it("reads the European grid: 80 by 60 nodes, regional, every one given, dirCat left out", () => {
    expect([europe.lon.length, europe.lat.length, europe.global]).toEqual([80, 60, false]);
    expect([europe.lon[0], europe.lon.at(-1), europe.lat[0], europe.lat.at(-1)]).toEqual([
      -9.875, 9.875, 45.125, 59.875,
    ]);
    expect(europe.masks).toEqual([null]);
    expect(europe.ignoredColumns).toEqual(["dirCat"]);
  });

  it("reads the global grid: closed round the globe, both poles, its note kept", () => {
    expect([globe.lon.length, globe.lat.length, globe.global]).toEqual([181, 91, true]);
    expect((globe.lon.at(-1) as number) - (globe.lon[0] as number)).toBe(360);
    expect([globe.lat[0], globe.lat.at(-1)]).toEqual([-90, 90]);
    expect(globe.masks).toEqual([null]);
    expect(globe.notes).toHaveLength(1);
  });

  [...EUROPEAN, ...GLOBAL].forEach(([name], n) => {
    it(`agrees with SciPy on ${n < EUROPEAN.length ? "the European" : "the global"} grid: ${name}`, () => {
      expectAgreement(legs[n] as PeerLeg, answers[n] as (typeof answers)[number]);
    });
  });
});
