import { estimateRoute } from "../../src/estimate/estimate-route.ts";
import { type PreparedRoute, prepareRoute } from "../../src/estimate/prepare.ts";
import { routeOutcome, routeOutcomes } from "../../src/estimate/route-outcomes.ts";
import type { Field } from "../../src/field/field.ts";
import { atMost, type Comparison, faster, figure, type Part } from "./comparison.ts";
import { DEPARTURES_S, type Ocean, oceanConditions } from "./ocean.ts";
import type { PythonPeer } from "./python-peer.ts";
import { referenceTime } from "./reference.ts";
import { type Contestant, inProcess, type Timing, takeTurns } from "./timing.ts";

const MS = [1e-3, "ms"] as const;
const DEPARTURE_S = DEPARTURES_S[0] as number;
const ESTIMATES = 200;
const ROUNDS = 9;
const SWEEP_ROUNDS = 15;

/** One route, 10 legs, 3,000 NM; then five of them at 240 departures. */
export async function wholeJob(ocean: Ocean, peer: PythonPeer | null): Promise<Part> {
  const one = await oneRoute(ocean, peer);
  const sweep = await departureSweep(ocean, peer);
  return {
    comparisons: [...one.comparisons, ...sweep.comparisons],
    timings: [...one.timings, ...sweep.timings],
  };
}

async function oneRoute({ wind, prepared }: Ocean, peer: PythonPeer | null): Promise<Part> {
  const route = prepared[2] as PreparedRoute;
  const conditions = oceanConditions(wind, DEPARTURE_S);
  const scipy = async () =>
    (await peer?.ask("rk45", { route: 2, departure: DEPARTURE_S, rtol: 1e-8 })) ?? {
      seconds: 0,
      figures: [],
    };
  const contestants: Contestant[] = [
    inProcess("estimateRoute", ESTIMATES, () => {
      let sum = 0;
      for (let n = 0; n < ESTIMATES; n += 1)
        sum += estimateRoute(route, conditions).estimate.totals.time_s ?? Number.NaN;
      return sum;
    }),
    inProcess("routeOutcome", ESTIMATES, () => {
      let sum = 0;
      for (let n = 0; n < ESTIMATES; n += 1) sum += routeOutcome(route, conditions).time_s ?? Number.NaN;
      return sum;
    }),
    inProcess("prepareRoute", 20, () => {
      let sum = 0;
      for (let n = 0; n < 20; n += 1)
        sum += prepareRoute(route.route, [wind]).legs[0]?.track.length ?? Number.NaN;
      return sum;
    }),
  ];
  if (peer !== null)
    contestants.push({ name: "SciPy RK45, rtol 1e-8", time: async () => (await scipy()).seconds });
  const timings = await takeTurns(contestants, ROUNDS, 2);
  const [full, outcome, prepare, rk45] = timings as [Timing, Timing, Timing, Timing | undefined];
  const comparisons = [
    faster("work once a route and grid (prepareRoute), against an estimate", prepare, full, null, MS),
    accuracy(route, wind, (await scipy()).figures[0]),
  ];
  if (rk45 !== undefined) {
    comparisons.unshift(
      faster("one route in full (estimateRoute)", full, rk45, 1000, MS),
      faster("one route's outcome (routeOutcome)", outcome, rk45, 1000, MS),
    );
  }
  return { comparisons, timings };
}

function accuracy(route: PreparedRoute, wind: Field, scipy: number | undefined): Comparison {
  const exact = referenceTime(route, wind, DEPARTURE_S);
  const error = (time: number) => Math.abs(time / exact - 1);
  const { totals } = estimateRoute(route, oceanConditions(wind, DEPARTURE_S)).estimate;
  const bound = (totals.error?.time_s ?? Number.NaN) / exact;
  const peer = scipy === undefined ? "" : `SciPy RK45, rtol 1e-8: ${figure(error(scipy))}`;
  const ours = error(totals.time_s ?? Number.NaN);
  return atMost(
    "relative error of time",
    ours,
    1e-10,
    "",
    peer,
    `${figure(ours)} (bound reported: ${figure(bound)})`,
  );
}

async function departureSweep({ wind, compared }: Ocean, peer: PythonPeer | null): Promise<Part> {
  const conditions = oceanConditions(wind, DEPARTURE_S);
  const moments = Array.from(DEPARTURES_S, (departure) => oceanConditions(wind, departure).departure);
  const ours = inProcess("routeOutcomes, 240 departures of 5 routes", 1, () => {
    let sum = 0;
    for (const route of compared)
      for (const { time_s } of routeOutcomes(route, conditions, moments)) sum += time_s ?? Number.NaN;
    return sum;
  });
  const contestants: Contestant[] = [ours];
  const departures = Array.from(DEPARTURES_S);
  if (peer !== null)
    contestants.push({
      name: "NumPy midpoint on time columns, 240 departures of 5 routes",
      time: async () => (await peer.ask("sweep", { departures })).seconds,
    });
  const timings = await takeTurns(contestants, SWEEP_ROUNDS, 3);
  const [outcomes, numpy] = timings as [Timing, Timing | undefined];
  const what = "240 departures of 5 routes";
  return { comparisons: numpy === undefined ? [] : [faster(what, outcomes, numpy, 3, MS)], timings };
}
