import type { Conditions } from "../estimate/conditions.ts";
import type { PreparedRoute } from "../estimate/prepare.ts";
import type { ArrivalTestsAt } from "./arrival-tests.ts";
import type { ArrivalWindow } from "./arrival-window.ts";

/** What a window of departures is worked out for: the routes, prepared once, and what the plan says. */
export interface Sweep {
  readonly prepared: readonly PreparedRoute[];
  readonly conditions: Conditions;
  /** The arrival that the plan's pace asks for; `null` where its pace says how fast. */
  readonly arrive: ArrivalWindow | null;
  /** Puts the speeds found for it to the test; `null` where the plan names nothing that decides, or asks for one moment or none. */
  readonly testsAt: ArrivalTestsAt | null;
}

/** The prepared route of a name. @throws Error where the sweep has none */
export function routeOf({ prepared }: Pick<Sweep, "prepared">, name: string): PreparedRoute {
  const found = prepared.find(({ route }) => route.name === name);
  if (found === undefined) throw new Error(`no route ${name} in the sweep`);
  return found;
}
