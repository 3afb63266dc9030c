import type { DecidedRoute } from "../choose/decided.ts";
import type { EnsembleFigures, EnsembleResult } from "../choose/ensemble.ts";
import type { Quantiles } from "../choose/quantiles.ts";
import { membersArriveText, memberText } from "./arrival-lines.ts";
import { type Column, laidOut, TABLE_WIDTH } from "./columns.ts";
import { placedText } from "./number-text.ts";
import { percentText } from "./percent-text.ts";
import { wrapped } from "./plain-text.ts";
import { inLastPlace, leftInLastPlace } from "./rounding.ts";
import { STORE_WIDTH, type TableUnits } from "./table-units.ts";
import { clockSeconds, durationText, etaText } from "./time-text.ts";

const KEYS = ["min", "p10", "p50", "p90", "max"] as const;
const NAMES = ["least", "10 %", "50 %", "90 %", "most"];

/** A route under the members of an ensemble: quantiles of each leg's end and of the route; nothing where there is none. */
export function ensembleTable(route: DecidedRoute, units: TableUnits): string[] {
  const { ensemble } = route;
  if (ensemble === undefined) return [];
  const { legs, members } = ensemble;
  const last = legs.length > 1 ? legs.slice(0, -1) : [];
  const parts = [...last.map((leg) => ({ ...leg, name: `Leg ${leg.leg}` })), { ...ensemble, name: "Route" }];
  const { head, rows } = laidOut(columnsOf(parts, units), 0);
  return [
    `Ensemble of ${members.length} members (the figures above are of member ${members[0]})`,
    ...head,
    ...rows,
    ...wrapped(countsText(route, ensemble), TABLE_WIDTH),
  ];
}

function columnsOf(
  parts: readonly (EnsembleFigures & { readonly name: string })[],
  units: TableUnits,
): Column[] {
  const { clock, store } = units;
  const seconds = clockSeconds(clock);
  const cells = <F>(of: (part: EnsembleFigures) => Quantiles<F> | null, text: (figure: F | null) => string) =>
    parts.flatMap((part) => KEYS.map((key) => text(of(part)?.[key] ?? null)));
  const amount = (round: typeof inLastPlace) => (value: number | null) =>
    placedText(
      value === null ? null : round(value / store.size, store.decimals),
      store.decimals,
      STORE_WIDTH,
    );
  const time = (value: number | null) =>
    durationText(value === null ? null : Math.round(value / seconds), clock, 7);
  return [
    { head: ["", ""], cells: parts.flatMap(({ name }) => [name, "", "", "", ""]), align: "left" },
    { head: ["", ""], cells: parts.flatMap(() => NAMES), align: "left" },
    {
      head: ["Time", clock === "minute" ? "h:mm" : "h:mm:ss"],
      cells: cells(({ time_s }) => time_s, time),
    },
    {
      head: ["ETA UTC", clock === "minute" ? "dd hh:mm" : "hh:mm:ss"],
      cells: cells(
        ({ arrival }) => arrival,
        (iso) => etaText(iso, clock),
      ),
    },
    { head: ["Use", store.symbol], cells: cells(({ use }) => use, amount(inLastPlace)) },
    { head: ["Left", store.symbol], cells: cells(({ remaining }) => remaining, amount(leftInLastPlace)) },
  ];
}

function countsText(route: DecidedRoute, ensemble: EnsembleResult): string {
  const { members, reserveHolds, breaksReserve, doesNotArrive } = ensemble;
  const what = route.reserve === 0 ? "The store lasts" : "The reserve holds";
  const held = Math.round(reserveHolds * members.length);
  const broken = breaksReserve.length === 0 ? "" : ` Broken in ${memberText(breaksReserve)}.`;
  const stopped = doesNotArrive.length === 0 ? "" : ` Does not arrive in ${memberText(doesNotArrive)}.`;
  return `${what} in ${held} of ${members.length} members (${percentText(reserveHolds)}).${broken}${stopped}${membersArriveText(route, ensemble)}`;
}
