import { lagrangeAt } from "./lagrange.ts";

/*
 * The 4-point Gauss-Legendre rule and its 9-point Kronrod extension on [-1, 1], with both ends as extra stations.
 *
 * Nodes and weights: the Kronrod extension is the unique 9-point rule of degree 13 that keeps the four Gauss nodes
 * (A. S. Kronrod, Nodes and Weights of Quadrature Formulas, 1965); the tests hold both rules to their degrees.
 * The difference of the two sums estimates the error of the Gauss sum (degree 7), which bounds that of the Kronrod sum.
 */

const INNER = [0.3399810435848563, 0.64028621749631, 0.8611363115940526, 0.9765602507375731] as const;
const INNER_WEIGHTS = [
  0.3269491896014516, 0.2667983404522844, 0.1700536053357227, 0.062977373665473,
] as const;
const CENTRE_WEIGHT = 0.3464429818901364;
const GAUSS_INNER = 0.6521451548625461;
const GAUSS_OUTER = 0.3478548451374538;

/** Stations of a panel in order along it: the start, the nine Kronrod nodes, the end. */
export const STATIONS = 11;
/** Index of the first Kronrod node among the stations; the last is `STATIONS - 2`. */
export const FIRST_NODE = 1;
export const LAST_NODE = STATIONS - 2;

/** Position of each station, -1..1. */
export const STATION_X = Float64Array.of(
  -1,
  -INNER[3],
  -INNER[2],
  -INNER[1],
  -INNER[0],
  0,
  INNER[0],
  INNER[1],
  INNER[2],
  INNER[3],
  1,
);

/** Kronrod weight of each station (sum 2; the ends weigh nothing). */
export const KRONROD_WEIGHT = Float64Array.of(
  0,
  INNER_WEIGHTS[3],
  INNER_WEIGHTS[2],
  INNER_WEIGHTS[1],
  INNER_WEIGHTS[0],
  CENTRE_WEIGHT,
  INNER_WEIGHTS[0],
  INNER_WEIGHTS[1],
  INNER_WEIGHTS[2],
  INNER_WEIGHTS[3],
  0,
);

/** Gauss weight of each station (0 where the 4-point rule has no node). */
export const GAUSS_WEIGHT = Float64Array.of(
  0,
  0,
  GAUSS_OUTER,
  0,
  GAUSS_INNER,
  0,
  GAUSS_INNER,
  0,
  GAUSS_OUTER,
  0,
  0,
);

/** The Kronrod nodes alone. */
const NODES = STATION_X.subarray(FIRST_NODE, LAST_NODE + 1);

/**
 * Row i, column j: the integral from -1 to station i of the Lagrange polynomial of node j, so that row · f is the integral
 * of f up to station i, exact for degree 8: the collocation matrix of the implicit method on these nodes.
 */
export const INTEGRAL_TO_STATION = collocationMatrix();

/** Per node: the value at the end (x = 1) of its Lagrange polynomial; in reverse order, at the start. */
export const AT_END = Float64Array.from({ length: STATIONS }, (_, j) =>
  j >= FIRST_NODE && j <= LAST_NODE ? lagrangeAt(NODES, j - FIRST_NODE, 1) : 0,
);

/** Share of the half panel beyond the outermost node. */
export const BEYOND_NODES = 1 - INNER[3];

function collocationMatrix(): Float64Array {
  const matrix = new Float64Array(STATIONS * STATIONS);
  for (let i = 0; i < STATIONS; i += 1) {
    const half = ((STATION_X[i] as number) + 1) / 2;
    for (let j = FIRST_NODE; j <= LAST_NODE; j += 1) {
      let sum = 0;
      // The Kronrod rule itself is exact for the degree-8 Lagrange polynomial on the part interval.
      for (let q = FIRST_NODE; q <= LAST_NODE; q += 1) {
        const x = half * ((STATION_X[q] as number) + 1) - 1;
        sum += (KRONROD_WEIGHT[q] as number) * lagrangeAt(NODES, j - FIRST_NODE, x);
      }
      matrix[i * STATIONS + j] = half * sum;
    }
  }
  return matrix;
}
