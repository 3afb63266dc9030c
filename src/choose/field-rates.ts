import { heightAt } from "../estimate/panels.ts";
import type { PreparedLeg } from "../estimate/prepare.ts";
import type { Field, Tile } from "../field/field.ts";
import { sampleField } from "../field/sample.ts";
import { DEGREE } from "../geodesy/angle.ts";

/** Components along and across a course, m/s, and their change in time at the place, m/s per s. */
export interface FieldRates {
  readonly along: number;
  readonly cross: number;
  readonly alongRate: number;
  readonly crossRate: number;
}

export const STILL: FieldRates = { along: 0, cross: 0, alongRate: 0, crossRate: 0 };

/** Time over which the change is taken, ms: between two valid times a component is a straight line, so that any is exact. */
const SPAN_MS = 1000;

/**
 * A field on a leg at a place and time, resolved along the course.
 *
 * @param s metres from the leg's start
 * @param time ms since 1970-01-01T00:00Z
 * @returns `null` where the field has no value
 */
export function fieldRates(field: Field, leg: PreparedLeg, s: number, time: number): FieldRates | null {
  const { lat, lon, course } = leg.track.at(s);
  const height = heightOn(field, leg, s);
  const now = sampleField(field, lat, lon, height, time);
  if (now.none !== null) return null;
  const later = sampleField(field, lat, lon, height, time + SPAN_MS);
  const other = later.none === null ? later : sampleField(field, lat, lon, height, time - SPAN_MS);
  const perSecond = other.none === null ? (later.none === null ? 1000 : -1000) / SPAN_MS : 0;
  const sin = Math.sin(course * DEGREE);
  const cos = Math.cos(course * DEGREE);
  const u = other.none === null ? (other.u - now.u) * perSecond : 0;
  const v = other.none === null ? (other.v - now.v) * perSecond : 0;
  return {
    along: now.u * sin + now.v * cos,
    cross: now.u * cos - now.v * sin,
    alongRate: u * sin + v * cos,
    crossRate: u * cos - v * sin,
  };
}

function heightOn(field: Field, { heights, track }: PreparedLeg, s: number): number | null {
  if (heights.from === null && heights.to === null) return null;
  return heightAt(heights, field.tiles[0] as Tile, s / track.length);
}
