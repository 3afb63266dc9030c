import type { Conditions } from "../estimate/conditions.ts";
import type { PreparedRoute } from "../estimate/prepare.ts";
import type { RouteOutcome } from "../estimate/route-outcome.ts";
import { routeOutcome } from "../estimate/route-outcomes.ts";
import { type SpeedRange, speedRange } from "./speed-range.ts";
import { passageTime } from "./window-cell.ts";

/** Conditions but for the pace, which is looked for. */
export type PacelessConditions = Omit<Conditions, "pace">;

/** A route run at through-speeds, each run kept. */
export class SpeedTrials {
  readonly range: SpeedRange;
  readonly #prepared: PreparedRoute;
  readonly #conditions: PacelessConditions;
  readonly #tried = new Map<number, RouteOutcome>();

  constructor(prepared: PreparedRoute, conditions: PacelessConditions) {
    this.range = speedRange(conditions.craft);
    this.#prepared = prepared;
    this.#conditions = conditions;
  }

  at(speed: number): RouteOutcome {
    const known = this.#tried.get(speed);
    if (known !== undefined) return known;
    const pace = { hold: "through-speed", speed_m_s: speed } as const;
    const outcome = routeOutcome(this.#prepared, { ...this.#conditions, pace });
    this.#tried.set(speed, outcome);
    return outcome;
  }

  /** From departure to arrival, s; `null` where the route stops on the way. */
  readonly passage = (speed: number): number | null => passageTime(this.#prepared, this.at(speed));

  /** Use of the whole route; `null` where it stops on the way. */
  readonly use = (speed: number): number | null => this.at(speed).use;
}
