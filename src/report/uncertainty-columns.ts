import type { DecidedRoute } from "../choose/decided.ts";
import type { EnsembleLeg } from "../choose/ensemble.ts";
import type { LegSpread } from "../choose/leg-spreads.ts";
import type { Quantiles } from "../choose/quantiles.ts";
import { plainText } from "./plain-text.ts";

type Column = readonly [header: string, cell: (route: DecidedRoute, leg: number) => number | string | null];

/** Columns of the spread under the forecast error, and of every what-if, where a route has them. What is of the route stands on each leg. */
export function uncertaintyColumns(routes: readonly DecidedRoute[], unit: string): Column[] {
  const arrives = routes.some((route) => route.arrive !== undefined);
  const spread = routes.some((route) => route.spread !== undefined) ? spreadColumns(unit, arrives) : [];
  const names = routes[0]?.whatIf?.map(({ name }) => name) ?? [];
  const ensemble = routes.some((route) => route.ensemble !== undefined) ? ensembleColumns(unit, arrives) : [];
  return [
    ...spread,
    ...ensemble,
    ...names.flatMap((name, index) => whatIfColumns(name, index, unit, arrives)),
  ];
}

function spreadColumns(unit: string, arrives: boolean): Column[] {
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
    ...only(arrives, [
      "probability of arriving by the latest time asked for [1]",
      ({ spread }) => spread?.arrivalHolds ?? null,
    ]),
  ];
}

function ensembleColumns(unit: string, arrives: boolean): Column[] {
  const keys = ["min", "p10", "p50", "p90", "max"] as const;
  const ofLeg = <F extends string | number>(
    name: string,
    figure: (leg: EnsembleLeg) => Quantiles<F> | null,
  ): Column[] =>
    keys.map((key) => [
      `ensemble ${key} of ${name}`,
      ({ ensemble }, leg) => {
        const found = ensemble?.legs[leg - 1];
        return found === undefined ? null : (figure(found)?.[key] ?? null);
      },
    ]);
  return [
    ["ensemble members that end the leg [1]", ({ ensemble }, leg) => ensemble?.legs[leg - 1]?.count ?? null],
    ...ofLeg("time under way [s]", ({ time_s }) => time_s),
    ...ofLeg("arrival [UTC]", ({ arrival }) => arrival),
    ...ofLeg(`use [${unit}]`, ({ use }) => use),
    ...ofLeg(`left [${unit}]`, ({ remaining }) => remaining),
    ["ensemble share in which the reserve holds [1]", ({ ensemble }) => ensemble?.reserveHolds ?? null],
    ["ensemble members that break the reserve", ({ ensemble }) => ensemble?.breaksReserve.join(" ") ?? null],
    ["ensemble members that do not arrive", ({ ensemble }) => ensemble?.doesNotArrive.join(" ") ?? null],
    ...only(
      arrives,
      ["ensemble share that arrives as asked for [1]", ({ ensemble }) => ensemble?.arrivalHolds ?? null],
      ["ensemble members that arrive too early", ({ ensemble }) => ensemble?.arrivesEarly?.join(" ") ?? null],
      ["ensemble members that arrive too late", ({ ensemble }) => ensemble?.arrivesLate?.join(" ") ?? null],
    ),
  ];
}

function whatIfColumns(name: string, index: number, unit: string, arrives: boolean): Column[] {
  const head = `what if ${plainText(name)}:`;
  return [
    [`${head} status`, ({ whatIf }) => whatIf?.[index]?.status ?? null],
    [`${head} arrival [UTC]`, ({ whatIf }) => whatIf?.[index]?.arrival ?? null],
    [`${head} route's time under way [s]`, ({ whatIf }) => whatIf?.[index]?.time_s ?? null],
    [`${head} route's use [${unit}]`, ({ whatIf }) => whatIf?.[index]?.use ?? null],
    [`${head} left at the end [${unit}]`, ({ whatIf }) => whatIf?.[index]?.remaining ?? null],
    [`${head} worst finding`, ({ whatIf }) => whatIf?.[index]?.worst?.code ?? null],
    ...only(arrives, [
      `${head} arrival missed by [s]`,
      ({ whatIf }) => whatIf?.[index]?.arrivalMiss_s ?? null,
    ]),
  ];
}

function only(present: boolean, ...columns: readonly Column[]): readonly Column[] {
  return present ? columns : [];
}
