import { stayRate } from "../craft/consumption.ts";
import type { Craft } from "../craft/craft.ts";
import { type Flow, resolve, shareOf } from "./flow.ts";
import { FIRST_NODE, GAUSS_WEIGHT, KRONROD_WEIGHT, LAST_NODE, STATION_X, STATIONS } from "./gauss-kronrod.ts";
import type { PreparedLeg } from "./prepare.ts";
import { project } from "./project.ts";
import type { FindingCode } from "./result.ts";
import { layMiddle, layStations, type Stations } from "./stations.ts";

/** What a stay comes to. */
export interface Stay {
  readonly use: number;
  readonly useBound: number;
  /** Strongest wind met, m/s; 0 for a craft that does not feel it. */
  readonly maxWind: number;
  /** Whether the stay ran on a valid time held beyond its end, on filled nodes, or on nothing moving. */
  readonly edges: { readonly held: boolean; readonly filled: boolean; readonly zero: boolean };
  /** Why the stay cannot be done, and when since departure; `null` where it can. */
  readonly failure: { readonly code: FindingCode; readonly time: number; readonly windSpeed: number } | null;
}

const NO_EDGES = { held: false, filled: false, zero: false };

/** No stay at all. */
const NO_STAY: Stay = { use: 0, useBound: 0, maxWind: 0, edges: NO_EDGES, failure: null };

/** A stay of a craft whose use does not depend on the wind: moored in water, or in still air. */
export function plainStay(craft: Craft, seconds: number): Stay {
  if (seconds === 0) return NO_STAY;
  const rate = stayRate(craft, 0);
  if (rate === null) return { ...failed("outside-power-table", 0, 0), use: 0 };
  return { use: rate * seconds, useBound: 0, maxWind: 0, edges: NO_EDGES, failure: null };
}

/**
 * A stay in moving air at the end of a leg: the craft holds its place at V = |w(t)|, so that the use is the integral of the rate
 * at that speed, cut at every valid time.
 *
 * @param start seconds since departure
 */
export function hover(
  craft: Craft,
  wind: Flow,
  leg: PreparedLeg,
  stations: Stations,
  start: number,
  seconds: number,
): Stay {
  const panel = leg.panels.piece.length - 1;
  const piece = leg.panels.piece[panel] as number;
  const from = leg.panels.s[panel] as number;
  layMiddle(stations, leg.curve, piece, from, leg.track.length);
  layStations(stations, leg.curve, piece, from, leg.track.length);
  const total = { use: 0, useBound: 0, maxWind: 0 };
  const edges = { ...NO_EDGES };
  const end = start + seconds;
  for (let time = start; time < end; ) {
    resolve(wind, panel, time, stations);
    if (wind.state !== "data" && wind.state !== "zero")
      return { ...failed(wind.state, time, 0), ...total, edges };
    edges.held = edges.held || wind.held;
    edges.filled = edges.filled || wind.filled;
    edges.zero = edges.zero || wind.state === "zero";
    project(wind, panel, leg.panels.polar[panel] === 1, stations);
    const until = Math.min(wind.until, end);
    const tooFast = addSpan(craft, wind, time, until, total);
    if (tooFast !== null) return { ...failed("outside-power-table", time, tooFast), ...total, edges };
    time = until;
  }
  return { ...total, edges, failure: null };
}

function failed(code: FindingCode, time: number, windSpeed: number): Stay {
  return { use: 0, useBound: 0, maxWind: windSpeed, edges: NO_EDGES, failure: { code, time, windSpeed } };
}

const SPAN_TOLERANCE = 1e-11;
const SHORTEST_SPAN_S = 1e-3;

/** Adds a span inside one interval of valid times, halved until accurate; returns a wind speed without a rate, or `null`. */
function addSpan(
  craft: Craft,
  wind: Flow,
  from: number,
  to: number,
  total: { use: number; useBound: number; maxWind: number },
): number | null {
  const half = (to - from) / 2;
  let kronrod = 0;
  let gauss = 0;
  for (let i = 0; i < STATIONS; i += 1) {
    const speed = windSpeedAt(wind, from + half * ((STATION_X[i] as number) + 1));
    const rate = stayRate(craft, speed);
    if (rate === null) return speed;
    total.maxWind = Math.max(total.maxWind, speed);
    if (i < FIRST_NODE || i > LAST_NODE) continue;
    kronrod += (KRONROD_WEIGHT[i] as number) * rate;
    gauss += (GAUSS_WEIGHT[i] as number) * rate;
  }
  const error = Math.abs(kronrod - gauss);
  if (error > SPAN_TOLERANCE * kronrod && to - from > SHORTEST_SPAN_S) {
    const middle = from + half;
    return addSpan(craft, wind, from, middle, total) ?? addSpan(craft, wind, middle, to, total);
  }
  total.use += half * kronrod;
  total.useBound += half * error;
  return null;
}

/** |w| at the leg's end (the last station) and a time since departure. */
function windSpeedAt(wind: Flow, time: number): number {
  const end = STATIONS - 1;
  const share = shareOf(wind, time);
  const along = (wind.along[end] as number) + share * (wind.alongChange[end] as number);
  const cross = (wind.cross[end] as number) + share * (wind.crossChange[end] as number);
  return Math.hypot(along, cross);
}
