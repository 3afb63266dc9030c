import type {
  DecidedRoute,
  Estimate,
  FieldInspection,
  FieldRole,
  InTime,
  PaceCurve,
  Profile,
  RefinedWindow,
  ReportFormat,
  SensitivityProfile,
  StillCurve,
  StillPoint,
  StoreUnit,
  SureWindow,
  Units,
  WindowCell,
  WindowSummary,
} from "../core.ts";
import type { CraftDocument, FieldDocument, PlanDocument, RouteDocument } from "../state/plan-document.ts";

/*
 * What page and worker say to each other. Files and fields stay in the worker; what comes back is small or is transferred.
 */

/** A route as it truly runs, for drawing: the track between waypoints densified, longitudes continuous (not reduced to a turn). */
export interface RouteDrawing {
  readonly lat: Float64Array;
  readonly lon: Float64Array;
  /** Metres from the route's start. */
  readonly distance_m: Float64Array;
  /** Index into these arrays of each waypoint. */
  readonly waypoints: Int32Array;
  /** The figures along the route, as far as it came; its longitudes are continuous with the line's. */
  readonly profile: Profile | null;
}

/** What a user can mend comes back as a sentence; a defect is thrown. */
interface Fault {
  readonly ok: false;
  readonly fault: string;
}

interface Estimated {
  readonly ok: true;
  readonly estimate: Estimate;
  readonly drawings: readonly RouteDrawing[];
  /** Whether the routes were not yet held against land, since the fine coast isn't loaded. */
  readonly landPending: boolean;
  /** Whether the fields have several members, of which the estimate is on the control's. */
  readonly ensemble: boolean;
}

export type EstimateAnswer =
  | Estimated
  | (Fault & {
      /** The key of the plan at fault; `null` where it is another file's, or none. */
      readonly key: string | null;
    });

/** Routes that were read from a file of another kind, and what of it is not in them. */
export type RoutesAnswer =
  | { readonly ok: true; readonly routes: readonly RouteDocument[]; readonly notes: readonly string[] }
  | Fault;

/** What an archive holds: the plan's file and, by name, the others. */
export type ArchiveAnswer =
  | {
      readonly ok: true;
      readonly plan: { readonly name: string; readonly text: string };
      readonly files: ReadonlyMap<string, Blob>;
    }
  | Fault;

export type WrittenArchive = { readonly ok: true; readonly content: Blob } | Fault;

export interface FieldProgress {
  readonly readBytes: number;
  readonly totalBytes: number;
}

export type FieldAnswer =
  | { readonly ok: true; readonly inspection: FieldInspection }
  | { readonly ok: false; readonly fault: string; readonly cancelled: boolean };

/** The first rows of a file as they stand, for the mapping of columns. */
export interface FieldPreview {
  readonly header: readonly string[];
  readonly rows: readonly (readonly string[])[];
  /** Headers that were recognised or mapped. */
  readonly used: readonly string[];
  /** Why it can't be read as it stands; `null` where it can. */
  readonly fault: string | null;
  /** Whether its first bytes are those of a file that is no table: then no mapping of columns helps. */
  readonly isOtherKind: boolean;
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
  /** Where the lattice stands between whole steps, as a share of one. */
  readonly phase: number;
}

/** Where the field has a value or lacks one inside its grid, in order; places outside are left out. Components in m/s, the way the medium moves. */
export interface Lattice {
  readonly lat: Float64Array;
  readonly lon: Float64Array;
  readonly east_m_s: Float32Array;
  readonly north_m_s: Float32Array;
  /** What each vector rests on, by the core's lattice states; at a gap it is zero and means nothing. */
  readonly state: Uint8Array;
}

export interface PlaceQuestion {
  readonly lat: number;
  readonly lon: number;
  readonly height_m: number | null;
  readonly instant: number;
}

/** A field's flow at a place. Direction: where a wind comes from, where a current sets, degrees true. */
export interface FieldAt {
  readonly role: FieldRole;
  readonly flow: {
    readonly speed_m_s: number;
    readonly direction_deg: number;
    readonly gust_m_s: number | null;
  } | null;
  /** Why there is no flow; `null` where there is one. */
  readonly none: "outside-area" | "outside-time" | "gap" | null;
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

/** A craft as read, with what it spends in a still medium; or its first fault, with the key that it stands at. */
export type CraftAnswer =
  | {
      readonly ok: true;
      /** `null` where nothing bounds the craft's speed. */
      readonly curve: StillCurve | null;
      /** Where the plan's pace runs on the curve; `null` where it finds no speed. */
      readonly point: StillPoint | null;
      readonly paceFault: string | null;
      /** The speed of least use per metre within the craft's range; `null` where it has no range. */
      readonly least: StillPoint | null;
      /** The craft's least ground speed, m/s. */
      readonly limit: number | null;
    }
  | { readonly ok: false; readonly key: string | null; readonly fault: string };

export interface ReportQuestion {
  readonly format: ReportFormat;
  readonly units: Units;
  /** Index of the only route to write, in the plan last estimated; `null` for all. */
  readonly route: number | null;
}

/** An answer, or what the user can mend in a sentence. */
export type Answered<T> = ({ readonly ok: true } & T) | Fault;

/** What is decided on top of an estimate, one entry a route of the plan asked. */
export interface DecideAnswer {
  readonly routes: readonly DecidedRoute[];
  /** Empty where the plan asks nothing about how sure it is. */
  readonly sensitivities: readonly (SensitivityProfile | null)[];
}

/** A window's cells: cell (departure d, route r, speed s) has index (d × routes + r) × speeds + s. */
export interface WindowShape {
  /** ms since 1970, ascending. */
  readonly departures: readonly number[];
  readonly routes: number;
  /** m/s; `null` where the plan's own pace holds, which counts as one. */
  readonly speeds: readonly number[] | null;
  readonly storeUnit: StoreUnit;
  readonly usable: number;
  /** Whether the plan names members, what-ifs or a stated error to put the bests to the test with. */
  readonly tried: boolean;
}

/** A window, and its first cells in the order in which it fills, as many as were done in time. */
export interface WindowBegun {
  readonly shape: WindowShape;
  readonly first: readonly WindowCell[];
}

/** The first of the cells asked for, as many as were done in time. */
export interface WindowSlice {
  readonly cells: readonly WindowCell[];
}

export interface WindowBests {
  readonly summary: WindowSummary;
  /** To the minute; `null` where that was not asked. */
  readonly refined: RefinedWindow | null;
  /** Latest departures that arrive in time; `null` where the window keeps no arrival, or one that it cannot. */
  readonly inTime: InTime | null;
  /** What is wrong with the arrival to keep; `null` where nothing is. */
  readonly inTimeFault: string | null;
}

/** A window whose bests are to be put to the test: all its cells, and what was made of them. */
export interface SureQuestion {
  readonly cells: readonly WindowCell[];
  /** Whether the bests are to be sure to the minute too. */
  readonly refine: boolean;
  readonly inTime: InTime | null;
}

/** `null` while there is more to try. */
export interface SureSlice {
  readonly sure: SureWindow | null;
}

/** A route against the speed through the medium. */
export interface PaceAnswer {
  readonly curve: PaceCurve;
  readonly least: WindowCell | null;
  /** What keeps it from being a true least, in words; `null` where nothing does. */
  readonly leastBound: string | null;
  readonly fastest: WindowCell | null;
  /** What bounds it other than the reserve, in words; `null` where that does. */
  readonly fastestBound: string | null;
  /** The plan's own through-speed, m/s; `null` where its pace holds something else. */
  readonly speed_m_s: number | null;
}

/** What the worker does for the page. */
export interface Worker {
  /** Keeps a file that a plan may name: a craft, or a field to be read when it is first needed. */
  keepFile(name: string, content: Blob): void;
  forgetFile(name: string): void;
  /** Reads a field file that is kept, under a ticket by which it can be cancelled. */
  openField(
    ticket: number,
    field: FieldDocument,
    progress: (progress: FieldProgress) => void,
  ): Promise<FieldAnswer>;
  cancel(ticket: number): void;
  /** Tries the head of a field file with a mapping of columns, without keeping anything. */
  preview(content: Blob, field: FieldDocument): Promise<FieldPreview>;
  estimate(plan: PlanDocument): Promise<EstimateAnswer>;
  /** Writes the estimate last made, as the command line does; `null` where there is none. */
  report(question: ReportQuestion): Promise<string | null>;
  /** Reads a craft as its form holds it; the pace is that of the estimate last made. */
  studyCraft(craft: CraftDocument): Promise<CraftAnswer>;
  /** Reads routes from a GPX, GeoJSON or CSV file. */
  readRoutes(name: string, content: Blob): Promise<RoutesAnswer>;
  openArchive(name: string, content: Blob): Promise<ArchiveAnswer>;
  /** One file of a plan with the files that it names. */
  packArchive(plan: PlanDocument, stem: string): Promise<WrittenArchive>;
  /** The text of a plan's or a craft's file. */
  planText(plan: PlanDocument): Promise<string>;
  craftText(craft: CraftDocument): Promise<string>;
  lattice(question: LatticeQuestion): Promise<Lattice>;
  /** The fields of the plan last estimated, at a place. */
  fieldsAt(question: PlaceQuestion): Promise<readonly FieldAt[]>;
  /** Heights at which those fields have levels, m, ascending, and the one nearest to the routes last estimated. */
  levels(): { readonly heights: readonly number[]; readonly ofRoutes: number | null };
  coastTile(z: number, x: number, y: number, detail: CoastDetail): Promise<CoastTile>;
  /** Resolves once the fine coast is there to be drawn. */
  loadFineCoast(): Promise<void>;
  /** Resolves once routes can be held against the fine coast. */
  loadLand(): Promise<void>;
  /** Lets another worker behind the port use this one's files, fields and land. */
  share(port: MessagePort): void;
  /** Uses those of the worker behind the port from now on. */
  follow(port: MessagePort): void;
  /** Resolves once what decides is loaded. */
  loadDeciding(): Promise<void>;
  /** @param turnBack whether turning back is wanted though the plan names no alternates */
  decide(plan: PlanDocument, turnBack: boolean): Promise<Answered<DecideAnswer>>;
  /** Opens the plan's window under a ticket, in place of the one before. */
  beginWindow(ticket: number, plan: PlanDocument, first_ms: number | null): Promise<Answered<WindowBegun>>;
  /** Cells of a window, in the order of their indices, until the time is spent; `null` where it is no longer open. */
  windowSlice(ticket: number, indices: Int32Array, budget_ms: number): Promise<WindowSlice | null>;
  windowBests(ticket: number, cells: readonly WindowCell[], refine: boolean): Promise<WindowBests | null>;
  /**
   * Puts the bests of a window to the test until the time is spent; `null` where it is no longer open.
   *
   * @param question begins anew; `null` goes on
   */
  windowSure(
    ticket: number,
    question: SureQuestion | null,
    budget_ms: number,
  ): Promise<Answered<SureSlice> | null>;
  paceCurve(plan: PlanDocument, route: number): Promise<Answered<PaceAnswer>>;
}
