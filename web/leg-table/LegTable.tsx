import { ADVISORY, type LegEstimate } from "../core.ts";
import { durationText } from "../format/time-text.ts";
import { inUnit } from "../format/units.ts";
import { Swatch } from "../ribbon/Ribbon.tsx";
import { exportsLater } from "../shell/exports-later.ts";
import { LazyPart } from "../shell/LazyPart.tsx";
import { PartButton } from "../shell/PartButton.tsx";
import { StaleMark } from "../shell/StaleMark.tsx";
import type { PageState } from "../state/page-state.ts";
import type { RouteDrawing } from "../worker/protocol.ts";
import { chosenColumns, DECIDING_COLUMNS, type LegColumn, legColumns, tableUnits } from "./leg-columns.ts";

const loadProfile = () => import("../ribbon/Profile.tsx").then(({ Profile }) => Profile);

/** The leg table of the chosen route. */
export function LegTable({ page }: { readonly page: PageState }) {
  const { store, view, answers } = page;
  const { route: chosen } = store.selection.value;
  const route = answers.answer.value.routes[chosen] ?? null;
  const drawing = answers.answer.value.drawings[chosen] ?? null;
  if (route === null) {
    return (
      <section class="pane legs" data-pane="legs" aria-labelledby="legs-title">
        <header class="pane-head">
          <h2 id="legs-title">Leg table</h2>
        </header>
        <p class="quiet">A route with two waypoints has a leg table.</p>
      </section>
    );
  }
  const shown = {
    preset: view.units.value,
    zone: view.zone.value,
    clock: view.clock.value,
    own: view.legUnits.value,
  };
  const all = legColumns(route, shown);
  const columns = chosenColumns(all, view.hiddenColumns.value);
  const { distance, amount } = tableUnits(route, shown);
  const pointed = view.pointed.value?.route === chosen ? view.pointed.value.distance_m : null;
  const marked = pointed === null || drawing === null ? null : legAt(drawing, pointed);
  return (
    <section class="pane legs" data-pane="legs" data-part={view.routePart.value} aria-labelledby="legs-title">
      <header class="pane-head">
        <h2 id="legs-title">
          {view.routePart.value === "table" ? (
            "Leg table"
          ) : (
            <>
              <span class="not-print">Profile</span>
              <span class="only-print">Leg table</span>
            </>
          )}
        </h2>
        <span class="leg-route">
          <Swatch route={chosen} />
          {route.name}
          <StaleMark page={page} />
        </span>
        <span class="tools">
          <button
            type="button"
            onClick={() => void exportsLater().then(({ copyLegTable }) => copyLegTable(page))}
          >
            Copy
          </button>
          <PartButton
            load={async () => {
              const { LegChoices } = await import("./LegChoices.tsx");
              return ({ onClose }) => <LegChoices page={page} onClose={onClose} />;
            }}
          >
            Columns
          </PartButton>
          <PartChoice page={page} />
        </span>
      </header>
      {view.routePart.value === "profile" && <LazyPart page={page} load={loadProfile} />}
      {/* biome-ignore lint/a11y/noNoninteractiveTabindex: what scrolls must be reached by keyboard (WCAG 2.1.1) */}
      <section class="scroll leg-part" aria-label={`Legs of ${route.name}`} tabIndex={0}>
        <table class="leg-table">
          <thead>
            <tr>
              {columns.map(({ key, heading, unit, numeric }) => (
                <th key={key} scope="col" class={cellClass(key, numeric)}>
                  {heading}
                  {unit !== "" && <span class="unit">{unit}</span>}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {route.legs.map((leg) => (
              <LegRow
                key={leg.leg}
                page={page}
                leg={leg}
                columns={columns}
                drawing={drawing}
                marked={leg.leg === marked}
              />
            ))}
          </tbody>
        </table>
      </section>
      <p class="leg-totals leg-part">
        {route.name}: {inUnit(route.totals.distance_m, distance)} {distance.symbol},{" "}
        {durationText(route.totals.time_s, view.clock.value)} under way
        {route.totals.stay_s > 0 && ` and ${durationText(route.totals.stay_s, view.clock.value)} of stays`},{" "}
        {inUnit(route.totals.use, amount)} {amount.symbol} used
      </p>
      <p class="advisory only-print">{ADVISORY}</p>
    </section>
  );
}

function PartChoice({ page: { view } }: { readonly page: PageState }) {
  return (
    <fieldset class="choice">
      <legend class="unseen">Shown of the chosen route</legend>
      {(["table", "profile"] as const).map((part) => (
        <label key={part}>
          <input
            type="radio"
            name="route-part"
            checked={view.routePart.value === part}
            onChange={() => {
              view.routePart.value = part;
            }}
          />
          <span>{part === "table" ? "Table" : "Profile"}</span>
        </label>
      ))}
    </fieldset>
  );
}

interface LegRowProps {
  readonly page: PageState;
  readonly leg: LegEstimate;
  readonly columns: readonly LegColumn[];
  readonly drawing: RouteDrawing | null;
  readonly marked: boolean;
}

function LegRow({ page, leg, columns, drawing, marked }: LegRowProps) {
  const { store, view } = page;
  const { route, waypoint } = store.selection.value;
  const classes = [marked ? "pointed" : "", waypoint === leg.leg ? "chosen" : ""].join(" ").trim();
  const point = (): void => {
    const middle = drawing === null ? null : middleOf(drawing, leg.leg);
    if (middle !== null) view.pointed.value = { route, distance_m: middle };
  };
  const leave = (): void => {
    view.pointed.value = null;
  };
  return (
    <tr
      class={classes}
      onPointerEnter={point}
      onPointerLeave={leave}
      onFocusCapture={point}
      onBlurCapture={leave}
      onClick={() => store.select({ route, waypoint: leg.leg })}
    >
      {columns.map(({ key, numeric, text }) => (
        <td key={key} class={cellClass(key, numeric)}>
          {key === "to" ? (
            <button type="button" class="leg-pick" aria-pressed={waypoint === leg.leg}>
              {text(leg)}
            </button>
          ) : (
            text(leg)
          )}
        </td>
      ))}
    </tr>
  );
}

function cellClass(key: string, numeric: boolean): string {
  return [numeric ? "figure" : "", DECIDING_COLUMNS.includes(key) ? "decides" : ""].join(" ").trim();
}

/** The leg, from 1, that a distance along the route lies on. */
export function legAt(drawing: RouteDrawing, distance_m: number): number {
  const ends = Array.from(drawing.waypoints, (sample) => drawing.distance_m[sample] ?? 0);
  const next = ends.findIndex((end) => end > distance_m);
  return next === -1 ? ends.length - 1 : Math.max(next, 1);
}

function middleOf(drawing: RouteDrawing, leg: number): number | null {
  const from = drawing.distance_m[drawing.waypoints[leg - 1] ?? -1];
  const to = drawing.distance_m[drawing.waypoints[leg] ?? -1];
  return from === undefined || to === undefined ? null : (from + to) / 2;
}
