import type { Estimate, RouteEstimate } from "../estimate/result.ts";
import type { EnsembleResult } from "./ensemble.ts";
import type { ErrorSpread } from "./error-spread.ts";
import type { TurnBack } from "./turn-back-result.ts";
import type { WhatIfResult } from "./what-if-results.ts";

/** A route's estimate with what is decided on top of it, where that was asked for. */
export interface DecidedRoute extends RouteEstimate {
  /** Under the stated forecast error; `null` where the route stops on the way or no error acts on it. */
  readonly spread?: ErrorSpread | null;
  /** Under every member of an ensemble. */
  readonly ensemble?: EnsembleResult;
  /** In the order of the plan's what-ifs. */
  readonly whatIf?: readonly WhatIfResult[];
  readonly turnBack?: TurnBack;
}

/** An estimate whose routes carry what is decided on top of them. */
export interface DecidedEstimate extends Estimate {
  readonly routes: readonly DecidedRoute[];
}
