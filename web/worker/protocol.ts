import type { Estimate, FieldRole, Profile } from "../core.ts";
import type { FieldDocument, PlanDocument } from "../state/plan-document.ts";

/*
 * What page and worker say to each other. Fields stay in the worker; what comes back is small or is transferred.
 */

/** A route as it truly runs, for drawing: the track between waypoints densified, longitudes continuous (not reduced to a turn). */
export interface RouteDrawing {
  readonly lat: Float64Array;
  readonly lon: Float64Array;
  /** Metres from the route's start. */
  readonly distance_m: Float64Array;
  /** Index into these arrays of each waypoint. */
  readonly waypoints: Int32Array;
  /** The figures along the route, as far as it came. */
  readonly profile: Profile | null;
}

export type EstimateAnswer =
  | { readonly ok: true; readonly estimate: Estimate; readonly drawings: readonly RouteDrawing[] }
  | { readonly ok: false; readonly fault: string };

export interface FieldSource {
  /** The name that the plan refers to. */
  readonly name: string;
  readonly content: Blob;
}

export interface FieldProgress {
  readonly readBytes: number;
  readonly totalBytes: number;
}

/** What a field file holds, for the list of fields and for the chart. */
export interface FieldSheet {
  readonly name: string;
  readonly role: FieldRole;
  readonly lat: readonly [number, number];
  /** West to east; east may exceed 180. */
  readonly lon: readonly [number, number];
  /** Valid times, ms since 1970; empty for a steady field. */
  readonly times: readonly number[];
  readonly heights_m: readonly number[];
  readonly nodes: number;
  readonly missing: number;
  readonly ignoredColumns: readonly string[];
  readonly bytes: number;
}

export type FieldAnswer =
  | { readonly ok: true; readonly sheet: FieldSheet }
  | { readonly ok: false; readonly fault: string; readonly cancelled: boolean };

/** The first rows of a file as they stand, for the mapping of columns. */
export interface FieldPreview {
  readonly header: readonly string[];
  readonly rows: readonly (readonly string[])[];
  /** Our axis or quantity name for each column that was recognised, else `null`. */
  readonly recognised: readonly (string | null)[];
  /** Why it can't be read as it stands; `null` where it can. */
  readonly fault: string | null;
}

/** Places on a regular lattice of the geography, so that barbs stay where they are while the chart moves. */
export interface LatticeQuestion {
  readonly role: FieldRole;
  readonly instant: number;
  readonly height_m: number | null;
  readonly south: number;
  readonly north: number;
  readonly west: number;
  readonly east: number;
  /** Lattice steps, degrees. */
  readonly stepLat: number;
  readonly stepLon: number;
}

/** Where the field has a value, in order; places without one are left out. Components in m/s, the way the medium moves. */
export interface Lattice {
  readonly lat: Float64Array;
  readonly lon: Float64Array;
  readonly east_m_s: Float32Array;
  readonly north_m_s: Float32Array;
}

export type CoastDetail = "50m" | "10m";

/** A tile of coastline: rings in tile coordinates of 0..4096, with where each ends. */
export interface CoastTile {
  readonly points: Int16Array;
  /** Index after the last point of each ring. */
  readonly ends: Int32Array;
  /** What it was cut from: the coarse coast stands in until the fine one is loaded. */
  readonly detail: CoastDetail;
}

export const COAST_EXTENT = 4096;

/** What the worker does for the page. */
export interface Worker {
  /** Reads a field file under a ticket, by which it can be cancelled. */
  openField(
    ticket: number,
    source: FieldSource,
    field: FieldDocument,
    progress: (progress: FieldProgress) => void,
  ): Promise<FieldAnswer>;
  cancel(ticket: number): void;
  forgetField(name: string): void;
  preview(source: FieldSource, field: FieldDocument): Promise<FieldPreview>;
  estimate(plan: PlanDocument): Promise<EstimateAnswer>;
  lattice(question: LatticeQuestion): Promise<Lattice>;
  coastTile(z: number, x: number, y: number, detail: CoastDetail): Promise<CoastTile>;
  /** Resolves once the fine coast is indexed. */
  loadFineCoast(): Promise<void>;
}
