import { STATION_X, STATIONS } from "./gauss-kronrod.ts";
import { COS, evaluate, evaluateAll, LAT, LON, SIN, STRIDE, type TrackCurve } from "./track-curve.ts";

/** The stations of the stretch in work: places and courses, fixed before time is solved. */
export interface Stations {
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

export function makeStations(): Stations {
  return {
    s: new Float64Array(STATIONS),
    lon: new Float64Array(STATIONS),
    lat: new Float64Array(STATIONS),
    sin: new Float64Array(STATIONS),
    cos: new Float64Array(STATIONS),
    share: new Float64Array(STATIONS),
    x: new Float64Array(STATIONS),
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
  const { s, x, share } = stations;
  for (let i = 0; i < STATIONS; i += 1) {
    const place = from + ((to - from) * ((STATION_X[i] as number) + 1)) / 2;
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
