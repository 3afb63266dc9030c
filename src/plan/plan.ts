import type { Alternate } from "../choose/alternate.ts";
import type { ArrivalWindow } from "../choose/arrival-window.ts";
import type { DepartureWindow } from "../choose/departure-window.ts";
import type { ForecastError } from "../choose/forecast-error.ts";
import type { WhatIf } from "../choose/what-if.ts";
import type { Craft, Pace, Reserve } from "../craft/craft.ts";
import type { Route } from "../estimate/route.ts";
import type { BeyondPolicy, FieldRole, GapPolicy, OutsidePolicy } from "../field/field.ts";

/** A field file as a plan names it. */
export interface FieldReference {
  readonly role: FieldRole;
  /** As written, relative to the plan. */
  readonly file: string;
  /** Column mapping: our axis or quantity name → the header in the file. */
  readonly columns: Readonly<Record<string, string>>;
  readonly gaps: GapPolicy;
  readonly beyond: BeyondPolicy;
  readonly outside: OutsidePolicy;
  /** Number of the ensemble's member that the file is, where the plan names it. */
  readonly member?: number;
}

/** A plan, checked, in SI units, with its craft read. */
export interface Plan {
  readonly title: string;
  /** ms since 1970-01-01T00:00Z. */
  readonly departure: number;
  readonly craft: Craft;
  /** Where `arrive` is set: a stand-in at the craft's own speed, or at its highest. */
  readonly pace: Pace;
  /** The arrival that the pace asks for in place of a speed. */
  readonly arrive?: ArrivalWindow;
  /** Departures to compare. */
  readonly window?: DepartureWindow;
  readonly reserve: Reserve | null;
  /** Probability, above 0 and below 1, with which the reserve has to hold under the stated errors; left out where the plan names none. */
  readonly confidence?: number;
  readonly fields: readonly FieldReference[];
  readonly routes: readonly Route[];
  /** Stated errors of the fields, one a role at most; left out where the plan names none. */
  readonly errors?: readonly ForecastError[];
  /** Changes to see the consequences of; left out where the plan names none. */
  readonly whatIfs?: readonly WhatIf[];
  /** Places to turn off to; left out where the plan names none. */
  readonly alternates?: readonly Alternate[];
}

/** Yields a named file's bytes in pieces; the name is as the plan writes it. Rejects with an InputError where there is none. */
export type OpenFile = (name: string) => AsyncIterable<Uint8Array>;
