import type { FieldAlong, LegEstimate, Totals } from "./result.ts";

/**
 * Sums of a route's legs: integrals add, means are over the whole distance. What depends on time is `null` unless the route is complete.
 *
 * @param timeBound bound on the error of the arrival's time, s
 * @param remaining in the store at the end
 */
export function routeTotals(
  legs: readonly LegEstimate[],
  complete: boolean,
  timeBound: number,
  remaining: number,
): Totals {
  const distance = total(legs, (leg) => leg.distance_m);
  const time = nullableTotal(legs, (leg) => leg.time_s);
  return {
    distance_m: distance,
    time_s: time,
    stay_s: total(legs, (leg) => leg.stay_s),
    throughDistance_m: nullableTotal(legs, (leg) => leg.throughDistance_m),
    wind: complete ? alongRoute(legs, distance, (leg) => leg.wind) : null,
    current: complete ? alongRoute(legs, distance, (leg) => leg.current) : null,
    use: nullableTotal(legs, (leg) => leg.use),
    remaining: complete ? remaining : null,
    still: { time_s: total(legs, (leg) => leg.still.time_s), use: total(legs, (leg) => leg.still.use) },
    penalty: complete
      ? {
          time_s: total(legs, (leg) => leg.penalty?.time_s ?? 0),
          use: total(legs, (leg) => leg.penalty?.use ?? 0),
          alongTime_s: nullableTotal(legs, (leg) => leg.penalty?.alongTime_s ?? null),
          crossTime_s: nullableTotal(legs, (leg) => leg.penalty?.crossTime_s ?? null),
          firstOrderTime_s: nullableTotal(legs, (leg) => leg.penalty?.firstOrderTime_s ?? null),
        }
      : null,
    error: complete ? { time_s: timeBound, use: total(legs, (leg) => leg.error?.use ?? 0) } : null,
  };
}

function total(legs: readonly LegEstimate[], value: (leg: LegEstimate) => number): number {
  return legs.reduce((sum, leg) => sum + value(leg), 0);
}

function nullableTotal(
  legs: readonly LegEstimate[],
  value: (leg: LegEstimate) => number | null,
): number | null {
  return legs.reduce<number | null>((sum, leg) => {
    const part = value(leg);
    return sum === null || part === null ? null : sum + part;
  }, 0);
}

function alongRoute(
  legs: readonly LegEstimate[],
  distance: number,
  of: (leg: LegEstimate) => FieldAlong | null,
): FieldAlong | null {
  const parts = legs.map((leg) => ({ along: of(leg), length: leg.distance_m }));
  if (parts.some(({ along }) => along === null)) return null;
  const sum = (value: (along: FieldAlong, length: number) => number) =>
    parts.reduce((so, { along, length }) => so + (along === null ? 0 : value(along, length)), 0);
  const integral = sum((along) => along.alongTrackIntegral_m2_s);
  return {
    alongTrackIntegral_m2_s: integral,
    meanAlongTrack_m_s: integral / distance,
    meanCrossTrack_m_s: sum((along, length) => along.meanCrossTrack_m_s * length) / distance,
    maxSpeed_m_s: parts.reduce((most, { along }) => Math.max(most, along?.maxSpeed_m_s ?? 0), 0),
    covered: Math.min(1, sum((along, length) => along.covered * length) / distance),
  };
}
