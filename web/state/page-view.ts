import { type ReadonlySignal, type Signal, signal } from "@preact/signals";
import type { Clock } from "../core.ts";

export type UnitsPreset = "sea" | "air" | "metric";
type Theme = "auto" | "light" | "dark";
type RibbonAxis = "distance" | "time";
export type Pane = "chart" | "ribbons" | "ledger" | "route" | "legs" | "decide";

/** What the pane of the chosen route shows: its leg table or its profile. */
type RoutePart = "table" | "profile";

/** Units of the leg table's own, by their symbols; those left out are the preset's. */
export interface LegUnits {
  readonly distance?: string;
  readonly speed?: string;
  readonly amount?: string;
}

/** A place on a route that the pointer or the keyboard points at, shown alike on chart, ribbons and table. */
interface Pointed {
  readonly route: number;
  /** Metres from the route's start. */
  readonly distance_m: number;
}

/** How the page shows the plan; none of it is part of the plan, and none of it is undone. */
export interface PageView {
  readonly units: Signal<UnitsPreset>;
  /** Whether the user chose the units; until then the craft of each plan that is opened does. */
  readonly unitsChosen: Signal<boolean>;
  /** IANA name of the time zone that times are shown in; "UTC" unless chosen. */
  readonly zone: Signal<string>;
  /** Whether times are told to the minute or to the second; it follows from how long the routes take. */
  readonly clock: ReadonlySignal<Clock>;
  readonly theme: Signal<Theme>;
  readonly axis: Signal<RibbonAxis>;
  /** The instant that the chart shows, ms since 1970; `null` for the departure. */
  readonly instant: Signal<number | null>;
  readonly pointed: Signal<Pointed | null>;
  /** Route that the ledger's differences are taken against; `null` for none. */
  readonly base: Signal<number | null>;
  /** The pane that a narrow screen shows. */
  readonly pane: Signal<Pane>;
  /** Counts the plans that were opened: the chart shows the whole of each. */
  readonly opened: Signal<number>;
  /** A place that the chart is asked to bring into view. */
  readonly lookAt: Signal<{ readonly lat: number; readonly lon: number } | null>;
  /** Whether a click on the chart adds a waypoint. */
  readonly adding: Signal<boolean>;
  /** Which field is shaded by speed on the chart. */
  readonly shading: Signal<"none" | "wind" | "current">;
  /** Height of the fields on the chart that was chosen, m above the surface; `null` for the routes'. */
  readonly level: Signal<number | null>;
  /** The level of the fields that is nearest to the routes; `null` while none is known. */
  readonly routesLevel: Signal<number | null>;
  readonly routePart: Signal<RoutePart>;
  /** Keys of the leg table's columns that are left out. */
  readonly hiddenColumns: Signal<readonly string[]>;
  readonly legUnits: Signal<LegUnits>;
  /** Whether the hint for a first visit was dismissed. */
  readonly hintSeen: Signal<boolean>;
  /** The user's own raster tile address with {z}, {x}, {y}; empty for none. */
  readonly tiles: Signal<string>;
  /** What went wrong with something that the user did, in a sentence, until it is dismissed. */
  readonly notice: Signal<string | null>;
  /** Brings in a newer version of the page; `null` where none waits. */
  readonly newer: Signal<(() => Promise<void>) | null>;
  /** What the live region says. */
  readonly announcement: Signal<string>;
}

export function createPageView(clock: ReadonlySignal<Clock> = signal<Clock>("minute")): PageView {
  return {
    units: signal<UnitsPreset>("sea"),
    unitsChosen: signal(false),
    zone: signal("UTC"),
    clock,
    theme: signal<Theme>("auto"),
    axis: signal<RibbonAxis>("distance"),
    instant: signal<number | null>(null),
    pointed: signal<Pointed | null>(null),
    base: signal<number | null>(null),
    pane: signal<Pane>("chart"),
    opened: signal(0),
    lookAt: signal<{ readonly lat: number; readonly lon: number } | null>(null),
    adding: signal(false),
    shading: signal<"none" | "wind" | "current">("none"),
    level: signal<number | null>(null),
    routesLevel: signal<number | null>(null),
    routePart: signal<RoutePart>("table"),
    hiddenColumns: signal<readonly string[]>(["from", "final", "crab", "still"]),
    legUnits: signal<LegUnits>({}),
    hintSeen: signal(false),
    tiles: signal(""),
    notice: signal<string | null>(null),
    newer: signal<(() => Promise<void>) | null>(null),
    announcement: signal(""),
  };
}

/** The height of the fields on the chart, m above the surface; `null` for their lowest level. */
export function shownLevel({ level, routesLevel }: PageView): number | null {
  return level.value ?? routesLevel.value;
}
