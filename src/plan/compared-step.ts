import type { EstimateInput } from "../estimate/estimate.ts";
import type { Plan } from "./plan.ts";

/**
 * Step of the departures that a plan compares side by side: that of its window. Where it asks for an arrival there is none, since each
 * departure then goes alone at speeds of its own.
 */
export function comparedStep({ window, arrive }: Plan): Pick<EstimateInput, "every_s"> {
  return window === undefined || arrive !== undefined ? {} : { every_s: window.every_s };
}
