import { writeFileSync } from "node:fs";
import { join } from "node:path";
import { type Flow, makeFlow, resolve, shareOf } from "../../src/estimate/flow.ts";
import { STATIONS } from "../../src/estimate/gauss-kronrod.ts";
import type { PreparedRoute } from "../../src/estimate/prepare.ts";
import { project } from "../../src/estimate/project.ts";
import { layMiddle, layStations, makeStations, type Stations } from "../../src/estimate/stations.ts";
import { sampleLattice } from "../../src/field/lattice.ts";
import { type FieldSample, sampleField } from "../../src/field/sample.ts";
import { faster, type Part } from "./comparison.ts";
import { type Ocean, oceanConditions } from "./ocean.ts";
import type { PythonPeer } from "./python-peer.ts";
import { type Contestant, inProcess, type Timing, takeTurns } from "./timing.ts";

const ROUNDS = 9;
const DEPARTURE_S = 600;
const ROUTE = 2;
/** Times that the points are gone through in a round. */
const REPEATS = 20;
/** Speed over ground that gives the points their times, m/s. */
const ADVANCE = 16;
const NS = [1e-9, "ns a pair"] as const;

/** The stations of one panel, laid beforehand: all sides are handed places and times. */
interface Stretch {
  readonly leg: number;
  readonly panel: number;
  readonly polar: boolean;
  readonly stations: Stations;
  /** Seconds since departure at the start and at every station. */
  readonly start: number;
  readonly times: Float64Array;
}

/** (u, v) pairs along the track of a route, place and time given. */
export async function interpolation(ocean: Ocean, folder: string, peer: PythonPeer | null): Promise<Part> {
  const stretches = stretchesOf(ocean);
  const count = stretches.length * STATIONS * REPEATS;
  const lattice = latticePoints();
  const contestants: Contestant[] = [
    inProcess("project, station by station", count, () => alongTrack(ocean, stretches)),
    inProcess("sampleField", count, () => samples(ocean, stretches)),
    inProcess("sampleLattice", lattice.lats.length * lattice.lons.length, () => {
      const time = oceanConditions(ocean.wind, 5000).departure;
      return sampleLattice(ocean.wind, lattice.lats, lattice.lons, null, time).u.reduce((a, b) => a + b, 0);
    }),
  ];
  if (peer !== null) {
    const file = join(folder, "points.f64");
    writeFileSync(file, pointTable(stretches));
    await peer.ask("points", { file });
    contestants.push({
      name: "RegularGridInterpolator",
      time: async () => (await peer.ask("interpolate")).seconds / count,
    });
  }
  const timings = await takeTurns(contestants, ROUNDS, 2);
  const [engine, field, map, scipy] = timings as [Timing, Timing, Timing, Timing | undefined];
  if (scipy === undefined) return { comparisons: [], timings };
  return {
    comparisons: [
      faster("interpolation along tracks (project)", engine, scipy, 15, NS),
      faster("interpolation a point a call (sampleField)", field, scipy, null, NS),
      faster("interpolation on a lattice (sampleLattice; the peer along tracks)", map, scipy, null, NS),
    ],
    timings,
  };
}

function stretchesOf({ prepared }: Ocean): Stretch[] {
  let sailed = 0;
  return (prepared[ROUTE] as PreparedRoute).legs.flatMap(({ track, curve, panels }, leg) => {
    const begun = sailed / ADVANCE;
    sailed += track.length;
    return Array.from(panels.piece, (piece, panel): Stretch => {
      const stations = makeStations();
      const [from, to] = [panels.s[panel] as number, panels.s[panel + 1] as number];
      layMiddle(stations, curve, piece, from, to);
      layStations(stations, curve, piece, from, to);
      const start = begun + from / ADVANCE;
      const times = stations.s.map((s) => begun + s / ADVANCE);
      return { leg, panel, polar: panels.polar[panel] === 1, stations, start, times };
    });
  });
}

/** The engine's own path: data resolved once a panel, projected at its stations, read at their times. */
function alongTrack({ wind, prepared }: Ocean, stretches: readonly Stretch[]): number {
  let sum = 0;
  const flow: Flow = makeFlow(wind, oceanConditions(wind, DEPARTURE_S).departure);
  const { legs } = prepared[ROUTE] as PreparedRoute;
  for (let repeat = 0; repeat < REPEATS; repeat += 1) {
    for (const { leg, panel, polar, stations, start, times } of stretches) {
      flow.cells = legs[leg]?.cells[0] ?? [];
      resolve(flow, panel, start, stations);
      project(flow, panel, polar, stations);
      for (let i = 0; i < STATIONS; i += 1) {
        const share = shareOf(flow, times[i] as number);
        sum += (flow.along[i] as number) + share * (flow.alongChange[i] as number);
        sum += (flow.cross[i] as number) + share * (flow.crossChange[i] as number);
      }
    }
  }
  return sum;
}

function samples({ wind }: Ocean, stretches: readonly Stretch[]): number {
  let sum = 0;
  const { departure } = oceanConditions(wind, DEPARTURE_S);
  for (let repeat = 0; repeat < REPEATS; repeat += 1) {
    for (const { stations, times } of stretches) {
      for (let i = 0; i < STATIONS; i += 1) {
        const time = departure + 1000 * (times[i] as number);
        const sample = sampleField(wind, stations.lat[i] as number, stations.lon[i] as number, null, time);
        sum += (sample as FieldSample).u + (sample as FieldSample).v;
      }
    }
  }
  return sum;
}

/** (time, lat, lon) in rows, time in seconds from the first valid one. */
function pointTable(stretches: readonly Stretch[]): Float64Array {
  const rows = stretches.flatMap(({ stations, times }) =>
    Array.from(times, (time, i) => [
      DEPARTURE_S + time,
      stations.lat[i] as number,
      stations.lon[i] as number,
    ]),
  );
  return Float64Array.from(Array.from({ length: REPEATS }, () => rows.flat()).flat());
}

function latticePoints() {
  const lats = Float64Array.from({ length: 150 }, (_, j) => 30.03 + 0.11 * j);
  const lons = Float64Array.from({ length: 250 }, (_, i) => -70.07 + 0.23 * i);
  return { lats, lons };
}
