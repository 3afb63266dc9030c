import { useSignal } from "@preact/signals";
import { useEffect, useLayoutEffect, useMemo } from "preact/hooks";
import { shownUnit } from "../format/units.ts";
import { estimable } from "../state/estimable.ts";
import type { PageState } from "../state/page-state.ts";
import { Bests } from "./Bests.tsx";
import { HeatMap } from "./HeatMap.tsx";
import { HeatScale } from "./HeatScale.tsx";
import { canShowAll, type Measure, type RowChoice } from "./heat-rows.ts";
import { InTimeList } from "./InTimeList.tsx";
import { proposedWindow } from "./proposed-window.ts";
import { WindowSettings } from "./WindowSettings.tsx";
import { createWindowFill } from "./window-fill.ts";
import { windowKey } from "./window-plan.ts";
import { windowWords } from "./window-words.ts";

/** Departures compared: every route, and every speed where the window names some, over a span of departures. */
export function WindowView({ page }: { readonly page: PageState }) {
  const { store, answers, desk, view } = page;
  const fill = useMemo(() => createWindowFill([() => page.engine, page.second]), [page]);
  const measure = useSignal<Measure>("time");
  const rows = useSignal<RowChoice>({ by: "all", route: 0, speed: 0 });
  const plan = store.plan.value;
  const { estimate, landPending } = answers.answer.value;
  const part = estimable(plan);
  const window = plan.window ?? proposedWindow(plan, estimate);
  // A name in the plan may come to stand for another file.
  const files = store.files.value;
  const key = part === null || estimate === null ? "" : windowKey(part.plan, window, landPending);

  useLayoutEffect(() => {
    if (part !== null && key !== "") void fill.ask({ ...part.plan, window });
    return () => fill.stop();
    // The key says when any of the others is another.
  }, [fill, key, files]);
  useEffect(
    () => () => {
      desk.preview.value = null;
    },
    [desk],
  );

  const filled = fill.filled.value;
  const speeds = filled?.shape.speeds ?? null;
  return (
    <div class="window-view">
      <p class="only-print">{windowWords(window, view.zone.value)}</p>
      <div class="window-bar">
        <WindowSettings page={page} window={window} fault={filled?.bests?.inTimeFault ?? null} />
      </div>
      {fill.fault.value !== null && (
        <p class="fault" role="alert">
          {fill.fault.value}
        </p>
      )}
      {filled === null ? (
        <p class="quiet window-none">
          {part === null ? "A route with two waypoints can be compared." : "Working out the departures…"}
        </p>
      ) : (
        <>
          <HeatScale filled={filled} measure={measure.value} onMeasure={(next) => (measure.value = next)}>
            {speeds !== null && (
              <RowsField
                page={page}
                rows={rows.value}
                speeds={speeds}
                isAll={canShowAll(filled.shape)}
                onRows={(next) => (rows.value = next)}
              />
            )}
          </HeatScale>
          <HeatMap page={page} filled={filled} measure={measure.value} rows={rows.value} />
          <InTimeList page={page} filled={filled} />
          <Bests page={page} filled={filled} onRefine={() => void fill.refine()} />
        </>
      )}
    </div>
  );
}

interface RowsFieldProps {
  readonly page: PageState;
  readonly rows: RowChoice;
  readonly speeds: readonly number[];
  /** Whether every route can be shown at every speed. */
  readonly isAll: boolean;
  readonly onRows: (rows: RowChoice) => void;
}

function RowsField({ page, rows, speeds, isAll, onRows }: RowsFieldProps) {
  const names = page.store.plan.value.window?.speeds ?? [];
  const route = page.store.selection.value.route;
  return (
    <label>
      <span>Rows</span>
      <select
        value={rows.by === "speeds" || (rows.by === "all" && isAll) ? rows.by : String(rows.speed)}
        onChange={({ currentTarget: { value } }) =>
          onRows(
            value === "speeds" || value === "all"
              ? { by: value, route, speed: 0 }
              : { by: "routes", route, speed: Number(value) },
          )
        }
      >
        {isAll && (
          <option value="all">
            routes at every speed, {shownUnit(page.view.units.value, "speed").symbol}
          </option>
        )}
        {speeds.map((speed, at) => (
          <option key={speed} value={at}>
            routes at {names[at] ?? speed}
          </option>
        ))}
        <option value="speeds">speeds of {page.store.plan.value.routes[route]?.name ?? "the route"}</option>
      </select>
    </label>
  );
}
