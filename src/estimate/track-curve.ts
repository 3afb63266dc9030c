import type { Track } from "../geodesy/track.ts";
import { lagrangeCoefficients } from "./lagrange.ts";

/*
 * A track as piecewise polynomials. Sampling the geodesic series costs about 300 ns a point and a leg is sampled thousands
 * of times, at places that move with the departure; a polynomial of degree 6 per piece costs a tenth of that and is
 * held to 2e-12° of the track itself, far below what the field's gradients can feel.
 */

/** Coefficients per quantity and piece: degree 6. */
const TERMS = 7;
/** Offsets of the four quantities in a piece's coefficients. */
export const LON = 0;
export const LAT = TERMS;
export const SIN = 2 * TERMS;
export const COS = 3 * TERMS;
/** Coefficients of one piece. */
export const STRIDE = 4 * TERMS;

/** A piece longer than this is halved unseen; longer ones would fail the check anyway at most latitudes. */
const LONGEST_PIECE_M = 500_000;
/** Pieces are not halved below this (a track through a pole turns there at once). */
const SHORTEST_PIECE_M = 1e-4;
const ANGLE_TOLERANCE_DEG = 2e-12;
const UNIT_TOLERANCE = 1e-13;
/** Rounding of the geodesic series, 22 nm (Karney 2013, section 9, gives 15 nm). */
const POSITION_NOISE_DEG = 2e-13;
const RADIANS = Math.PI / 180;

/** The pieces of a track: piece p runs from `starts[p]` to `starts[p + 1]`, in the variable ξ = -1..1. */
export interface TrackCurve {
  /** Metres from the start of the track; one more than there are pieces. */
  readonly starts: Float64Array;
  /** Per piece, ascending powers of ξ for longitude and latitude (degrees) and the sine and cosine of the course. */
  readonly coefficients: Float64Array;
}

/** Fits the pieces of a track, halving until each is within 2e-12° at places between its nodes. */
export function fitTrackCurve(track: Track): TrackCurve {
  const starts: number[] = [0];
  const coefficients: number[] = [];
  const count = Math.max(1, Math.ceil(track.length / LONGEST_PIECE_M));
  const piece = new Float64Array(STRIDE);
  for (let n = 0; n < count; n += 1) {
    fitPiece(
      track,
      (track.length * n) / count,
      (track.length * (n + 1)) / count,
      piece,
      starts,
      coefficients,
    );
  }
  return { starts: Float64Array.from(starts), coefficients: Float64Array.from(coefficients) };
}

function fitPiece(
  track: Track,
  from: number,
  to: number,
  piece: Float64Array,
  starts: number[],
  coefficients: number[],
): void {
  interpolate(track, from, to, piece);
  if (to - from > SHORTEST_PIECE_M && !agrees(track, from, to, piece)) {
    const middle = (from + to) / 2;
    fitPiece(track, from, middle, piece, starts, coefficients);
    fitPiece(track, middle, to, piece, starts, coefficients);
    return;
  }
  starts.push(to);
  for (const coefficient of piece) coefficients.push(coefficient);
}

function interpolate(track: Track, from: number, to: number, piece: Float64Array): void {
  piece.fill(0);
  for (let node = 0; node < TERMS; node += 1) {
    const point = track.at(from + ((to - from) * ((NODES[node] as number) + 1)) / 2);
    const course = point.course * RADIANS;
    const sin = Math.sin(course);
    const cos = Math.cos(course);
    for (let term = 0; term < TERMS; term += 1) {
      const weight = TO_POWERS[term * TERMS + node] as number;
      piece[LON + term] = (piece[LON + term] as number) + weight * point.lon;
      piece[LAT + term] = (piece[LAT + term] as number) + weight * point.lat;
      piece[SIN + term] = (piece[SIN + term] as number) + weight * sin;
      piece[COS + term] = (piece[COS + term] as number) + weight * cos;
    }
  }
}

/** Places between the Chebyshev nodes where the fit is held against the track. */
const CHECKS = [-0.995, -0.62, 0.22, 0.89];

function agrees(track: Track, from: number, to: number, piece: Float64Array): boolean {
  return CHECKS.every((x) => {
    const point = track.at(from + ((to - from) * (x + 1)) / 2);
    const course = point.course * RADIANS;
    // Near a pole the longitude and the course of a place known to 22 nm are only known to this.
    const polar = POSITION_NOISE_DEG / Math.max(Math.cos(point.lat * RADIANS), 1e-16);
    const lonTolerance = ANGLE_TOLERANCE_DEG * (1 + Math.abs(point.lon) / 90) + polar;
    const unitTolerance = UNIT_TOLERANCE + polar * RADIANS;
    return (
      Math.abs(evaluate(piece, LON, x) - point.lon) <= lonTolerance &&
      Math.abs(evaluate(piece, LAT, x) - point.lat) <= ANGLE_TOLERANCE_DEG &&
      Math.abs(evaluate(piece, SIN, x) - Math.sin(course)) <= unitTolerance &&
      Math.abs(evaluate(piece, COS, x) - Math.cos(course)) <= unitTolerance
    );
  });
}

/** Value at ξ of the polynomial whose coefficients start at `offset`. */
export function evaluate(coefficients: Float64Array, offset: number, x: number): number {
  let value = coefficients[offset + TERMS - 1] as number;
  for (let term = TERMS - 2; term >= 0; term -= 1)
    value = value * x + (coefficients[offset + term] as number);
  return value;
}

/** The same at every ξ of a list, with the coefficients taken out once: half the time of a call for each. */
export function evaluateAll(
  coefficients: Float64Array,
  offset: number,
  xs: Float64Array,
  values: Float64Array,
): void {
  const a = coefficients[offset] as number;
  const b = coefficients[offset + 1] as number;
  const c = coefficients[offset + 2] as number;
  const d = coefficients[offset + 3] as number;
  const e = coefficients[offset + 4] as number;
  const f = coefficients[offset + 5] as number;
  const g = coefficients[offset + 6] as number;
  for (let i = 0; i < xs.length; i += 1) {
    const x = xs[i] as number;
    values[i] = (((((g * x + f) * x + e) * x + d) * x + c) * x + b) * x + a;
  }
}

/** Chebyshev nodes of the first kind: none at an end, so that a pole at a joint is never sampled. */
const NODES = Float64Array.from(
  { length: TERMS },
  (_, k) => -Math.cos((Math.PI * (2 * k + 1)) / (2 * TERMS)),
);

/** Row t, column n: the coefficient of ξ^t in the Lagrange polynomial of node n. */
const TO_POWERS = lagrangeCoefficients(NODES);
