import type { WindowCell } from "../core.ts";
import { durationText } from "../format/time-text.ts";
import { columnOf } from "./heat-places.ts";
import type { HeatRow } from "./heat-rows.ts";
import type { Filled } from "./window-fill.ts";

/** The arrival that a window is to keep, ms since 1970; `null` where it names none, or one that cannot be read. */
export function arrivalToKeep({ plan }: Pick<Filled, "plan">): number | null {
  const instant = Date.parse(plan.window?.arriveBy ?? "");
  return Number.isNaN(instant) ? null : instant;
}

/** Time to spare at an arrival, s, negative where it is too late; `null` where there is no arrival, or none to keep. */
export function spareTime({ arrival }: WindowCell, arriveBy: number | null): number | null {
  return arrival === null || arriveBy === null ? null : (arriveBy - Date.parse(arrival)) / 1000;
}

/** Whether a departure can be done and keeps the arrival. */
export function keepsArrival(cell: WindowCell, arriveBy: number | null): boolean {
  const spare = spareTime(cell, arriveBy);
  return cell.status !== "stop" && spare !== null && spare >= 0;
}

/** `in time, 23 min to spare`, `1 h 10 too late`; empty where nothing is to be kept. */
export function spareText(cell: WindowCell, arriveBy: number | null): string {
  const spare = spareTime(cell, arriveBy);
  if (spare === null) return "";
  return spare >= 0 ? `in time, ${durationText(spare)} to spare` : `${durationText(-spare)} too late`;
}

/** Where the latest departures in time stand, once they are tried those that hold: their row, and how many columns after the first departure. */
export function latestMarks(
  { bests, sure, shape }: Filled,
  rows: readonly HeatRow[],
): readonly { readonly row: number; readonly column: number }[] {
  const plain = bests?.inTime?.routes.map((own) => own.latest) ?? [];
  const lines = sure?.inTime?.map((own) => own.sure) ?? plain;
  const speeds = shape.speeds?.length ?? 1;
  return lines.flatMap((latest, at) => {
    if (latest === null) return [];
    const row = rows.findIndex((own) => own.route * speeds + (own.speed ?? 0) === at);
    const column = columnOf(shape.departures, Date.parse(latest.departure));
    return row < 0 || column === null ? [] : [{ row, column }];
  });
}
