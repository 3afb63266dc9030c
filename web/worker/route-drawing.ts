import { densify, type PreparedRoute, type Profile } from "./core.ts";
import type { RouteDrawing } from "./protocol.ts";

type Line = Omit<RouteDrawing, "profile"> & {
  /** Degrees, whole turns, that bring each leg's own longitudes onto the line. */
  readonly turns: readonly number[];
};

const lines = new WeakMap<PreparedRoute, Line>();

/** A route's line and its figures on it. The line is made once for a prepared route. */
export function drawRoute(prepared: PreparedRoute, profile: Profile): RouteDrawing {
  const line = lines.get(prepared) ?? lineOf(prepared);
  lines.set(prepared, line);
  const { turns, ...drawn } = line;
  const lon = profile.lon.map((own, at) => own + (turns[(profile.leg[at] ?? 1) - 1] ?? 0));
  return { ...drawn, profile: { ...profile, lon } };
}

function lineOf({ legs }: PreparedRoute): Line {
  const lat: number[] = [];
  const lon: number[] = [];
  const distance: number[] = [];
  const waypoints: number[] = [0];
  const turns: number[] = [];
  let start = 0;
  for (const { track } of legs) {
    const points = densify(track);
    // A track's longitudes begin at its own start; the line goes on from where the last leg ended.
    const turn = 360 * Math.round(((lon.at(-1) ?? track.from.lon) - track.from.lon) / 360);
    turns.push(turn);
    for (const point of lat.length === 0 ? points : points.slice(1)) {
      lat.push(point.lat);
      lon.push(point.lon + turn);
      distance.push(start + point.s);
    }
    start += track.length;
    waypoints.push(lat.length - 1);
  }
  return {
    lat: Float64Array.from(lat),
    lon: Float64Array.from(lon),
    distance_m: Float64Array.from(distance),
    waypoints: Int32Array.from(waypoints),
    turns,
  };
}
