import { constantPower } from "../../src/craft/constant.ts";
import type { Craft, Pace } from "../../src/craft/craft.ts";
import type { RouteRun } from "../../src/estimate/estimate-route.ts";
import { estimateRoute } from "../../src/estimate/estimate-route.ts";
import { fieldsInUse, prepareRoute } from "../../src/estimate/prepare.ts";
import type { Route, Waypoint } from "../../src/estimate/route.ts";
import type { Field, FieldRole, Tile } from "../../src/field/field.ts";

/** 2027-05-04T06:00Z. */
export const DEPARTURE = Date.UTC(2027, 4, 4, 6);
export const HOUR = 3600_000;

/** Values at a node: eastward and northward, m/s. */
export type Flow = (lon: number, lat: number, hours: number, height: number) => readonly [number, number];

export interface GridShape {
  readonly lon: readonly number[];
  readonly lat: readonly number[];
  /** Hours after the departure; steady where left out. */
  readonly hours?: readonly number[];
  readonly height?: readonly number[];
}

/** Evenly spaced values, both ends among them. */
export function spaced(from: number, to: number, steps: number): number[] {
  return Array.from({ length: steps + 1 }, (_, n) => from + ((to - from) * n) / steps);
}

/** A field of one tile with the values of a function at its nodes. */
export function gridField(
  role: FieldRole,
  shape: GridShape,
  flow: Flow,
  options: Partial<Tile & Pick<Field, "outside">> = {},
): Field {
  const { outside = "stop", ...rest } = options;
  const hours = shape.hours ?? [0];
  const levels = shape.height ?? [0];
  const slices = hours.map((hour) => {
    const values: number[] = [];
    for (const height of levels)
      for (const lat of shape.lat) for (const lon of shape.lon) values.push(...flow(lon, lat, hour, height));
    return Float64Array.from(values);
  });
  const tile: Tile = {
    files: [`${role}.csv`],
    lon: Float64Array.from(shape.lon),
    lat: Float64Array.from(shape.lat),
    height: shape.height === undefined ? null : Float64Array.from(shape.height),
    times:
      shape.hours === undefined ? null : Float64Array.from(shape.hours, (hour) => DEPARTURE + hour * HOUR),
    slices,
    gusts: null,
    masks: slices.map(() => null),
    global: false,
    beyond: "stop",
    ...rest,
  };
  return { role, tiles: [tile], outside };
}

export function waypoint(name: string, lat: number, lon: number, more: Partial<Waypoint> = {}): Waypoint {
  return { name, lat, lon, path: "geodesic", speed_m_s: null, height_m: null, stay_s: 0, ...more };
}

export function routeOf(...waypoints: Waypoint[]): Route {
  return { name: "Route", waypoints };
}

/** A craft in the air with 1 kW at every speed and a very large store, changed as asked. */
export function craftOf(more: Partial<Craft> = {}): Craft {
  return {
    name: "Craft",
    moves: "air",
    speed_m_s: null,
    power: constantPower("W", 1000),
    windage: null,
    speeds: null,
    hotelPerSecond: 0,
    storePerRate: 1,
    storePerJoule: 1,
    store: { unit: "J", usable: 1e12 },
    limits: {
      wind_m_s: null,
      gust_m_s: null,
      groundSpeed_m_s: null,
      opposedWind_m_s: 8,
      opposedCurrent_m_s: 0.5,
    },
    ...more,
  };
}

export interface Asked {
  readonly craft?: Craft;
  readonly pace?: Pace;
  readonly fields?: readonly Field[];
  readonly reserve?: Parameters<typeof estimateRoute>[1]["reserve"];
  readonly departure?: number;
}

/** Prepares and estimates a route at 10 m/s through the medium unless asked otherwise. */
export function estimateOf(route: Route, asked: Asked = {}): RouteRun {
  const {
    craft = craftOf(),
    pace = { hold: "through-speed", speed_m_s: 10 },
    fields = [],
    reserve = null,
    departure = DEPARTURE,
  } = asked;
  const used = fieldsInUse(craft, fields);
  return estimateRoute(prepareRoute(route, used), { departure, craft, pace, reserve, fields: used });
}
