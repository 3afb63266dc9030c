import { Chart } from "../chart/Chart.tsx";
import { DeskTabs } from "../desk/DeskTabs.tsx";
import { loadDesk } from "../desk/load-desk.ts";
import { Ledger } from "../ledger/Ledger.tsx";
import { LegTable } from "../leg-table/LegTable.tsx";
import { NewerVersion } from "../offline/NewerVersion.tsx";
import { Ribbons } from "../ribbon/Ribbons.tsx";
import { isStale } from "../state/answers.ts";
import { FaultPlace } from "../state/fault-place.ts";
import type { PageState } from "../state/page-state.ts";
import type { Pane } from "../state/page-view.ts";
import { RouteEditor } from "../waypoints/RouteEditor.tsx";
import { ClockBar } from "./ClockBar.tsx";
import { Header } from "./Header.tsx";
import { Hint } from "./Hint.tsx";
import { LazyPart } from "./LazyPart.tsx";
import { PlanBar } from "./PlanBar.tsx";
import { PrintHead } from "./PrintHead.tsx";

const PANES: readonly (readonly [Pane, string])[] = [
  ["chart", "Chart"],
  ["ribbons", "Ribbons"],
  ["ledger", "Ledger"],
  ["route", "Plan"],
  ["legs", "Legs"],
  ["decide", "Decide"],
];

/** On a narrow screen the desk is a pane among the others. */
function showPane({ view, desk }: PageState, pane: Pane): void {
  view.pane.value = pane;
  if (pane !== "decide") desk.part.value = "legs";
  else if (desk.part.value === "legs") desk.part.value = "window";
}

const loadFieldDialog = async () => (await import("../files/FieldDialog.tsx")).FieldDialog;

export function App({ page }: { readonly page: PageState }) {
  const { view, desk, answers } = page;
  return (
    <FaultPlace.Provider value={answers.answer.value.faultKey}>
      <div class="page" data-shown={view.pane.value}>
        <nav class="skip" aria-label="Skip to">
          <a href="#ledger-title">Ledger</a>
          <a href="#route-title">Route</a>
          <a href="#legs-title">Leg table</a>
        </nav>
        <PrintHead page={page} />
        <Header page={page} />
        {view.notice.value !== null && (
          <div class="notice" role="alert">
            {view.notice.value}
            <button
              type="button"
              onClick={() => {
                view.notice.value = null;
              }}
            >
              Dismiss
            </button>
          </div>
        )}
        <NewerVersion page={page} />
        <PlanBar page={page} />
        <Hint page={page} />
        {page.asking.value !== null && <LazyPart page={page} load={loadFieldDialog} />}
        <main data-desk={desk.part.value} data-stale={isStale(answers.answer.value) ? "" : undefined}>
          <div class="column">
            <section class="pane chart-pane" data-pane="chart" aria-label="Chart and clock">
              <Chart page={page} />
              <ClockBar page={page} />
            </section>
            <Ribbons page={page} />
            <DeskTabs page={page} legs />
            <LegTable page={page} />
            {desk.part.value !== "legs" && <LazyPart page={page} load={loadDesk} />}
          </div>
          <div class="column">
            <Ledger page={page} />
            <RouteEditor page={page} />
          </div>
        </main>
        <nav class="pane-tabs" aria-label="Panes">
          {PANES.map(([pane, name]) => (
            <button
              key={pane}
              type="button"
              aria-current={view.pane.value === pane ? "true" : undefined}
              onClick={() => showPane(page, pane)}
            >
              {name}
            </button>
          ))}
        </nav>
        <p class="unseen" role="status" aria-live="polite">
          {view.announcement.value}
        </p>
      </div>
    </FaultPlace.Provider>
  );
}
