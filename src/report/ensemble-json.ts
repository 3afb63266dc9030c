import type { EnsembleFigures, EnsembleLeg, EnsembleResult, MembersInTime } from "../choose/ensemble.ts";
import type { Quantiles } from "../choose/quantiles.ts";

function quantilesJson<Figure>(value: Quantiles<Figure> | null): Quantiles<Figure> | null {
  return value && { min: value.min, p10: value.p10, p50: value.p50, p90: value.p90, max: value.max };
}

function figuresJson(value: EnsembleFigures): EnsembleFigures {
  return {
    count: value.count,
    time_s: quantilesJson(value.time_s),
    arrival: quantilesJson(value.arrival),
    use: quantilesJson(value.use),
    remaining: quantilesJson(value.remaining),
  };
}

const legJson = (value: EnsembleLeg): EnsembleLeg => ({ leg: value.leg, ...figuresJson(value) });

/** Nothing where the pace asks for no arrival. */
function arrivalJson({ arrivalHolds, arrivesEarly, arrivesLate }: EnsembleResult): Partial<MembersInTime> {
  if (arrivalHolds === undefined) return {};
  return { arrivalHolds, arrivesEarly: [...(arrivesEarly ?? [])], arrivesLate: [...(arrivesLate ?? [])] };
}

/** A route under every member, with the keys in the order of the format. */
export function ensembleJson(value: EnsembleResult): EnsembleResult {
  return {
    members: [...value.members],
    reserveHolds: value.reserveHolds,
    breaksReserve: [...value.breaksReserve],
    doesNotArrive: [...value.doesNotArrive],
    ...arrivalJson(value),
    ...figuresJson(value),
    legs: value.legs.map(legJson),
  };
}
