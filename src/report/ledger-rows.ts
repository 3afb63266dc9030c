import type { RouteEstimate } from "../estimate/result.ts";
import { type Column, laidOut } from "./columns.ts";
import { placedText } from "./number-text.ts";
import type { RoundedColumn } from "./rounding.ts";
import type { RouteFigures } from "./route-figures.ts";
import { STORE_WIDTH, type TableUnits } from "./table-units.ts";
import { durationText } from "./time-text.ts";

const TIME_WIDTH = 9;

/**
 * The ledger of a route, a row a leg: still + along + cross = time under way, and still + penalty = use. The line-integral figure
 * beside it is the first-order estimate of along + cross.
 */
export function ledgerTable(route: RouteEstimate, figures: RouteFigures, units: TableUnits): string[] {
  const { ledger, use } = figures;
  const { symbol, decimals } = units.store;
  const unit = units.ledgerClock === "minute" ? "h:mm" : "h:mm:ss";
  const cells = (column: RoundedColumn, text: (count: number | null) => string) =>
    [...column.rows, column.total].map(text);
  const time = (head: string, column: RoundedColumn, signed: boolean): Column => ({
    head: [head, unit],
    cells: cells(column, (count) => durationText(count, units.ledgerClock, TIME_WIDTH, signed)),
  });
  const amount = (head: string, column: RoundedColumn, signed: boolean): Column => ({
    head: [head, symbol],
    cells: cells(column, (count) => placedText(count, decimals, STORE_WIDTH, signed)),
  });
  const known = ledger.firstOrder.rows[0] !== null;
  const { head, rows } = laidOut(
    [
      { head: ["", "Leg"], cells: [...route.legs.map((leg) => String(leg.leg)), "All"] },
      time("Still", ledger.still, false),
      time("+ Along", ledger.along, true),
      time("+ Cross", ledger.cross, true),
      time("= Time", ledger.time, false),
      ...(known ? [time("1st order", ledger.firstOrder, true)] : []),
      amount("Still", ledger.stillUse, false),
      amount("+ Penalty", ledger.penaltyUse, true),
      amount("= Use", use, false),
    ],
    0,
  );
  return ["Ledger", ...head, ...rows];
}
