import { InputError } from "../errors.ts";
import type { Conditions } from "../estimate/conditions.ts";
import { routeFinding } from "../estimate/findings.ts";
import { fieldsInUse, type PreparedRoute } from "../estimate/prepare.ts";
import { routeOutcome } from "../estimate/route-outcomes.ts";
import { preparedForMember } from "./ensemble.ts";
import type { DecidedBy } from "./sure.ts";
import type { Sweep } from "./sweep.ts";
import type { UncertaintyAsked } from "./uncertain-estimate.ts";
import { underWhatIf, whatIfFields } from "./what-if-conditions.ts";
import type { Variant } from "./what-if-results.ts";
import { cellFinding, cellOf } from "./window-cell.ts";

/** What a sweep's trials start from. */
type Ground = Pick<Sweep, "prepared" | "conditions">;

/** A member or a what-if, for the departures of one sweep. */
export interface Trial {
  readonly label: string;
  readonly by: DecidedBy;
  /** A route of the sweep, by its place, and its conditions under this trial. */
  under(
    route: number,
    base: Conditions,
  ): { readonly prepared: PreparedRoute; readonly conditions: Conditions };
}

/** What a cell comes to in one trial. */
export interface Tried extends Variant {
  readonly by: DecidedBy;
  /** ms since 1970; `null` where it does not arrive. */
  readonly arrival: number | null;
  readonly reserve: number | null;
}

/**
 * The members and what-ifs that a plan names, in this order. What a trial needs is made when it is first tried: a changed field of a
 * what-if is then kept, cut to the nodes that the routes span.
 */
export function trialsOf(sweep: Ground, asked: UncertaintyAsked): Trial[] {
  return [...memberTrials(sweep, asked), ...whatIfTrials(sweep, asked)];
}

function memberTrials({ prepared, conditions }: Ground, { members }: UncertaintyAsked): Trial[] {
  return members.map(({ member, fields: all }) => {
    const fields = fieldsInUse(conditions.craft, all);
    const own = prepared.map((): PreparedRoute | null => null);
    return {
      label: `member ${member}`,
      by: { member, whatIf: null },
      under(route, base) {
        const way =
          own[route] ?? preparedForMember(prepared[route] as PreparedRoute, conditions.fields, fields);
        own[route] = way;
        return { prepared: way, conditions: { ...base, fields } };
      },
    };
  });
}

function whatIfTrials({ prepared, conditions }: Ground, { whatIfs }: UncertaintyAsked): Trial[] {
  return whatIfs.map((whatIf) => {
    let changed: ReturnType<typeof whatIfFields> | null = null;
    return {
      label: `what if ${whatIf.name}`,
      by: { member: null, whatIf: whatIf.name },
      under(route, base) {
        changed ??= whatIfFields(whatIf, conditions.fields, prepared);
        return underWhatIf(whatIf, changed.prepared[route] as PreparedRoute, base, changed.fields);
      },
    };
  });
}

/**
 * A cell's route and conditions in one trial.
 *
 * @throws InputError for a what-if that the plan's own pace does not allow
 */
export function tryOne({ label, by, under }: Trial, route: number, base: Conditions, sweep: Ground): Tried {
  try {
    const { prepared, conditions } = under(route, base);
    const outcome = routeOutcome(prepared, conditions);
    const { status, remaining, reserve, worst } = cellOf(prepared, conditions.departure, null, outcome);
    return { label, by, status, remaining, reserve, worst, arrival: outcome.arrival };
  } catch (fault) {
    // At the plan's own pace the plan itself is at fault; one of several speeds may simply lie too near the craft's limit.
    if (!(fault instanceof InputError) || base.pace === sweep.conditions.pace) throw fault;
    const worst = cellFinding(routeFinding("outside-power-table", fault.message));
    return { label, by, status: "stop", remaining: null, reserve: null, worst, arrival: null };
  }
}
