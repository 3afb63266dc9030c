import { STATION_X, STATIONS } from "./gauss-kronrod.ts";
import { COS, evaluate, LAT, LON, SIN, STRIDE, type TrackCurve } from "./track-curve.ts";

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
  const coefficients = curve.coefficients;
  const base = p * STRIDE;
  for (let i = 0; i < STATIONS; i += 1) {
    const s = from + ((to - from) * ((STATION_X[i] as number) + 1)) / 2;
    const x = (s - start) * scale - 1;
    stations.s[i] = s;
    stations.share[i] = s / length;
    stations.lon[i] = evaluate(coefficients, base + LON, x);
    stations.lat[i] = evaluate(coefficients, base + LAT, x);
    stations.sin[i] = evaluate(coefficients, base + SIN, x);
    stations.cos[i] = evaluate(coefficients, base + COS, x);
  }
}

/** Sets the middle of a panel from..to (metres) of piece p. */
export function layMiddle(stations: Stations, curve: TrackCurve, p: number, from: number, to: number): void {
  const start = curve.starts[p] as number;
  const x = (2 * ((from + to) / 2 - start)) / ((curve.starts[p + 1] as number) - start) - 1;
  stations.middleLon = evaluate(curve.coefficients, p * STRIDE + LON, x);
  stations.middleLat = evaluate(curve.coefficients, p * STRIDE + LAT, x);
}
