import { STATION_X } from "./gauss-kronrod.ts";
import { COS, evaluate, evaluateAll, LAT, LON, SIN, STRIDE, type TrackCurve } from "./track-curve.ts";

/** The stations of the stretch in work: places and courses, fixed before time is solved. */
export interface Stations {
  /** Where they are on the stretch, -1..1. */
  readonly at: Float64Array;
  /** Metres from the leg's start. */
  readonly s: Float64Array;
  /** Degrees, longitude continuous along the leg. */
  readonly lon: Float64Array;
  readonly lat: Float64Array;
  /** Sine and cosine of the true course. */
  readonly sin: Float64Array;
  readonly cos: Float64Array;
  /** Share of the leg's length, 0..1. */
  readonly share: Float64Array;
  /** The variable ξ of the track's piece. */
  readonly x: Float64Array;
  /** Middle of the whole panel, for the weights of its corners. */
  middleLon: number;
  middleLat: number;
}

/** @param at where they are on a stretch, -1..1: those of the Kronrod rule and the ends unless others are named */
export function makeStations(at: Float64Array = STATION_X): Stations {
  const each = () => new Float64Array(at.length);
  return {
    at,
    s: each(),
    lon: each(),
    lat: each(),
    sin: each(),
    cos: each(),
    share: each(),
    x: each(),
    middleLon: 0,
    middleLat: 0,
  };
}

/** Lays the stations on the stretch from..to (metres) of piece p. */
export function layStations(
  stations: Stations,
  curve: TrackCurve,
  p: number,
  from: number,
  to: number,
): void {
  const start = curve.starts[p] as number;
  const scale = 2 / ((curve.starts[p + 1] as number) - start);
  const length = curve.starts[curve.starts.length - 1] as number;
  const { at, s, x, share } = stations;
  for (let i = 0; i < at.length; i += 1) {
    const place = from + ((to - from) * ((at[i] as number) + 1)) / 2;
    s[i] = place;
    share[i] = place / length;
    x[i] = (place - start) * scale - 1;
  }
  const base = p * STRIDE;
  evaluateAll(curve.coefficients, base + LON, x, stations.lon);
  evaluateAll(curve.coefficients, base + LAT, x, stations.lat);
  evaluateAll(curve.coefficients, base + SIN, x, stations.sin);
  evaluateAll(curve.coefficients, base + COS, x, stations.cos);
}

/** Sets the middle of a panel from..to (metres) of piece p. */
export function layMiddle(stations: Stations, curve: TrackCurve, p: number, from: number, to: number): void {
  const start = curve.starts[p] as number;
  const x = (2 * ((from + to) / 2 - start)) / ((curve.starts[p + 1] as number) - start) - 1;
  stations.middleLon = evaluate(curve.coefficients, p * STRIDE + LON, x);
  stations.middleLat = evaluate(curve.coefficients, p * STRIDE + LAT, x);
}
