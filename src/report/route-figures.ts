import type { RouteEstimate } from "../estimate/result.ts";
import { inLastPlace, leftInLastPlace, type RoundedColumn, roundedRows } from "./rounding.ts";
import type { TableUnits } from "./table-units.ts";
import { clockSeconds } from "./time-text.ts";

/** A route's printed figures, as whole numbers of their last place, so that every sum on paper comes out. */
export interface RouteFigures {
  readonly distance: RoundedColumn;
  readonly time: RoundedColumn;
  readonly use: RoundedColumn;
  /** Left after each leg. */
  readonly left: readonly (number | null)[];
  readonly usable: number;
  readonly ledger: LedgerFigures;
}

/** Still + along + cross = time under way; still + penalty = use. */
interface LedgerFigures {
  readonly still: RoundedColumn;
  readonly along: RoundedColumn;
  readonly cross: RoundedColumn;
  readonly time: RoundedColumn;
  readonly firstOrder: RoundedColumn;
  readonly stillUse: RoundedColumn;
  readonly penaltyUse: RoundedColumn;
}

function combined(
  columns: readonly RoundedColumn[],
  combine: (figures: readonly number[]) => number,
): RoundedColumn {
  const of = (figures: readonly (number | null)[]) => {
    const known = figures.filter((figure) => figure !== null);
    return known.length === figures.length ? combine(known) : null;
  };
  const rows = (columns[0]?.rows ?? []).map((_, row) =>
    of(columns.map((column) => column.rows[row] ?? null)),
  );
  return { rows, total: of(columns.map((column) => column.total)) };
}

function useFigures(route: RouteEstimate, units: TableUnits): Pick<RouteFigures, "use" | "left" | "usable"> {
  const { size, decimals } = units.store;
  const usable = inLastPlace(route.usable / size, decimals);
  const left = route.legs.map(({ remaining }) =>
    remaining === null ? null : leftInLastPlace(remaining / size, decimals),
  );
  const rows = left.map((now, row) => {
    const before = row === 0 ? usable : (left[row - 1] ?? null);
    return now === null || before === null ? null : before - now;
  });
  const last = left.at(-1) ?? null;
  return { usable, left, use: { rows, total: last === null ? null : usable - last } };
}

function ledgerFigures(route: RouteEstimate, units: TableUnits, use: RoundedColumn): LedgerFigures {
  const clock = clockSeconds(units.ledgerClock);
  const { size, decimals } = units.store;
  const times = (of: (leg: RouteEstimate["legs"][number]) => number | null | undefined) =>
    roundedRows(
      route.legs.map((leg) => {
        const value = of(leg) ?? null;
        return value === null ? null : value / clock;
      }),
      0,
    );
  const calm = times((leg) => leg.still.time_s);
  const time = times((leg) => leg.time_s);
  const along = times((leg) => leg.penalty?.alongTime_s);
  const cross = times((leg) => leg.penalty?.crossTime_s);
  const firstOrder = times((leg) => leg.penalty?.firstOrderTime_s);
  // Still takes up the rounding, being the largest part; where the parts are not known it stands alone.
  const rest = combined(
    [time, along, cross],
    ([whole, first, second]) => (whole ?? 0) - (first ?? 0) - (second ?? 0),
  );
  const rows = calm.rows.map((row, index) => rest.rows[index] ?? row);
  const still = { rows, total: rows.reduce((sum: number, row) => sum + (row ?? 0), 0) };
  const stillUse = roundedRows(
    route.legs.map((leg) => leg.still.use / size),
    decimals,
  );
  const penaltyUse = combined([use, stillUse], ([total, without]) => (total ?? 0) - (without ?? 0));
  return { still, along, cross, time, firstOrder, stillUse, penaltyUse };
}

/** The figures that a route's tables print. */
export function routeFigures(route: RouteEstimate, units: TableUnits): RouteFigures {
  const clock = clockSeconds(units.clock);
  const { use, left, usable } = useFigures(route, units);
  return {
    distance: roundedRows(
      route.legs.map((leg) => leg.distance_m / units.length.size),
      units.length.decimals,
    ),
    time: roundedRows(
      route.legs.map((leg) => (leg.time_s === null ? null : leg.time_s / clock)),
      0,
    ),
    use,
    left,
    usable,
    ledger: ledgerFigures(route, units, use),
  };
}
