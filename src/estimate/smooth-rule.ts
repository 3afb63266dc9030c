import { GAUSS_WEIGHT, STATION_X } from "./gauss-kronrod.ts";
import { lagrangeAt } from "./lagrange.ts";

/* What the smooth step needs of the 4-point Gauss rule. */

/** Stations that a smooth step reads: the start of the panel and the nodes of the rule, in order. */
export const POINT_STATIONS = [0, 2, 4, 6, 8] as const;

/** Where a column has values, -1..1: at the start, two nodes, the middle, two nodes and the end. */
export const COLUMN_X = Float64Array.from([0, 2, 4, 5, 6, 8, 10], (station) => STATION_X[station] as number);
/** Which of them are the points of a smooth step. */
export const COLUMN_POINTS = [0, 1, 2, 4, 5] as const;

const [, ...NODE_STATIONS] = POINT_STATIONS;
/** Nodes, -1..1, and weights. */
export const NODE_X = NODE_STATIONS.map((station) => STATION_X[station] as number);
export const NODE_WEIGHTS = NODE_STATIONS.map((station) => GAUSS_WEIGHT[station] as number);

/** Row j, column m: the integral of node m's Lagrange polynomial from node j to the end of the panel. */
export const NODE_TO_END = NODE_X.map((x) => NODE_X.map((_, m) => integral(m, x, 1)));

/** Exact: the rule itself, of degree 7, on the part from a to b of a cubic. */
function integral(m: number, a: number, b: number): number {
  const half = (b - a) / 2;
  return (
    half *
    NODE_X.reduce(
      (sum, x, q) => sum + (NODE_WEIGHTS[q] as number) * lagrangeAt(NODE_X, m, a + half * (x + 1)),
      0,
    )
  );
}
