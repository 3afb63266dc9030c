import type { Craft, Pace, Reserve } from "../craft/craft.ts";
import type { Field } from "../field/field.ts";

/** What the second half of an estimate depends on. */
export interface Conditions {
  /** ms since 1970-01-01T00:00Z. */
  readonly departure: number;
  readonly craft: Craft;
  readonly pace: Pace;
  readonly reserve: Reserve | null;
  /** The fields in use, with the axes and in the order that the route was prepared for. */
  readonly fields: readonly Field[];
}
