import type { Craft, Pace, Reserve } from "../../src/craft/craft.ts";
import type { Conditions } from "../../src/estimate/conditions.ts";
import { estimateRoute } from "../../src/estimate/estimate-route.ts";
import { fieldsInUse, type PreparedRoute, prepareRoute } from "../../src/estimate/prepare.ts";
import type { Route } from "../../src/estimate/route.ts";
import type { Field } from "../../src/field/field.ts";
import { craftOf, DEPARTURE } from "../estimate/fixtures.ts";

export interface Case {
  readonly prepared: PreparedRoute;
  readonly conditions: Conditions;
}

/** A route and its conditions, at 10 m/s through the medium unless asked otherwise. */
export function caseOf(
  route: Route,
  fields: readonly Field[],
  more: { readonly craft?: Craft; readonly pace?: Pace; readonly reserve?: Reserve } = {},
): Case {
  const { craft = craftOf(), pace = { hold: "through-speed", speed_m_s: 10 }, reserve = null } = more;
  const used = fieldsInUse(craft, fields);
  return {
    prepared: prepareRoute(route, used),
    conditions: { departure: DEPARTURE, craft, pace, reserve, fields: used },
  };
}

export function runOf({ prepared, conditions }: Case) {
  return estimateRoute(prepared, conditions);
}

/** A field with `size` times another's values added, on the same axes. */
export function plusField(field: Field, added: Field, size: number): Field {
  const tiles = field.tiles.map((tile, t) => ({
    ...tile,
    slices: tile.slices.map((slice, n) =>
      slice.map((value, i) => value + size * (added.tiles[t]?.slices[n]?.[i] as number)),
    ),
  }));
  return { ...field, tiles };
}
