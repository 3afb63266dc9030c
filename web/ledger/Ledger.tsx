import type { DecidedRoute, RouteEstimate, StoreUnit } from "../core.ts";
import { clockSince, clockText, durationText, signedDurationText, zoneText } from "../format/time-text.ts";
import { inUnit, signedInUnit, storeUnit } from "../format/units.ts";
import { Swatch } from "../ribbon/Ribbon.tsx";
import { LazyPart } from "../shell/LazyPart.tsx";
import { StaleMark } from "../shell/StaleMark.tsx";
import { PLAN_FAULT } from "../state/fault-place.ts";
import type { PageState } from "../state/page-state.ts";
import { Advisory } from "./Advisory.tsx";
import { CostBar } from "./CostBar.tsx";
import { barsEnd } from "./cost-bar.ts";
import { FindingList } from "./FindingList.tsx";
import { type Best, bestOf } from "./ledger-best.ts";
import { StatusMark } from "./StatusMark.tsx";
import { sureWords } from "./sure-words.ts";

const loadTurnBackList = async () => (await import("../turn-back/TurnBackList.tsx")).TurnBackList;
const loadWhatIfTable = async () => (await import("../spread/WhatIfTable.tsx")).WhatIfTable;

/** A row a route: what it costs, what is left, what to worry about; beside the advisory, since here is where one decides. */
export function Ledger({ page }: { readonly page: PageState }) {
  const { store, view, answers, desk } = page;
  const { fault } = answers.answer.value;
  const routes = page.routes.value;
  const plan = store.plan.value;
  const base = view.base.value === null ? null : (routes[view.base.value] ?? null);
  const best = bestOf(routes);
  const end = barsEnd(routes);
  const zone = view.zone.value;
  const time = routes.some((route) => route && route.totals.stay_s > 0) ? "Time + stays" : "Time";
  return (
    <section class="pane ledger" data-pane="ledger" aria-labelledby="ledger-title">
      <header class="pane-head">
        <h2 id="ledger-title">Ledger</h2>
        <StaleMark page={page} />
        <label>
          Differences to{" "}
          <select
            value={view.base.value ?? ""}
            onChange={({ currentTarget: { value } }) => {
              view.base.value = value === "" ? null : Number(value);
            }}
          >
            <option value="">no route</option>
            {plan.routes.map(({ name }, at) => (
              <option key={name} value={at}>
                {name}
              </option>
            ))}
          </select>
        </label>
      </header>
      {desk.preview.value !== null && (
        <p class="looking">
          Looking at {desk.preview.value.speed !== null && `${desk.preview.value.speed}, `}
          departure {clockText(desk.preview.value.departure, zone, true)}{" "}
          {zoneText(desk.preview.value.departure, zone)}: not the plan's
        </p>
      )}
      {fault !== null && (
        <p class="fault" role="alert" id={PLAN_FAULT}>
          {fault}
        </p>
      )}
      <div class="scroll">
        <table class="ledger-table">
          <thead>
            <tr>
              <th scope="col">Route</th>
              <th scope="col">Arrival {zone === "UTC" ? "UTC" : zoneText(plan.departure, zone)}</th>
              <th scope="col">{time}</th>
              <th scope="col">Use</th>
              <th scope="col">Left</th>
              <th scope="col">Findings</th>
            </tr>
          </thead>
          {plan.routes.map(({ name }, at) => (
            <LedgerRow
              key={at}
              page={page}
              at={at}
              name={name}
              route={routes[at] ?? null}
              base={base}
              best={best}
              end={end}
              time={time}
            />
          ))}
        </table>
        <BarLegend hasBest={Object.values(best).some(({ size }) => size > 0)} />
      </div>
      <FindingList page={page} />
      <ChosenParts page={page} />
      <Advisory />
    </section>
  );
}

/** What was decided on top of the chosen route's estimate, below its findings. */
function ChosenParts({ page }: { readonly page: PageState }) {
  const at = page.store.selection.value.route;
  const route = page.routes.value[at];
  if (!route) return null;
  return (
    <>
      {(route.whatIf ?? []).length > 0 && (
        <div class="scroll">
          <LazyPart load={loadWhatIfTable} page={page} route={route} />
        </div>
      )}
      {route.turnBack !== undefined && (
        <section class="findings" aria-label={`Turning back on ${route.name}`}>
          <h3>Turning back</h3>
          <LazyPart load={loadTurnBackList} page={page} at={at} route={route} />
        </section>
      )}
    </>
  );
}

interface LedgerRowProps {
  readonly page: PageState;
  readonly at: number;
  readonly name: string;
  readonly route: DecidedRoute | null;
  readonly base: RouteEstimate | null;
  readonly best: Best;
  /** End of the longest bar, s. */
  readonly end: number;
  /** What the column of times is called. */
  readonly time: string;
}

function LedgerRow({ page, at, name, route, base, best, end, time }: LedgerRowProps) {
  const { store, view } = page;
  const chosen = store.selection.value.route === at;
  const against = base !== null && base !== route ? base : null;
  return (
    <tbody class={chosen ? "chosen" : ""}>
      <tr>
        <th scope="row">
          <button
            type="button"
            aria-pressed={chosen}
            onClick={() => store.select({ route: at, waypoint: null })}
          >
            <Swatch route={at} />
            {name}
          </button>
        </th>
        {route === null ? (
          <td colSpan={5}>still being drawn</td>
        ) : (
          <>
            <Cell label="Arrival" best={best.arrival.has(at)} difference={arrivalDifference(route, against)}>
              {route.arrival === null
                ? "not reached"
                : clockSince(route.arrival, route.departure, view.zone.value, view.clock.value)}
            </Cell>
            <Cell label={time} best={false} difference={null}>
              {durationText(wholeTime(route), view.clock.value)}
            </Cell>
            <Cell label="Use" best={best.use.has(at)} difference={amountDifference(route, against, "use")}>
              {amountText(route.totals.use, route.storeUnit, route.usable)}
            </Cell>
            <Cell
              label="Left"
              best={best.remaining.has(at)}
              difference={amountDifference(route, against, "remaining")}
            >
              {amountText(route.totals.remaining, route.storeUnit, route.usable)}
            </Cell>
            <td>
              <StatusMark route={route} />
            </td>
          </>
        )}
      </tr>
      {route !== null && (
        <tr class="cost">
          <td colSpan={6}>
            <CostBar route={route} end={end} />
            <SureLine route={route} />
          </td>
        </tr>
      )}
    </tbody>
  );
}

interface CellProps {
  readonly label: string;
  readonly best: boolean;
  readonly difference: string | null;
  readonly children: string;
}

function Cell(props: CellProps) {
  return (
    <td data-label={props.label}>
      {props.best ? (
        <span class="best-figure">
          {props.children}
          <span class="unseen"> (best)</span>
        </span>
      ) : (
        props.children
      )}
      {props.difference !== null && <span class="difference">{props.difference}</span>}
    </td>
  );
}

/** How sure it is that the reserve holds, by each source that says so. */
function SureLine({ route }: { readonly route: DecidedRoute }) {
  const words = sureWords(route);
  return words === null ? null : <p class="sure-line">{words}</p>;
}

function BarLegend({ hasBest }: { readonly hasBest: boolean }) {
  return (
    <p class="bar-legend" aria-hidden="true">
      <span class="key still" /> still <span class="key along" /> along, against <span class="key cross" />{" "}
      cross <span class="key gain" /> saved by a following flow
      {hasBest && (
        <>
          {" "}
          <span class="key best" /> best
        </>
      )}
    </p>
  );
}

function wholeTime({ totals }: RouteEstimate): number | null {
  return totals.time_s === null ? null : totals.time_s + totals.stay_s;
}

function amountText(amount: number | null, unit: StoreUnit, largest: number): string {
  const shown = storeUnit(unit, largest);
  return amount === null ? "–" : `${inUnit(amount, shown)} ${shown.symbol}`;
}

function arrivalDifference(route: RouteEstimate, base: RouteEstimate | null): string | null {
  if (base === null || route.arrival === null || base.arrival === null) return null;
  return signedDurationText((Date.parse(route.arrival) - Date.parse(base.arrival)) / 1000);
}

function amountDifference(
  route: RouteEstimate,
  base: RouteEstimate | null,
  key: "use" | "remaining",
): string | null {
  const mine = route.totals[key];
  const other = base?.totals[key] ?? null;
  if (mine === null || other === null) return null;
  return signedInUnit(mine - other, storeUnit(route.storeUnit, route.usable));
}
