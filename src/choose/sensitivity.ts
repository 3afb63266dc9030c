import { DEGREE } from "../geodesy/angle.ts";
import { NODE_SHARES, type TrackCell } from "./cell.ts";
import { COMPONENTS } from "./local-sensitivity.ts";

/*
 * How time and use of a whole route change with an error δw(s) of the fields, met where and when the craft is there.
 *
 * Time obeys dt/ds = 1/g(s, t), use dU/ds = (r/g)(s, t). To first order in δw, with ẇ the fields' own change in time,
 *
 *     dδt/ds = -α δt + Σ_j τ_j δw_j        α = (1/g²) Σ_j ∂g/∂w_j ẇ_j      τ_j = -(1/g²) ∂g/∂w_j
 *     dδU/ds =  β δt + Σ_j υ_j δw_j        β = Σ_j υ_j ẇ_j                  υ_j = ∂(r/g)/∂w_j
 *
 * Integrating by parts against the adjoint weights (the method of variation of constants; Hairer, Nørsett & Wanner, Solving
 * Ordinary Differential Equations I, 1993, section I.11) gives what a delay at s comes to at the route's end S,
 *
 *     μ(s) = exp(-∫ from s to S of α)      ν(s) = ∫ from s to S of β(s') exp(-∫ from s to s' of α) ds'
 *
 * and so δT = ∫ Σ_j μ τ_j δw_j ds and δU = ∫ Σ_j (υ_j + ν τ_j) δw_j ds. A stay passes a delay on as it is; where the craft hovers,
 * δU gains ∫ r'(|w|) w·δw/|w| dt, and ν the rate at its end minus that at its start. Under a held through-speed
 * τ = (-1/g², c/(g² sqrt(V² - c²))) along and across.
 */

/** What an error of 1 m/s all over a cell does to the whole route, per cell and component (index cell · COMPONENTS + component). */
export interface Sensitivities {
  readonly cells: readonly TrackCell[];
  /** s per m/s, and store units per m/s, along and across the track. */
  readonly time: Float64Array;
  readonly use: Float64Array;
  /** The same of the eastward and northward components. */
  readonly timeEastNorth: Float64Array;
  readonly useEastNorth: Float64Array;
  /** Per leg: what a delay at its end, after the stay there, comes to at the route's end, s per s and store units per s. */
  readonly delayAtLegEnd: readonly DelayWeights[];
}

/** μ and ν. */
export interface DelayWeights {
  readonly time: number;
  readonly use: number;
}

/** Sensitivities of a route that arrives, from the end backward. */
export function sensitivities(cells: readonly TrackCell[]): Sensitivities {
  const made = () => new Float64Array(cells.length * COMPONENTS);
  const sums = { time: made(), use: made(), timeEastNorth: made(), useEastNorth: made() };
  const delayAtLegEnd: DelayWeights[] = [];
  let delay: DelayWeights = { time: 1, use: 0 };
  for (let n = cells.length - 1; n >= 0; n -= 1) {
    const cell = cells[n] as TrackCell;
    if (cells[n + 1]?.leg !== cell.leg) delayAtLegEnd[cell.leg - 1] = delay;
    addCell(sums, cell, n * COMPONENTS, delay);
    const before = carriedFrom(cell, 0, delay);
    delay = { time: before.time, use: before.use + cell.later };
  }
  return { cells, ...sums, delayAtLegEnd };
}

function spanOf({ from, to, duration }: TrackCell): number {
  return to > from ? to - from : duration;
}

function addCell(
  sums: Pick<Sensitivities, "time" | "use" | "timeEastNorth" | "useEastNorth">,
  cell: TrackCell,
  at: number,
  delay: DelayWeights,
): void {
  for (const [k, node] of cell.nodes.entries()) {
    const here = carriedFrom(cell, NODE_SHARES[k] as number, delay);
    const weight = spanOf(cell) / NODE_SHARES.length;
    const time = node.timeBy.map((by) => weight * here.time * by);
    const use = node.useBy.map((by, j) => weight * (by + here.use * (node.timeBy[j] as number)));
    const sin = Math.sin(node.course * DEGREE);
    const cos = Math.cos(node.course * DEGREE);
    addTurned(sums.time, sums.timeEastNorth, at, time, sin, cos);
    addTurned(sums.use, sums.useEastNorth, at, use, sin, cos);
  }
}

/** Adds along and across components as they are, and as east and north: a = u sin θ + v cos θ, c = u cos θ - v sin θ. */
function addTurned(
  own: Float64Array,
  eastNorth: Float64Array,
  at: number,
  part: Float64Array,
  sin: number,
  cos: number,
): void {
  for (let j = 0; j < COMPONENTS; j += 2) {
    const along = part[j] as number;
    const cross = part[j + 1] as number;
    own[at + j] = (own[at + j] as number) + along;
    own[at + j + 1] = (own[at + j + 1] as number) + cross;
    eastNorth[at + j] = (eastNorth[at + j] as number) + along * sin + cross * cos;
    eastNorth[at + j + 1] = (eastNorth[at + j + 1] as number) + along * cos - cross * sin;
  }
}

/** What a delay at a share of a cell comes to, from what it comes to at the cell's end; α and β straight between the points. */
function carriedFrom(cell: TrackCell, share: number, end: DelayWeights): DelayWeights {
  const rest = (1 - share) * spanOf(cell);
  const middle = (1 + share) / 2;
  const alpha = rest * between(middle, (n) => cell.nodes[n]?.delay ?? 0);
  const beta = rest * between(middle, (n) => cell.nodes[n]?.useDelay ?? 0);
  const passed = Math.exp(-alpha);
  return { time: end.time * passed, use: end.use * passed + beta * Math.exp(-alpha / 2) };
}

function between(share: number, value: (node: number) => number): number {
  const first = NODE_SHARES[0] as number;
  const width = (NODE_SHARES[1] as number) - first;
  return value(0) + ((share - first) / width) * (value(1) - value(0));
}
