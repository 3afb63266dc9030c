import type { ArrivalWindow } from "../choose/arrival-window.ts";
import type { DepartureWindow } from "../choose/departure-window.ts";
import type { InTime } from "../choose/in-time.ts";
import type { RefinedWindow } from "../choose/refine.ts";
import type { RoutePaces } from "../choose/route-paces.ts";
import type { SureWindow } from "../choose/sure-window.ts";
import type { WindowCell } from "../choose/window-cell.ts";
import type { WindowSummary } from "../choose/window-summary.ts";
import type { Craft, Pace } from "../craft/craft.ts";
import type { FieldSummary } from "../estimate/result.ts";

/** What the writers of a window of departures take: the cells, and what was asked. */
export interface WindowReport {
  readonly title: string;
  readonly fields: readonly FieldSummary[];
  readonly craft: Pick<Craft, "name" | "moves" | "store">;
  readonly pace: Pace;
  /** The arrival that the plan's pace asks for; `null` where its pace says how fast. */
  readonly arrive: ArrivalWindow | null;
  readonly window: DepartureWindow;
  readonly cells: readonly WindowCell[];
  readonly summary: WindowSummary;
  /** The bests to the minute; `null` where they were not asked for. */
  readonly refined: RefinedWindow | null;
  /** The latest departures that arrive in time; `null` where no arrival is to be kept. */
  readonly inTime: InTime | null;
  /** The choice of pace per route; `null` where it was not asked for. */
  readonly paces: readonly RoutePaces[] | null;
  /** The bests put to the test; left out or `null` where the plan names nothing to do so with. */
  readonly sure?: SureWindow | null;
}
