import { InputError, type Place } from "./errors.ts";
import { foundText } from "./found.ts";
import { type Dimension, SPELLINGS, UNITS, type Unit } from "./unit-table.ts";

export { type Dimension, INNER_UNITS } from "./unit-table.ts";

const NUMBER = /^[+-]?(?:\d+(?:\.\d+)?|\.\d+)(?:[eE][+-]?\d+)?/;

/**
 * Symbols that a dimension takes, in the order in which messages name them.
 *
 * @example
 * symbolsOf("speed") // → ["m/s", "km/h", "kn", "ft/min"]
 */
export function symbolsOf(dimension: Dimension): readonly string[] {
  return UNITS.filter((each) => each.dimension === dimension).map((each) => each.symbol);
}

/** A quantity read from text: its value in the dimension's inner unit, with the text and symbol that it came from. */
export interface Quantity {
  /** In the inner unit of `dimension`, see {@link INNER_UNITS}. Finite. */
  readonly value: number;
  readonly dimension: Dimension;
  readonly symbol: string;
  readonly text: string;
}

/**
 * Reads a number with its unit, of one of several dimensions.
 *
 * @param text as `"12 kn"`: a decimal number with a point, then one of the units' symbols; blanks between are optional
 * @param dimensions those accepted, in the order in which a message names them
 * @param name what the quantity is called in a message
 * @throws InputError that names the quantity, the units accepted and what was found
 * @example
 * readQuantity("6 t/d", ["power", "fuel rate by mass"]).dimension // → "fuel rate by mass"
 */
export function readQuantity(
  text: unknown,
  dimensions: readonly Dimension[],
  name: string = dimensions.join(" or "),
  place: Place = {},
): Quantity {
  const fault = (reason = "") => {
    const found = `${foundText(text)}${reason === "" ? "" : ` (${reason})`}`;
    return new InputError(`${name} takes ${acceptedText(dimensions)}; found ${found}`, place);
  };
  if (typeof text !== "string") throw fault();
  const trimmed = text.trim();
  const number = NUMBER.exec(trimmed)?.[0];
  if (number === undefined) throw fault();
  const symbol = trimmed.slice(number.length).trim();
  const found = UNITS.find((each) => each.symbol === symbol && dimensions.includes(each.dimension));
  if (found === undefined) throw fault(unitReason(symbol, dimensions));
  const value = (Number(number) * found.times) / found.over + found.plus;
  if (!Number.isFinite(value)) throw fault("too large a number");
  return { value, dimension: found.dimension, symbol, text };
}

/**
 * Reads a number with its unit into the dimension's inner unit (SI; litres, degrees, and a share as 0..1).
 *
 * @throws InputError as {@link readQuantity}
 * @example
 * parseQuantity("12 kn", "speed") // → 6.173333333333333
 * parseQuantity("20 %", "share") // → 0.2
 */
export function parseQuantity(text: unknown, dimension: Dimension, name?: string, place?: Place): number {
  return readQuantity(text, [dimension], name, place).value;
}

/** What a quantity accepts, as `a number with one of m/s, km/h, kn, ft/min, as "12 kn"`. */
export function acceptedText(dimensions: readonly Dimension[]): string {
  const symbols = dimensions.flatMap(symbolsOf);
  const units = symbols.length === 1 ? `the unit ${symbols[0]}` : `one of ${symbols.join(", ")}`;
  return `a number with ${units}, as "${exampleOf(dimensions[0])}"`;
}

function exampleOf(dimension: Dimension | undefined): string {
  if (dimension === "speed") return "12 kn";
  if (dimension === "share") return "20 %";
  if (dimension === "specific consumption") return "210 g/kWh";
  if (dimension === "density") return "0.85 kg/L";
  return dimension === undefined ? "" : `12 ${symbolsOf(dimension).at(-1)}`;
}

function unitReason(symbol: string, dimensions: readonly Dimension[]): string {
  if (symbol === "") return "without a unit";
  if (/^,\d/.test(symbol)) return "the decimal sign is a point";
  const likely = likelySymbol(symbol, dimensions);
  if (likely !== undefined) return `did you mean ${likely}?`;
  const elsewhere = UNITS.find((each) => each.symbol === symbol);
  return elsewhere === undefined ? "" : `${symbol} is a unit of ${elsewhere.dimension}`;
}

/** The accepted symbol that differs only by case, or that another spelling stands for. */
function likelySymbol(symbol: string, dimensions: readonly Dimension[]): string | undefined {
  const accepted = dimensions.flatMap(symbolsOf);
  const lower = symbol.toLowerCase();
  const byCase = accepted.find((each) => each.toLowerCase() === lower);
  if (byCase !== undefined) return byCase;
  const bySpelling = Object.entries(SPELLINGS).find(([spelling]) => spelling.toLowerCase() === lower)?.[1];
  return accepted.find((each) => each === bySpelling);
}

function unitOf(symbol: string): Unit {
  const found = UNITS.find((each) => each.symbol === symbol);
  if (found === undefined) throw new RangeError(`no unit has the symbol ${symbol}`);
  return found;
}

/** The dimension of a symbol, or `undefined` where no unit has it. */
export function dimensionOf(symbol: string): Dimension | undefined {
  return UNITS.find((each) => each.symbol === symbol)?.dimension;
}

/**
 * A figure in its inner unit (SI; litres, degrees, share 0..1) as a number of the unit named.
 *
 * @throws RangeError where no unit has the symbol
 * @example
 * toUnit(926, "NM") // → 0.5
 */
export function toUnit(value: number, symbol: string): number {
  const { times, over, plus } = unitOf(symbol);
  return ((value - plus) * over) / times;
}

/**
 * A number of the unit named as a figure in its inner unit.
 *
 * @throws RangeError where no unit has the symbol
 * @example
 * fromUnit(1, "NM") // → 1852
 */
export function fromUnit(value: number, symbol: string): number {
  const { times, over, plus } = unitOf(symbol);
  return (value * times) / over + plus;
}

/**
 * Pattern, for JSON schemas, of the texts that the dimensions accept.
 *
 * @param least the bound that the figure keeps: above 0, not below 0, or none
 */
export function quantityPattern(
  dimensions: readonly Dimension[],
  least: "above 0" | "0" | "any" = "any",
): string {
  const symbols = dimensions.flatMap(symbolsOf).map((each) => each.replace(/[/]/g, "\\/"));
  return `^\\s*${BOUNDED[least]}${NUMBER.source.slice(1)}\\s*(?:${symbols.join("|")})\\s*$`;
}

/** A figure is as its digits before the exponent are: with none but 0 it is 0. */
const BOUNDED = { "above 0": "(?!-)(?=[+.0]*[1-9])", "0": "(?!-[.0]*[1-9])", any: "" };
