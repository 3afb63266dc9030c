import { WGS84_A, WGS84_F } from "../constants.ts";
import { DEGREE } from "../geodesy/angle.ts";
import type { TrackCell } from "./cell.ts";
import type { ForecastError } from "./forecast-error.ts";
import { COMPONENTS } from "./local-sensitivity.ts";
import type { Sensitivities } from "./sensitivity.ts";

/*
 * The covariance of time and use under random errors of the fields: the double integral of the errors' covariance along the track,
 * weighted by the sensitivities at both ends,
 *
 *     Cov[P, Q] = ∬ Σ_i P_i(s) Q_i(s') C(s, s') ds ds'      C = σ² exp(-d(s, s')/L) exp(-|t(s) - t(s')|/τ)
 *
 * over the eastward and the northward component i, which are independent. d is the great-circle distance on the sphere of the
 * ellipsoid's mean radius (off by 0.6 % at most). With sensitivities even within each cell, the mean of exp(-|x - x'|) over
 * two cells of a straight stretch at an even speed is exact: for one cell of length h (in correlation lengths)
 * 2 (h - 1 + e^-h)/h², for two apart by D from middle to middle e^-D · sinh(h/2)/(h/2) · sinh(h'/2)/(h'/2).
 */

/** Mean radius (2a + b)/3, m. */
const MEAN_RADIUS = WGS84_A * (1 - WGS84_F / 3);
/** Beyond so many correlation lengths nothing that counts is left (2e-9). */
const NEGLIGIBLE = 20;

/** Covariances of time with time, time with use, and use with use. */
export interface Covariance {
  tt: number;
  tu: number;
  uu: number;
}

/** Covariances within one leg, and of the legs before it (first) with it (second). */
interface LegCovariance {
  readonly own: Covariance;
  readonly before: Covariance & { ut: number };
}

export interface ErrorCovariance {
  readonly legs: readonly LegCovariance[];
  /** Per cell, its part of the whole route's variance of time, s², and of use; the parts add up to the variance. */
  readonly timePart: Float64Array;
  readonly usePart: Float64Array;
}

/** Sums over all errors. @param pairOf index of the first of the two components that a role's errors act on, -1 for none */
export function errorCovariance(
  found: Sensitivities,
  errors: readonly ForecastError[],
  pairOf: (role: ForecastError["role"]) => number,
): ErrorCovariance {
  const { cells } = found;
  const legs = found.delayAtLegEnd.map(() => ({
    own: { tt: 0, tu: 0, uu: 0 },
    before: { tt: 0, tu: 0, uu: 0, ut: 0 },
  }));
  const sums = { legs, timePart: new Float64Array(cells.length), usePart: new Float64Array(cells.length) };
  const places = placesOf(cells);
  for (const error of errors) {
    const pair = pairOf(error.role);
    if (pair >= 0) addError(sums, found, places, error, pair);
  }
  return sums;
}

/** Unit vectors to the middles of the cells, three numbers each. */
function placesOf(cells: readonly TrackCell[]): Float64Array {
  const places = new Float64Array(3 * cells.length);
  for (const [n, { lat, lon }] of cells.entries()) {
    const level = Math.cos(lat * DEGREE);
    places[3 * n] = level * Math.cos(lon * DEGREE);
    places[3 * n + 1] = level * Math.sin(lon * DEGREE);
    places[3 * n + 2] = Math.sin(lat * DEGREE);
  }
  return places;
}

function addError(
  sums: ErrorCovariance,
  found: Sensitivities,
  places: Float64Array,
  { speed_m_s, length_m, time_s }: ForecastError,
  pair: number,
): void {
  const { cells } = found;
  const sizes = Float64Array.from(
    cells,
    ({ from, to, duration }) => (to - from) / length_m + duration / time_s,
  );
  const spreads = sizes.map((h) => (h < 1e-4 ? 1 : Math.sinh(h / 2) / (h / 2)));
  const ages = Float64Array.from(cells, ({ time }) => time / time_s);
  const variance = speed_m_s * speed_m_s;
  for (let i = 0; i < cells.length; i += 1) {
    addCells(sums, found, i, i, pair, variance * selfMean(sizes[i] as number));
    for (let j = 0; j < i; j += 1) {
      const late = (ages[i] as number) - (ages[j] as number);
      if (late > NEGLIGIBLE) continue;
      const apart = separation(places, i, j) / length_m + late;
      if (apart > NEGLIGIBLE) continue;
      const correlation = Math.exp(-apart) * (spreads[i] as number) * (spreads[j] as number);
      addCells(sums, found, j, i, pair, variance * correlation);
    }
  }
}

/** Adds what two cells, j not after i, have in common, given the covariance of a component between them. */
function addCells(
  sums: ErrorCovariance,
  { cells, timeEastNorth: time, useEastNorth: use }: Sensitivities,
  j: number,
  i: number,
  pair: number,
  covariance: number,
): void {
  const tt = covariance * product(time, j, time, i, pair);
  const uu = covariance * product(use, j, use, i, pair);
  const tu = covariance * product(time, j, use, i, pair);
  const ut = covariance * product(use, j, time, i, pair);
  addAt(sums.timePart, i, tt);
  addAt(sums.usePart, i, uu);
  if (i !== j) {
    addAt(sums.timePart, j, tt);
    addAt(sums.usePart, j, uu);
  }
  const leg = (cells[i] as TrackCell).leg;
  const { own, before } = sums.legs[leg - 1] as LegCovariance;
  if ((cells[j] as TrackCell).leg !== leg) {
    before.tt += tt;
    before.uu += uu;
    before.tu += tu;
    before.ut += ut;
  } else {
    const times = i === j ? 1 : 2;
    own.tt += times * tt;
    own.uu += times * uu;
    own.tu += i === j ? tu : tu + ut;
  }
}

function addAt(list: Float64Array, index: number, part: number): void {
  list[index] = (list[index] as number) + part;
}

/** Product of two cells' sensitivities, summed over both components. */
function product(a: Float64Array, i: number, b: Float64Array, j: number, pair: number): number {
  const p = i * COMPONENTS + pair;
  const q = j * COMPONENTS + pair;
  return (a[p] as number) * (b[q] as number) + (a[p + 1] as number) * (b[q + 1] as number);
}

/** Mean of exp(-|x - x'|) over a cell of length h. */
function selfMean(h: number): number {
  return h < 1e-4 ? 1 - h / 3 : (2 * (h + Math.expm1(-h))) / (h * h);
}

/** Great-circle distance between two places, m, from the chord. */
function separation(places: Float64Array, i: number, j: number): number {
  const x = (places[3 * i] as number) - (places[3 * j] as number);
  const y = (places[3 * i + 1] as number) - (places[3 * j + 1] as number);
  const z = (places[3 * i + 2] as number) - (places[3 * j + 2] as number);
  return 2 * MEAN_RADIUS * Math.asin(Math.min(1, Math.sqrt(x * x + y * y + z * z) / 2));
}
