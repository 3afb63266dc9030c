import type { DecidedRoute } from "../choose/decided.ts";
import type { LegSpread } from "../choose/error-spread.ts";
import { plainText } from "./plain-text.ts";

type Column = readonly [header: string, cell: (route: DecidedRoute, leg: number) => number | string | null];

/** Columns of the spread under the forecast error, and of every what-if, where a route has them. What is of the route stands on each leg. */
export function uncertaintyColumns(routes: readonly DecidedRoute[], unit: string): Column[] {
  const spread = routes.some((route) => route.spread !== undefined) ? spreadColumns(unit) : [];
  const names = routes[0]?.whatIf?.map(({ name }) => name) ?? [];
  return [...spread, ...names.flatMap((name, index) => whatIfColumns(name, index, unit))];
}

function spreadColumns(unit: string): Column[] {
  const ofLeg =
    (figure: (spread: LegSpread) => number) =>
    ({ spread }: DecidedRoute, leg: number) => {
      const found = spread?.legs[leg - 1];
      return found === undefined ? null : figure(found);
    };
  return [
    ["standard deviation of time under way [s]", ofLeg(({ time_s }) => time_s)],
    ["standard deviation of arrival [s]", ofLeg(({ arrival_s }) => arrival_s)],
    [`standard deviation of use [${unit}]`, ofLeg(({ use }) => use)],
    [`standard deviation of left [${unit}]`, ofLeg(({ remaining }) => remaining)],
    ["probability that the reserve holds [1]", ({ spread }) => spread?.reserveHolds ?? null],
  ];
}

function whatIfColumns(name: string, index: number, unit: string): Column[] {
  const head = `what if ${plainText(name)}:`;
  return [
    [`${head} status`, ({ whatIf }) => whatIf?.[index]?.status ?? null],
    [`${head} arrival [UTC]`, ({ whatIf }) => whatIf?.[index]?.arrival ?? null],
    [`${head} route's time under way [s]`, ({ whatIf }) => whatIf?.[index]?.time_s ?? null],
    [`${head} route's use [${unit}]`, ({ whatIf }) => whatIf?.[index]?.use ?? null],
    [`${head} left at the end [${unit}]`, ({ whatIf }) => whatIf?.[index]?.remaining ?? null],
    [`${head} worst finding`, ({ whatIf }) => whatIf?.[index]?.worst?.code ?? null],
  ];
}
