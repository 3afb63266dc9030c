import type { FieldRole } from "../core.ts";

/*
 * A plan as its file holds it: quantities and positions are the user's own text, kept as written, so that a plan that is opened
 * and saved says what it said. Only the core reads the texts.
 */

export interface WaypointDocument {
  readonly name?: string;
  readonly lat: number | string;
  readonly lon: number | string;
  readonly path?: "geodesic" | "rhumb";
  readonly speed?: string;
  readonly stay?: string;
  readonly height?: string;
}

export interface RouteDocument {
  readonly name: string;
  readonly path?: "geodesic" | "rhumb";
  readonly waypoints: readonly WaypointDocument[];
}

export interface PaceDocument {
  readonly hold: "through-speed" | "ground-speed" | "power" | "least-energy";
  readonly speed?: string;
  readonly power?: string;
}

/** A pace that asks for an arrival: at one time, or between two. */
export interface ArrivalDocument {
  readonly arrive: string | { readonly notBefore?: string; readonly notAfter: string };
}

/** Departures to compare, and speeds. */
export interface WindowDocument {
  readonly from: string;
  readonly to: string;
  readonly every: string;
  readonly speeds?: readonly string[];
  readonly arriveBy?: string;
}

/** A place to turn off to. */
export interface AlternateDocument {
  readonly name?: string;
  readonly lat: number | string;
  readonly lon: number | string;
  readonly height?: string;
}

/** A change of what the estimate rests on. */
export interface WhatIfDocument {
  readonly name?: string;
  /** A text where what was typed is no number, for the core to say so. */
  readonly wind?: number | string;
  readonly current?: number | string;
  readonly veer?: string;
  readonly speed?: string;
  readonly consumption?: string;
  readonly late?: string;
}

/** How wrong a forecast may be. */
export interface ErrorDocument {
  readonly speed: string;
  readonly length: string;
  readonly time: string;
}

export interface FieldDocument {
  readonly role: FieldRole;
  readonly file: string;
  readonly columns?: Readonly<Record<string, string>>;
  readonly gaps?: "nearest" | "zero" | "stop";
  readonly beyond?: "stop" | "hold";
  readonly outside?: "stop" | "zero";
  readonly member?: number;
  readonly error?: ErrorDocument;
}

/** A craft as its file holds it; its own form edits it. */
export type CraftDocument = Readonly<Record<string, unknown>>;

export interface PlanDocument {
  readonly format: "legwork-plan/1";
  readonly title?: string;
  readonly departure: string;
  readonly craft: CraftDocument | { readonly file: string };
  readonly pace?: PaceDocument | ArrivalDocument;
  readonly window?: WindowDocument;
  readonly reserve?: string;
  readonly confidence?: string;
  readonly fields?: readonly FieldDocument[];
  readonly routes: readonly RouteDocument[];
  readonly alternates?: readonly AlternateDocument[];
  readonly whatIf?: readonly WhatIfDocument[];
}
