/**
 * Tracks as lines to draw or to write: GeoJSON takes the line between two positions as straight in longitude and
 * latitude (RFC 7946, section 3.1.1) and wants it cut at the antimeridian (section 3.1.9).
 */
import { InputError } from "../errors.ts";
import { DEGREE } from "./angle.ts";
import { type Ellipsoid, WGS84 } from "./ellipsoid.ts";
import type { Position, Track, TrackPoint } from "./track.ts";

/** A vertex of a drawn line: the longitude is continuous along it. */
export interface DrawnPoint extends Position {
  /** Metres along the track. */
  readonly s: number;
}

/** Longitude and latitude in degrees, as GeoJSON orders them. */
export type LonLat = [lon: number, lat: number];

/** Share of the tolerance that the sampled deviation may take: between the samples it is at most a little larger. */
const SAMPLED_SHARE = 0.9;

/** A crossing is found to this length along the track, m. */
const CROSSING_LENGTH = 1e-6;

/**
 * Vertices of a track such that the line drawn straight in longitude and latitude between them stays within the
 * tolerance of the track. Both ends are among them, and so is every place where the track meets the antimeridian: its
 * latitude there is the track's own, not that of a chord.
 *
 * @param track a track on the given ellipsoid
 * @param tolerance m, at least 0.01
 * @throws InputError if the tolerance is not a number of at least 0.01 m
 *
 * @example
 * densify(makeTrack({ lat: -18, lon: 175 }, { lat: -14, lon: 190 }, "rhumb")).find((p) => p.lon === 180)?.lat // → -16.6757895
 */
export function densify(track: Track, tolerance = 50, ellipsoid: Ellipsoid = WGS84): DrawnPoint[] {
  if (!(tolerance >= 0.01 && Number.isFinite(tolerance))) {
    throw new InputError(`tolerance of a drawn line is at least 0.01 m; found ${tolerance}`);
  }
  const place = (s: number): DrawnPoint => drawnPoint(track.at(s), s);
  const start = place(0);
  const points = [start];
  if (track.length === 0) return points;
  const deviationLimit = SAMPLED_SHARE * tolerance;
  // The nodes still to reach, nearest last; a stretch is halved until its chord is close enough.
  const ahead = [place(track.length)];
  let from = start;
  let to = ahead.pop();
  while (to !== undefined) {
    const length = to.s - from.s;
    const quarters = [1, 2, 3].map((quarter) => place(from.s + (length * quarter) / 4)) as [
      DrawnPoint,
      DrawnPoint,
      DrawnPoint,
    ];
    const isClose = quarters.every(
      (point) => chordDistance(ellipsoid, point, from, to as DrawnPoint) <= deviationLimit,
    );
    if (isClose || length < tolerance / 4) {
      points.push(...crossings(place, from, to), to);
      from = to;
    } else {
      ahead.push(to, quarters[1]);
    }
    to = ahead.pop();
  }
  return points;
}

/** A vertex; a longitude within a micrometre of the antimeridian stands on it, so that rounding does not cut a line. */
function drawnPoint({ lat, lon }: TrackPoint, s: number): DrawnPoint {
  const edge = 360 * Math.round((lon - 180) / 360) + 180;
  return { s, lat, lon: Math.abs(lon - edge) < 1e-11 ? edge : lon };
}

/**
 * An upper estimate, m, of the distance from a point of the track to the chord between two others: in the plane of
 * longitude and latitude, with the radii of curvature of the place. It is exact for short distances, and too large
 * beside a pole, which only adds vertices.
 */
function chordDistance({ a, e2 }: Ellipsoid, point: Position, from: Position, to: Position): number {
  const sin = Math.sin(point.lat * DEGREE);
  const w = 1 - e2 * sin * sin;
  const perLat = ((a * (1 - e2)) / (w * Math.sqrt(w))) * DEGREE;
  const cos = Math.cos(Math.min(Math.abs(point.lat), Math.abs(from.lat), Math.abs(to.lat)) * DEGREE);
  const perLon = (a / Math.sqrt(w)) * cos * DEGREE;
  const chordX = (to.lon - from.lon) * perLon;
  const chordY = (to.lat - from.lat) * perLat;
  const x = (point.lon - from.lon) * perLon;
  const y = (point.lat - from.lat) * perLat;
  const squared = chordX * chordX + chordY * chordY;
  const share = squared === 0 ? 0 : Math.max(0, Math.min(1, (x * chordX + y * chordY) / squared));
  return Math.hypot(x - share * chordX, y - share * chordY);
}

/** The vertices strictly between two neighbours where the track meets the antimeridian, on whichever turn. */
function crossings(place: (s: number) => DrawnPoint, from: DrawnPoint, to: DrawnPoint): DrawnPoint[] {
  return edgesBetween(from.lon, to.lon).map((edge) => crossing(place, from, to, edge));
}

/** The odd multiples of 180 strictly between two longitudes, in the order in which they are met. */
function edgesBetween(from: number, to: number): number[] {
  const east = Math.max(from, to);
  const edges: number[] = [];
  for (let edge = 360 * Math.floor((Math.min(from, to) - 180) / 360) + 540; edge < east; edge += 360) {
    edges.push(edge);
  }
  return from < to ? edges : edges.reverse();
}

/** Bisection: longitude is monotonic along a geodesic and along a rhumb line. */
function crossing(
  place: (s: number) => DrawnPoint,
  from: DrawnPoint,
  to: DrawnPoint,
  edge: number,
): DrawnPoint {
  const eastward = to.lon > from.lon;
  let before = from.s;
  let after = to.s;
  while (after - before > CROSSING_LENGTH) {
    const middle = (before + after) / 2;
    if (middle === before || middle === after) break;
    if (place(middle).lon < edge === eastward) before = middle;
    else after = middle;
  }
  const { s, lat } = place((before + after) / 2);
  return { s, lat, lon: edge };
}

/**
 * Cuts a line of continuous longitude into parts that lie within -180..180, each ending on the antimeridian where the
 * next begins. Vertices that stand on the antimeridian already (as {@link densify} sets them) are cut there; a segment
 * that crosses it between its ends is cut on the straight line.
 *
 * @returns one part or more, each of two positions or more (of one, if the line is a single point)
 *
 * @example
 * cutAtAntimeridian([{ lat: 0, lon: 170 }, { lat: 10, lon: 190 }])[1] // → [[-180, 5], [-170, 10]]
 */
export function cutAtAntimeridian(points: readonly Position[]): LonLat[][] {
  const first = points[0];
  if (first === undefined) return [];
  const parts: LonLat[][] = [];
  let turn: number | undefined;
  let part: LonLat[] = [];
  const append = (from: Position, to: Position): void => {
    const ownTurn = turnOf(insideOf(from.lon, to.lon), turn);
    if (ownTurn !== turn) {
      turn = ownTurn;
      part = [lonLat(from, ownTurn)];
      parts.push(part);
    }
    part.push(lonLat(to, ownTurn));
  };
  for (let i = 1; i < points.length; i++) {
    const to = points[i] as Position;
    let from = points[i - 1] as Position;
    for (const middle of straightCrossings(from, to)) {
      append(from, middle);
      from = middle;
    }
    append(from, to);
  }
  return parts.length > 0 ? parts : [[lonLat(first, turnOf(first.lon, undefined))]];
}

function lonLat({ lat, lon }: Position, turn: number): LonLat {
  return [lon - 360 * turn + 0, lat];
}

/**
 * The whole turns in a longitude. One on the antimeridian itself has two answers: it keeps the turn before it where that
 * is one of them, and a line that begins there begins as given, at 180 or at -180.
 */
function turnOf(lon: number, before: number | undefined): number {
  const turn = Math.floor((lon + 180) / 360);
  if (!isOnEdge(lon)) return turn;
  const stays = before === undefined ? lon > 0 : before === turn - 1;
  return stays ? turn - 1 : turn;
}

/** A longitude of a segment that crosses no edge, off the edge if any of the segment is; exact, unlike the mean. */
function insideOf(from: number, to: number): number {
  if (!isOnEdge(from)) return from;
  return isOnEdge(to) ? (from + to) / 2 : to;
}

function isOnEdge(lon: number): boolean {
  return Math.abs(lon % 360) === 180;
}

function straightCrossings(from: Position, to: Position): Position[] {
  return edgesBetween(from.lon, to.lon).map((lon) => {
    const share = (lon - from.lon) / (to.lon - from.lon);
    return { lat: from.lat + (to.lat - from.lat) * share, lon };
  });
}
