import type { DecidedRoute } from "../core.ts";
import type { LinearScale } from "../format/linear-scale.ts";
import { storeLevel } from "./ribbon-measures.ts";

/** Standard deviations from the middle to the 10 % and 90 % quantiles of a normal distribution (R: qnorm(0.9)). */
const DEVIATIONS = 1.2816;

/** What is left at a waypoint with 10 % and 90 % probability; the two sources of spread are never mixed. */
export interface LeftBetween {
  /** On the ribbon's axis. */
  readonly at: number;
  readonly low: number;
  readonly high: number;
}

/** At the start and at every leg's end, under the stated forecast error. */
export function spreadBetween(route: DecidedRoute, ends: readonly number[]): LeftBetween[] {
  const { spread } = route;
  if (!spread) return [];
  return withStart(
    route,
    ends,
    spread.legs.map(({ remaining }, leg) => {
      const left = route.legs[leg]?.remaining ?? null;
      const half = DEVIATIONS * remaining;
      return left === null ? null : [left - half, left + half];
    }),
  );
}

/** The same among an ensemble's members. */
export function ensembleBetween(route: DecidedRoute, ends: readonly number[]): LeftBetween[] {
  const { ensemble } = route;
  if (ensemble === undefined) return [];
  return withStart(
    route,
    ends,
    ensemble.legs.map(({ remaining }) => (remaining === null ? null : [remaining.p10, remaining.p90])),
  );
}

function withStart(
  { usable }: DecidedRoute,
  ends: readonly number[],
  legs: readonly (readonly [number, number] | null)[],
): LeftBetween[] {
  const found: LeftBetween[] = [{ at: ends[0] ?? 0, low: usable, high: usable }];
  for (const [leg, between] of legs.entries()) {
    const at = ends[leg + 1];
    if (between === null || at === undefined) break;
    found.push({ at, low: between[0], high: between[1] });
  }
  return found;
}

interface SpreadBandProps {
  readonly between: readonly LeftBetween[];
  readonly usable: number;
  readonly scale: LinearScale;
  readonly kind: "error" | "ensemble";
}

/** A band around the store line, straight between waypoints. */
export function SpreadBand({ between, usable, scale, kind }: SpreadBandProps) {
  if (between.length < 2) return null;
  const point = (at: number, amount: number): string =>
    `${scale(at).toFixed(2)} ${storeLevel(amount, usable).toFixed(2)}`;
  const upper = between.map(({ at, high }) => point(at, high));
  const lower = [...between].reverse().map(({ at, low }) => point(at, low));
  return <path class={`spread-band ${kind}`} d={`M${[...upper, ...lower].join("L")}Z`} />;
}
