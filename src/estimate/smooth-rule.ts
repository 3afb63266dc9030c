import { GAUSS_WEIGHT, STATION_X } from "./gauss-kronrod.ts";
import { lagrangeAt } from "./lagrange.ts";

/* What the smooth step needs of the 4-point Gauss rule. */

/** Stations that a smooth step reads: the start of the panel and the nodes of the rule, in order. */
export const POINT_STATIONS = [0, 2, 4, 6, 8] as const;

/** Stations where a column has values: those points, the middle and the end. */
const COLUMN_STATIONS: readonly number[] = [0, 2, 4, 5, 6, 8, 10];
/** Where they are, -1..1, and which of them the points are. */
export const COLUMN_X = Float64Array.from(COLUMN_STATIONS, (station) => STATION_X[station] as number);
export const COLUMN_POINTS = POINT_STATIONS.map((station) => COLUMN_STATIONS.indexOf(station));

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
