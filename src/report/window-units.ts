import type { Units } from "./input.ts";
import { type ColumnUnit, speedColumn, storeColumn } from "./table-units.ts";
import { type Clock, clockFor } from "./time-text.ts";
import type { WindowReport } from "./window-input.ts";

/** The units of a window's table, chosen once. */
export interface WindowUnits {
  readonly speed: ColumnUnit;
  readonly store: ColumnUnit;
  readonly clock: Clock;
  /** Clock of the departures. */
  readonly departures: Clock;
  /** Whether the speed of a cell is worth a column: it is swept, or found to make the arrival. */
  readonly speeds: boolean;
}

const MINUTE = 60_000;

export function windowUnits({ cells, craft, window, arrive }: WindowReport, system: Units): WindowUnits {
  const amounts = cells.flatMap(({ use, remaining }) => [use ?? 0, Math.abs(remaining ?? 0)]);
  const longest = cells.reduce((most, { passage_s }) => Math.max(most, passage_s ?? 0), 0);
  const onMinutes = window.from % MINUTE === 0 && (1000 * window.every_s) % MINUTE === 0;
  return {
    speed: speedColumn(system),
    store: storeColumn(
      craft.store.unit,
      amounts.reduce((most, each) => Math.max(most, each), craft.store.usable),
    ),
    clock: clockFor(longest),
    departures: onMinutes ? "minute" : "second",
    speeds: window.speeds_m_s !== null || arrive !== null,
  };
}
