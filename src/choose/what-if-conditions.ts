import type { Craft, Pace } from "../craft/craft.ts";
import { InputError } from "../errors.ts";
import type { Conditions } from "../estimate/conditions.ts";
import { speedText } from "../estimate/finding-text.ts";
import type { PreparedRoute } from "../estimate/prepare.ts";
import type { Field } from "../field/field.ts";
import { changeField } from "./changed-field.ts";
import type { WhatIf } from "./what-if.ts";

/** A what-if's fields, and the routes prepared for them: see {@link changeField}. */
export function whatIfFields(
  whatIf: WhatIf,
  fields: readonly Field[],
  prepared: readonly PreparedRoute[],
): { readonly fields: readonly Field[]; readonly prepared: readonly PreparedRoute[] } {
  const changed: Field[] = [];
  let routes = prepared;
  for (const [index, field] of fields.entries()) {
    const change =
      field.role === "wind"
        ? { factor: whatIf.wind, veer_deg: whatIf.veer_deg }
        : { factor: whatIf.current, veer_deg: 0 };
    const made = changeField(field, index, change, routes);
    changed.push(made.field);
    routes = made.prepared;
  }
  return { fields: changed, prepared: routes };
}

/**
 * A route and its conditions under a what-if.
 *
 * @param prepared and `fields` of {@link whatIfFields}
 * @throws InputError where a speed is changed that the pace does not hold, or one leaves the craft's power model
 */
export function underWhatIf(
  whatIf: WhatIf,
  prepared: PreparedRoute,
  conditions: Conditions,
  fields: readonly Field[],
): { readonly prepared: PreparedRoute; readonly conditions: Conditions } {
  const { departure, craft, pace } = conditions;
  return {
    prepared: whatIf.speed_m_s === 0 ? prepared : fasterLegs(prepared, whatIf, pace, craft),
    conditions: {
      ...conditions,
      departure: departure + 1000 * whatIf.late_s,
      craft: whatIf.consumption === 0 ? craft : spendingMore(craft, 1 + whatIf.consumption),
      pace: whatIf.speed_m_s === 0 ? pace : fasterPace(pace, whatIf, craft),
      fields,
    },
  };
}

/** Everything that a craft spends, times a factor: the model, windage and climb, and the hotel load. */
function spendingMore(craft: Craft, factor: number): Craft {
  return {
    ...craft,
    hotelPerSecond: craft.hotelPerSecond * factor,
    storePerRate: craft.storePerRate * factor,
    storePerJoule: craft.storePerJoule === null ? null : craft.storePerJoule * factor,
  };
}

function fasterPace(pace: Pace, whatIf: WhatIf, craft: Craft): Pace {
  if (pace.hold !== "through-speed" && pace.hold !== "ground-speed")
    throw new InputError(
      `the what-if "${whatIf.name}" changes a speed, which needs a pace that holds the through-speed or the ground-speed; found the pace "${pace.hold}"`,
    );
  return { ...pace, speed_m_s: checkedSpeed(pace.speed_m_s, whatIf, pace, craft) };
}

/** A leg that names its own speed keeps its difference from the others. */
function fasterLegs(prepared: PreparedRoute, whatIf: WhatIf, pace: Pace, craft: Craft): PreparedRoute {
  const legs = prepared.legs.map((leg) => {
    const { speed_m_s } = leg.to;
    if (speed_m_s === null) return leg;
    return { ...leg, to: { ...leg.to, speed_m_s: checkedSpeed(speed_m_s, whatIf, pace, craft) } };
  });
  return { ...prepared, legs };
}

function checkedSpeed(ordered: number, whatIf: WhatIf, { hold }: Pace, { power, name }: Craft): number {
  const speed = ordered + whatIf.speed_m_s;
  const isWithin = hold === "ground-speed" || (speed >= power.min && speed <= power.max);
  if (speed > 0 && isWithin) return speed;
  const range = `above 0${hold === "ground-speed" ? "" : ` and within the power model of ${name}`}`;
  throw new InputError(`the what-if "${whatIf.name}" keeps the speed ${range}; found ${speedText(speed)}`);
}
