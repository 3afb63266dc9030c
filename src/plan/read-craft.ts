import { STANDARD_AIR_DENSITY } from "../constants.ts";
import { constantPower } from "../craft/constant.ts";
import type { Craft, Limits, PowerModel, Windage } from "../craft/craft.ts";
import { cubePower } from "../craft/cube.ts";
import { rotorPower } from "../craft/rotor.ts";
import { tablePower } from "../craft/table.ts";
import { wingPower } from "../craft/wing.ts";
import { InputError } from "../errors.ts";
import { quoted } from "../found.ts";
import { type Quantity, toUnit } from "../units.ts";
import { type CraftParts, craftSchema } from "./craft-schema.ts";
import { type Fault, firstIssue, placeOf } from "./first-issue.ts";
import { parseJson } from "./json-text.ts";
import { storeFigures } from "./store-figures.ts";

/** Thresholds of the finding `wind-against-current` where a craft names none, m/s: common practice. */
const OPPOSED_WIND = 8;
const OPPOSED_CURRENT = 0.5;

/**
 * Reads a craft file's text.
 *
 * @param file its name, for messages
 * @throws InputError for the first thing wrong with it
 *
 * @example
 * readCraft(
 *   `{ "name": "Boat", "moves": "water", "power": { "model": "constant", "rate": "1 kW" },
 *      "store": { "capacity": "10 kWh" } }`,
 * ).store // → { unit: "J", usable: 36e6 }
 */
export function readCraft(text: string, file = ""): Craft {
  return readCraftDocument(parseJson(text, file), file);
}

/**
 * Reads a craft that is already an object, as a page edits it or a plan holds it.
 *
 * @param document a CraftDocument, or anything that claims to be one
 * @param file name of the file that it stands in, for messages
 * @param prefix path of the craft inside that file, as `["craft"]`
 * @throws InputError for the first thing wrong with it
 */
export function readCraftDocument(document: unknown, file = "", prefix: readonly PropertyKey[] = []): Craft {
  const result = craftSchema.safeParse(document);
  if (!result.success) throw firstIssue(result.error.issues, document, file, prefix);
  return craftOf(result.data, (path, text) => new InputError(text, placeOf(file, [...prefix, ...path])));
}

function craftOf(parts: CraftParts, fault: Fault): Craft {
  checkMedium(parts, fault);
  const power = powerModel(parts, fault);
  const speeds = speedRange(parts, power, fault);
  if (parts.speed !== undefined) checkOrderedSpeed(parts.speed, power, (text) => fault(["speed"], text));
  return {
    name: parts.name,
    moves: parts.moves,
    speed_m_s: parts.speed?.value ?? null,
    power,
    windage: windageOf(parts),
    speeds,
    ...storeFigures(parts, power, fault),
    limits: limitsOf(parts),
  };
}

/** Windage is the wind's work on a craft in water; the formulas of rotor and wing are those of flight, with the weight on the air. */
function checkMedium(parts: CraftParts, fault: Fault): void {
  const { model } = parts.power;
  if (parts.moves === "air" && parts.windage !== undefined)
    throw fault(
      ["windage"],
      'windage belongs to a craft that moves through water; found it beside moves "air"',
    );
  if (parts.moves === "water" && (model === "rotor" || model === "wing"))
    throw fault(["power", "model"], `a ${model} moves through air; found it beside moves "water"`);
}

function powerModel({ power }: CraftParts, fault: Fault): PowerModel {
  switch (power.model) {
    case "table":
      return tableModel(power.rows, fault);
    case "cube":
      return cubePower({
        referenceSpeed_m_s: power.reference.speed.value,
        referencePower_W: power.reference.power.value,
        exponent: power.exponent ?? 3,
      });
    case "rotor":
      return rotorPower({
        bladeProfilePower_W: power.bladeProfilePower.value,
        inducedPower_W: power.inducedPower.value,
        tipSpeed_m_s: power.tipSpeed.value,
        hoverInducedSpeed_m_s: power.hoverInducedSpeed.value,
        fuselageDragRatio: power.fuselageDragRatio,
        solidity: power.solidity,
        discArea_m2: power.discArea.value,
        airDensity_kg_m3: power.airDensity?.value ?? STANDARD_AIR_DENSITY,
        efficiency: power.efficiency?.value ?? 1,
        ...(power.mass === undefined ? {} : { mass_kg: power.mass.value }),
      });
    case "wing":
      return wingPower({
        mass_kg: power.mass.value,
        wingArea_m2: power.wingArea.value,
        zeroLiftDrag: power.zeroLiftDrag,
        inducedFactor: power.inducedFactor,
        efficiency: power.efficiency.value,
        airDensity_kg_m3: power.airDensity?.value ?? STANDARD_AIR_DENSITY,
      });
    case "constant":
      return constantPower(rateUnit(power.rate), power.rate.value);
  }
}

function tableModel(rows: readonly { speed: Quantity; rate: Quantity }[], fault: Fault): PowerModel {
  const first = rows[0];
  if (first === undefined) throw new Error("the schema lets no empty table pass");
  const seen = new Map<number, string>();
  rows.forEach(({ speed, rate }, index) => {
    const path = ["power", "rows", index];
    if (rate.dimension !== first.rate.dimension)
      throw fault(
        [...path, "rate"],
        `the rates of a table are of one kind, ${first.rate.dimension} as in its first row; found ${quoted(rate.text)}`,
      );
    const same = seen.get(speed.value);
    if (same !== undefined)
      throw fault(
        [...path, "speed"],
        `the speeds of a table differ; found ${quoted(speed.text)} after ${quoted(same)} in another row`,
      );
    seen.set(speed.value, speed.text);
  });
  return tablePower(
    rateUnit(first.rate),
    rows.map(({ speed, rate }) => ({ speed_m_s: speed.value, rate: rate.value })),
  );
}

function rateUnit({ dimension }: Quantity): PowerModel["unit"] {
  if (dimension === "fuel rate by mass") return "kg/s";
  return dimension === "fuel rate by volume" ? "L/s" : "W";
}

/** The range for the paces `power` and `least-energy`: as given, else a table's rows, else none. */
function speedRange(parts: CraftParts, power: PowerModel, fault: Fault): Craft["speeds"] {
  if (parts.speeds === undefined) return power.model === "table" ? { min: power.min, max: power.max } : null;
  const { min, max } = parts.speeds;
  if (!(min.value < max.value))
    throw fault(
      ["speeds", "min"],
      `the least speed is below the greatest, ${quoted(max.text)}; found ${quoted(min.text)}`,
    );
  if (min.value > power.max || max.value < power.min)
    throw fault(
      ["speeds"],
      `the range of speeds meets the rows of the table; found ${quoted(min.text)} to ${quoted(max.text)}`,
    );
  return { min: min.value, max: max.value };
}

/**
 * Refuses a speed ordered through the medium where the power model has no value: outside a table's rows.
 *
 * @param fault makes the error of a sentence
 */
export function checkOrderedSpeed(
  speed: Quantity,
  power: PowerModel,
  fault: (text: string) => InputError,
): void {
  if (speed.value >= power.min && speed.value <= power.max) return;
  const shown = (value: number) => Number(toUnit(value, speed.symbol).toPrecision(6));
  throw fault(
    `a speed ordered lies within the rows of the power table, ${shown(power.min)} to ${shown(power.max)} ${speed.symbol}; found ${quoted(speed.text)}`,
  );
}

function windageOf({ windage }: CraftParts): Windage | null {
  if (windage === undefined) return null;
  return {
    frontalArea_m2: windage.frontalArea.value,
    dragCoefficient: windage.dragCoefficient,
    efficiency: windage.efficiency.value,
    airDensity_kg_m3: windage.airDensity?.value ?? STANDARD_AIR_DENSITY,
  };
}

function limitsOf({ limits = {} }: CraftParts): Limits {
  return {
    wind_m_s: limits.wind?.value ?? null,
    gust_m_s: limits.gust?.value ?? null,
    groundSpeed_m_s: limits.groundSpeed?.value ?? null,
    opposedWind_m_s: limits.opposedWind?.value ?? OPPOSED_WIND,
    opposedCurrent_m_s: limits.opposedCurrent?.value ?? OPPOSED_CURRENT,
  };
}
