import type { PreparedRoute } from "../../src/estimate/prepare.ts";
import type { Field, Tile } from "../../src/field/field.ts";
import type { Track } from "../../src/geodesy/track.ts";
import { SPEED } from "./ocean.ts";

/** Difference of one step from two half as long, s, at which a step is taken; some 1e-14 of the whole. */
const TOLERANCE_S = 1e-9;
const LONGEST_STEP_M = 2000;
const SHORTEST_STEP_M = 0.01;
const RADIANS = Math.PI / 180;

/**
 * Seconds under way on a route, by fourth-order Runge-Kutta steps on exact places of the geodesic, halved until they agree: a
 * way of its own, with neither panels nor fitted curves, that finds the kinks of the field by the size of its error.
 *
 * @param departure seconds after the first valid time
 */
export function referenceTime(prepared: PreparedRoute, wind: Field, departure: number): number {
  const tile = wind.tiles[0] as Tile;
  let elapsed = 0;
  for (const { track } of prepared.legs) {
    let place = 0;
    let h = LONGEST_STEP_M;
    while (place < track.length) {
      h = Math.min(h, track.length - place);
      const now = departure + elapsed;
      const whole = step(tile, track, place, h, now);
      const half = step(tile, track, place, h / 2, now);
      const both = half + step(tile, track, place + h / 2, h / 2, now + half);
      const error = Math.abs(both - whole);
      if (error > TOLERANCE_S && h > SHORTEST_STEP_M) {
        h /= 2;
        continue;
      }
      elapsed += both;
      place = place + h;
      if (error < TOLERANCE_S / 40) h = Math.min(2 * h, LONGEST_STEP_M);
    }
  }
  return elapsed;
}

function step(tile: Tile, track: Track, place: number, h: number, now: number): number {
  const slowness = (at: number, seconds: number): number => 1 / groundSpeed(tile, track, place + at, seconds);
  const k1 = slowness(0, now);
  const k2 = slowness(h / 2, now + (h / 2) * k1);
  const k3 = slowness(h / 2, now + (h / 2) * k2);
  const k4 = slowness(h, now + h * k3);
  return (h / 6) * (k1 + 2 * k2 + 2 * k3 + k4);
}

function groundSpeed(tile: Tile, track: Track, place: number, seconds: number): number {
  const { lat, lon, course } = track.at(Math.min(place, track.length));
  const times = tile.times as Float64Array;
  const x = (lon + 180) * 4;
  const y = (lat + 90) * 4;
  const z = (1000 * seconds) / ((times[1] as number) - (times[0] as number));
  const [i, j, k] = [Math.floor(x), Math.floor(y), Math.floor(z)];
  const value = (component: number): number => {
    let sum = 0;
    for (let corner = 0; corner < 8; corner += 1) {
      const [a, b, c] = [corner & 1, (corner >> 1) & 1, corner >> 2];
      const weight =
        (a === 1 ? x - i : 1 + i - x) * (b === 1 ? y - j : 1 + j - y) * (c === 1 ? z - k : 1 + k - z);
      const values = tile.slices[k + c] as Float64Array;
      sum += weight * (values[2 * ((j + b) * tile.lon.length + i + a) + component] as number);
    }
    return sum;
  };
  const [u, v] = [value(0), value(1)];
  const sin = Math.sin(course * RADIANS);
  const cos = Math.cos(course * RADIANS);
  return u * sin + v * cos + Math.sqrt(SPEED ** 2 - (u * cos - v * sin) ** 2);
}
