import type { DecidedRoute, RouteStatus } from "../core.ts";
import { clockSince, durationText } from "../format/time-text.ts";
import { inUnit, storeUnit } from "../format/units.ts";
import { SeverityShape } from "../ledger/StatusMark.tsx";
import type { PageState } from "../state/page-state.ts";
import { missWords } from "./spread-words.ts";
import "./what-if-table.css";

interface Row {
  readonly name: string;
  readonly arrival: string | null;
  readonly arrivalMiss_s?: number | null;
  readonly passage_s: number | null;
  readonly use: number | null;
  readonly remaining: number | null;
  readonly status: RouteStatus;
  readonly why: string | null;
}

/** What becomes of a route where what it rests on is otherwise; each row an estimate of its own. */
export function WhatIfTable({ page, route }: { readonly page: PageState; readonly route: DecidedRoute }) {
  const { whatIf } = route;
  if (whatIf === undefined || whatIf.length === 0) return null;
  const { zone, clock } = page.view;
  const amount = storeUnit(route.storeUnit, route.usable);
  const rows: Row[] = whatIf.map(({ worst, ...figures }) => ({ ...figures, why: worst?.message ?? null }));
  return (
    <table class="what-if-table">
      <caption>What if: {route.name}, each an estimate of its own</caption>
      <thead>
        <tr>
          <th scope="col">What if</th>
          <th scope="col">Arrival</th>
          <th scope="col">{route.totals.stay_s > 0 ? "Time + stays" : "Time"}</th>
          <th scope="col">Use {amount.symbol}</th>
          <th scope="col">Left {amount.symbol}</th>
          <th scope="col">Comes to</th>
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <tr key={row.name} title={row.why ?? undefined}>
            <th scope="row">{row.name}</th>
            <td>
              {row.arrival === null
                ? "not reached"
                : clockSince(row.arrival, route.departure, zone.value, clock.value)}
              {missWords(row.arrivalMiss_s)}
            </td>
            {/* Not torn apart at the end of a line. */}
            <td>{durationText(row.passage_s).replaceAll(" ", "\u00A0")}</td>
            <td>{inUnit(row.use, amount)}</td>
            <td>{inUnit(row.remaining, amount)}</td>
            <td>
              <SeverityShape severity={row.status} /> {row.status}
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
