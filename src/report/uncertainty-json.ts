import type { ErrorSpread } from "../choose/error-spread.ts";
import type { ForecastError } from "../choose/forecast-error.ts";
import type { LegSpread } from "../choose/leg-spreads.ts";
import type { WeakPlace } from "../choose/sensitivity-profile.ts";
import type { WhatIfResult } from "../choose/what-if-results.ts";

/*
 * How sure an estimate is, with the keys in the order of the format.
 */

/** A what-if's result. */
export function whatIfJson(value: WhatIfResult): WhatIfResult {
  const { worst, reached, arrivalMiss_s } = value;
  return {
    name: value.name,
    status: value.status,
    departure: value.departure,
    arrival: value.arrival,
    time_s: value.time_s,
    passage_s: value.passage_s,
    use: value.use,
    remaining: value.remaining,
    reserve: value.reserve,
    reached: reached && { leg: reached.leg, at_m: reached.at_m, time_s: reached.time_s, use: reached.use },
    worst: worst && {
      code: worst.code,
      severity: worst.severity,
      leg: worst.leg,
      at_m: worst.at_m,
      message: worst.message,
    },
    ...(arrivalMiss_s === undefined ? {} : { arrivalMiss_s }),
  };
}

const errorJson = ({ role, speed_m_s, length_m, time_s }: ForecastError): ForecastError => ({
  role,
  speed_m_s,
  length_m,
  time_s,
});

const placeJson = (value: WeakPlace | null): WeakPlace | null =>
  value && { leg: value.leg, at_m: value.at_m, lat: value.lat, lon: value.lon };

const legJson = ({ leg, time_s, arrival_s, use, remaining }: LegSpread): LegSpread => ({
  leg,
  time_s,
  arrival_s,
  use,
  remaining,
});

/** The spread under the stated forecast error. */
export function spreadJson(value: ErrorSpread): ErrorSpread {
  return {
    errors: value.errors.map(errorJson),
    time_s: value.time_s,
    arrival_s: value.arrival_s,
    use: value.use,
    remaining: value.remaining,
    margin: value.margin,
    reserveHolds: value.reserveHolds,
    ...(value.arrivalHolds === undefined ? {} : { arrivalHolds: value.arrivalHolds }),
    ...(value.confidence === undefined ? {} : { confidence: value.confidence }),
    weakest: { time: placeJson(value.weakest.time), use: placeJson(value.weakest.use) },
    legs: value.legs.map(legJson),
  };
}
