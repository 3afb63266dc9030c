/** The medium that a craft moves through. */
export type Medium = "water" | "air";

/** Kind of a store, with the unit of every figure of it: energy in J, mass in kg, volume in L. */
export type StoreUnit = "J" | "kg" | "L";

/**
 * What the craft spends as a function of speed through the medium: a pure function of V with its own domain.
 * `perSecond` is W where `unit` is "W", else kg/s or L/s.
 */
export interface PowerModel {
  readonly model: "table" | "cube" | "rotor" | "wing" | "constant";
  readonly unit: "W" | "kg/s" | "L/s";
  /** Domain of V, m/s; outside it `perSecond` must not be called. `max` may be Infinity. */
  readonly min: number;
  readonly max: number;
  /** Rate at through-medium speed V (m/s). */
  perSecond(speed: number): number;
  /** Derivative of `perSecond` with respect to speed at V (m/s), in the rate's unit per m/s. */
  slope(speed: number): number;
  /** Speeds inside the domain where a derivative of the curve jumps (rows of a table), m/s ascending. */
  readonly kinks: readonly number[];
  /** Power per metre per second of climb, W/(m/s): m g₀ / η; 0 where the model has no climb. */
  readonly climbForce: number;
}

/** Added resistance of the wind on a craft in water: areas and coefficients of `methods.md`'s windage formula. */
export interface Windage {
  readonly frontalArea_m2: number;
  readonly dragCoefficient: number;
  /** Propulsive efficiency, 0..1. */
  readonly efficiency: number;
  readonly airDensity_kg_m3: number;
}

export interface Limits {
  readonly wind_m_s: number | null;
  readonly gust_m_s: number | null;
  readonly groundSpeed_m_s: number | null;
  /** Thresholds of the finding `wind-against-current`, m/s. */
  readonly opposedWind_m_s: number;
  readonly opposedCurrent_m_s: number;
}

export interface Store {
  readonly unit: StoreUnit;
  /** Usable amount, in `unit`. */
  readonly usable: number;
}

/** A craft, checked, in SI units. */
export interface Craft {
  readonly name: string;
  readonly moves: Medium;
  /** Ordered speed through the medium where the pace names none, m/s; `null` where the craft file has none. */
  readonly speed_m_s: number | null;
  readonly power: PowerModel;
  readonly windage: Windage | null;
  /** Range of through-medium speeds to choose from, by the paces `power` and `least-energy` and for an arrival, m/s. `null` where neither given nor implied. */
  readonly speeds: { readonly min: number; readonly max: number } | null;
  /** Hotel load, in store units per second. */
  readonly hotelPerSecond: number;
  /** Store units per second, for one unit of the power model's own rate (1 for J from W; kg/J for fuel from power). */
  readonly storePerRate: number;
  /** Store units per joule of shaft power, for windage and climb; `null` where a fuel-rate model names no specific consumption. */
  readonly storePerJoule: number | null;
  readonly store: Store;
  readonly limits: Limits;
}

/** The rule by which a craft chooses its speed. Speeds in m/s, power in W. */
export type Pace =
  | { readonly hold: "through-speed"; readonly speed_m_s: number }
  | { readonly hold: "ground-speed"; readonly speed_m_s: number }
  | { readonly hold: "power"; readonly power_W: number }
  | { readonly hold: "least-energy" };

/** The part of the store that must not be used: a share of usable, an amount in store units, or a time at the final leg's rate. */
export type Reserve =
  | { readonly kind: "share"; readonly share: number }
  | { readonly kind: "amount"; readonly amount: number }
  | { readonly kind: "time"; readonly time_s: number };
