import type { Estimate, RouteEstimate } from "../estimate/result.ts";
import type { TurnBack } from "./turn-back-result.ts";

/** A route's estimate with what is decided on top of it, where that was asked for. */
export interface DecidedRoute extends RouteEstimate {
  readonly turnBack?: TurnBack;
}

/** An estimate whose routes carry what is decided on top of them. */
export interface DecidedEstimate extends Estimate {
  readonly routes: readonly DecidedRoute[];
}
