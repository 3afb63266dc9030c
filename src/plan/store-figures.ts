import type { Craft, PowerModel, StoreUnit } from "../craft/craft.ts";
import { quoted } from "../found.ts";
import type { Quantity } from "../units.ts";
import type { CraftParts } from "./craft-schema.ts";
import type { Fault } from "./first-issue.ts";

const STORE_UNIT: Readonly<Record<string, StoreUnit>> = { energy: "J", mass: "kg", volume: "L" };

/** Unit of a store → the kind of store, as messages call it. */
const KIND: Readonly<Record<StoreUnit, string>> = {
  J: "energy",
  kg: "a mass of fuel",
  L: "a volume of fuel",
};

const LITRES_PER_CUBIC_METRE = 1000;

type StoreFigures = Pick<Craft, "store" | "storePerRate" | "storePerJoule" | "hotelPerSecond">;

/**
 * What connects the craft's rates with its store. Fuel for energy needs the specific consumption; mass for volume, or the
 * other way round, the density.
 *
 * Errors: a rate of fuel with a store of energy, a needed specific consumption or density missing, either of them beside a
 * store of energy.
 */
export function storeFigures(parts: CraftParts, power: PowerModel, fault: Fault): StoreFigures {
  const unit = STORE_UNIT[parts.store.capacity.dimension];
  if (unit === undefined) throw new Error(`a capacity is no ${parts.store.capacity.dimension}`);
  const exchange = new StoreExchange(parts, unit, fault);
  exchange.refuseFuelKeys();
  const storePerRate = exchange.perUnit(power.unit, ["power"], "the power model");
  const { hotel, windage } = parts;
  const hotelPerSecond =
    hotel === undefined ? 0 : hotel.value * exchange.perUnit(unitOf(hotel), ["hotel"], "the hotel load");
  if (windage !== undefined) exchange.perUnit("W", ["windage"], "windage");
  return {
    store: { unit, usable: parts.store.capacity.value * (parts.store.usable?.value ?? 1) },
    storePerRate,
    storePerJoule: exchange.perJoule(),
    hotelPerSecond,
  };
}

function unitOf({ dimension }: Quantity): PowerModel["unit"] {
  if (dimension === "fuel rate by mass") return "kg/s";
  return dimension === "fuel rate by volume" ? "L/s" : "W";
}

class StoreExchange {
  readonly #parts: CraftParts;
  readonly #unit: StoreUnit;
  readonly #fault: Fault;

  constructor(parts: CraftParts, unit: StoreUnit, fault: Fault) {
    this.#parts = parts;
    this.#unit = unit;
    this.#fault = fault;
  }

  /** Store units for one unit of a rate's amount (J, kg or L). */
  perUnit(rate: PowerModel["unit"], path: readonly string[], what: string): number {
    if (rate === "W") return this.#unit === "J" ? 1 : this.#consumption(what) * this.#perMass(what);
    if (this.#unit === "J")
      throw this.#fault(
        path,
        `${what} spends what the store holds; found a rate of fuel beside a store of energy, ${quoted(this.#parts.store.capacity.text)}`,
      );
    if (rate === "kg/s") return this.#perMass(what);
    return this.#unit === "L" ? 1 : this.#density(what) / LITRES_PER_CUBIC_METRE;
  }

  /** Store units per joule at the shaft; `null` where a craft that burns fuel does not say. */
  perJoule(): number | null {
    const { specificConsumption, density } = this.#parts.store;
    if (this.#unit === "J") return 1;
    if (specificConsumption === undefined || (this.#unit === "L" && density === undefined)) return null;
    return this.perUnit("W", [], "the shaft");
  }

  /** A store of energy has neither: to pass over one in silence would hide a mistaken capacity. */
  refuseFuelKeys(): void {
    if (this.#unit !== "J") return;
    const { specificConsumption, density, capacity } = this.#parts.store;
    const place = specificConsumption === undefined ? "density" : "specificConsumption";
    const found = specificConsumption ?? density;
    if (found === undefined) return;
    throw this.#fault(
      ["store", place],
      `${place} belongs to a store of fuel; found ${quoted(found.text)} beside the capacity ${quoted(capacity.text)}`,
    );
  }

  #perMass(what: string): number {
    return this.#unit === "kg" ? 1 : LITRES_PER_CUBIC_METRE / this.#density(what);
  }

  /** kg per joule. */
  #consumption(what: string): number {
    const given = this.#parts.store.specificConsumption;
    if (given !== undefined) return given.value;
    throw this.#missing("specificConsumption", what, '"210 g/kWh"');
  }

  /** kg/m³. */
  #density(what: string): number {
    const given = this.#parts.store.density;
    if (given !== undefined) return given.value;
    throw this.#missing("density", what, '"0.85 kg/L"');
  }

  #missing(key: string, what: string, example: string) {
    const store = `${KIND[this.#unit]}, ${quoted(this.#parts.store.capacity.text)}`;
    return this.#fault(
      ["store", key],
      `${what} needs a ${key}, as ${example}, beside a store that is ${store}; found nothing`,
    );
  }
}
