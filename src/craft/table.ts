import { InputError } from "../errors.ts";
import { requireNotNegative } from "./bounds.ts";
import type { PowerModel } from "./craft.ts";
import { Pchip } from "./pchip.ts";

/** A measured point of the speed-power curve: speed through the medium in m/s, rate in the table's unit. */
export interface TableRow {
  readonly speed_m_s: number;
  readonly rate: number;
}

/**
 * Power model through measured rows: monotone piecewise cubic between them (see `pchip.ts`), no value outside them.
 *
 * @param unit unit of the rates: power in W, or fuel in kg/s or L/s
 * @param rows at least two, in any order, of different speeds; speeds and rates not below 0
 * @throws InputError where a row breaks these rules
 * @see Fritsch & Carlson, SIAM J. Numer. Anal. 17 (1980) 238-246
 * @example
 * tablePower("W", [{ speed_m_s: 0, rate: 100 }, { speed_m_s: 4, rate: 500 }]).perSecond(1) // → 200
 */
export function tablePower(unit: PowerModel["unit"], rows: readonly TableRow[]): PowerModel {
  if (rows.length < 2)
    throw new InputError(`a speed-power table has at least two rows; found ${rows.length}`);
  for (const row of rows) {
    requireNotNegative(row.speed_m_s, "a table's speed", "m/s");
    requireNotNegative(row.rate, `a table's rate at ${row.speed_m_s} m/s`, unit);
  }
  const sorted = [...rows].sort((a, b) => a.speed_m_s - b.speed_m_s);
  const speeds = sorted.map((row) => row.speed_m_s);
  speeds.forEach((speed, k) => {
    if (k > 0 && speed === speeds[k - 1])
      throw new InputError(`a speed-power table's speeds differ; found ${speed} m/s twice`);
  });
  const curve = new Pchip(
    speeds,
    sorted.map((row) => row.rate),
  );
  return {
    model: "table",
    unit,
    min: speeds[0] as number,
    max: speeds[speeds.length - 1] as number,
    perSecond: (speed) => curve.value(speed),
    slope: (speed) => curve.derivative(speed),
    kinks: speeds.slice(1, -1),
    climbForce: 0,
  };
}
