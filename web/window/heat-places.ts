import { departingAt } from "../state/departing-at.ts";
import type { Preview } from "../state/desk.ts";
import type { PageState } from "../state/page-state.ts";
import type { HeatRow } from "./heat-rows.ts";
import type { Filled } from "./window-fill.ts";

/** px */
export const ROW_HEIGHT = 24;

/** A cell of the window as it is shown. */
export interface HeatPlace {
  readonly row: number;
  readonly column: number;
}

/** Sets a departure in the plan, with its speed where the window tries several, as one step. */
export function chooseDeparture({ store, desk, view }: PageState, preview: Preview, route: number): void {
  desk.preview.value = null;
  store.edit("Choose departure", (plan) => departingAt(plan, preview), {
    select: { route, waypoint: null },
  });
  view.instant.value = null;
  view.announcement.value = `Departure set to ${preview.departure}`;
}

export function previewOf({ shape, plan }: Filled, column: number, { speed }: HeatRow): Preview {
  const departure = new Date(shape.departures[column] ?? 0).toISOString().replace(".000Z", "Z");
  const speeds = plan.window?.speeds;
  return { departure, speed: speed === null ? null : (speeds?.[speed] ?? null) };
}

/** The page's own index of an estimated route: those still being drawn are between. */
export function routeOnPage({ store }: PageState, estimated: number): number {
  const drawn = store.plan.value.routes.flatMap(({ waypoints }, at) => (waypoints.length >= 2 ? [at] : []));
  return drawn[estimated] ?? estimated;
}

/** Where an instant lies between the first departure (0) and the last; `null` outside. */
export function columnOf(departures: readonly number[], instant: number): number | null {
  const [first = 0, second = first] = departures;
  const last = departures.at(-1) ?? first;
  if (!(instant >= first && instant <= last)) return null;
  return second > first ? (instant - first) / (second - first) : 0;
}

/** Where a key leads from a cell; `null` for a key that leads nowhere. */
export function walk(
  key: string,
  { row, column }: HeatPlace,
  rows: number,
  columns: number,
): HeatPlace | null {
  const targets: Record<string, HeatPlace> = {
    ArrowRight: { row, column: column + 1 },
    ArrowLeft: { row, column: column - 1 },
    ArrowDown: { row: row + 1, column },
    ArrowUp: { row: row - 1, column },
    PageDown: { row, column: column + 10 },
    PageUp: { row, column: column - 10 },
    Home: { row, column: 0 },
    End: { row, column: columns - 1 },
  };
  const target = targets[key];
  if (target === undefined) return null;
  const within = (value: number, count: number): number => Math.min(Math.max(value, 0), count - 1);
  return { row: within(target.row, rows), column: within(target.column, columns) };
}
