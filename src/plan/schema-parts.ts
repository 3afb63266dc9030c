import * as z from "zod/mini";
import { InputError } from "../errors.ts";
import { foundText, quoted } from "../found.ts";
import { nearest } from "../nearest.ts";
import {
  acceptedText,
  type Dimension,
  INNER_UNITS,
  type Quantity,
  quantityPattern,
  readQuantity,
} from "../units.ts";

/*
 * The parts that the schemas of plan and craft are made of. Each gives whole sentences, since zod's own would name neither
 * units nor examples; the place is added where the first issue is picked (`first-issue.ts`).
 */

/** Bounds of a number or of a quantity in its inner unit. */
export interface Bounds {
  readonly above?: number;
  readonly below?: number;
  readonly atLeast?: number;
  readonly atMost?: number;
}

/** A speed, area, mass and the like. */
export const POSITIVE: Bounds = { above: 0 };
export const NOT_NEGATIVE: Bounds = { atLeast: 0 };
/** An efficiency or another share that cannot be nothing. */
export const POSITIVE_SHARE: Bounds = { above: 0, atMost: 1 };
/** A probability that is neither nothing nor certainty. */
export const UNSURE_SHARE: Bounds = { above: 0, below: 1 };

/**
 * Sizes that a figure may have beside 0, in the dimension's inner unit. Far wider than any craft or place, and narrow enough
 * that no product of figures in the models overflows or becomes NaN.
 */
const SIZES = { least: 1e-15, most: 1e15 };
const SPEED_SIZES = { least: 1e-3, most: 1e5 };

/** A text with a number and its unit, turned into a {@link Quantity}. */
export function quantity(
  dimensions: readonly Dimension[],
  name: string,
  bounds: Bounds,
  description: string,
) {
  const asText = (value: number) => boundText(value, dimensions);
  const text = z
    .string({ error: (issue) => sentence(name, `takes ${acceptedText(dimensions)}`, issue.input) })
    .check(z.meta({ pattern: quantityPattern(dimensions, leastOf(bounds)), description }));
  return readBy(text, (written): Quantity => {
    const read = readQuantity(written, dimensions, name);
    const broken = brokenBound(read.value, bounds, asText) ?? brokenSize(read.value, read.dimension);
    if (broken !== null) throw new InputError(sentence(name, broken, written));
    return read;
  });
}

function leastOf({ above, atLeast }: Bounds) {
  if (above === 0) return "above 0";
  return atLeast === 0 ? "0" : "any";
}

/** A number without a unit. */
export function bareNumber(name: string, bounds: Bounds, description: string) {
  const limits = {
    ...(bounds.above === undefined ? {} : { exclusiveMinimum: bounds.above }),
    ...(bounds.below === undefined ? {} : { exclusiveMaximum: bounds.below }),
    ...(bounds.atLeast === undefined ? {} : { minimum: bounds.atLeast }),
    ...(bounds.atMost === undefined ? {} : { maximum: bounds.atMost }),
  };
  return z
    .number({ error: (issue) => sentence(name, "takes a number without a unit", issue.input) })
    .check(z.meta({ ...limits, description }))
    .check(
      unbroken((value) => {
        const broken = brokenBound(value, bounds, String) ?? brokenSize(value);
        return broken === null ? null : sentence(name, broken, value);
      }),
    );
}

/** A number without a fraction, not below 0. */
export function wholeNumber(name: string, description: string) {
  const rule = "takes a whole number, not below 0";
  return z
    .number({ error: (issue) => sentence(name, rule, issue.input) })
    .check(z.meta({ minimum: 0, multipleOf: 1, description }))
    .check(
      unbroken((value) => (Number.isSafeInteger(value) && value >= 0 ? null : sentence(name, rule, value))),
    );
}

/**
 * A text that a sentence or a table can show: one line, without control characters.
 *
 * @param not pattern, for the JSON schema, of what a further rule refuses at its beginning
 */
export function lineOfText(name: string, description: string, mayBeEmpty = false, not = "") {
  const rule = `takes a text of one line${mayBeEmpty ? "" : ", not empty"}`;
  const pattern = `^${not}${mayBeEmpty ? "" : "(?=.*\\S)"}[^\\u0000-\\u001f\\u007f-\\u009f\\u2028\\u2029]*$`;
  return z
    .string({ error: (issue) => sentence(name, rule, issue.input) })
    .check(z.meta({ description, pattern }))
    .check(
      unbroken((text) => {
        const isLine = !/[\p{Cc}\u2028\u2029]/u.test(text) && (mayBeEmpty || text.trim() !== "");
        return isLine ? null : sentence(name, rule, text);
      }),
    );
}

const ABSOLUTE = /^(?:[/\\~]|[A-Za-z][A-Za-z0-9+.-]*:)/;

/** The name of a file beside the plan: relative, since a plan moves together with its files. */
export function fileName(description: string) {
  return lineOfText("file", description, false, `(?!${ABSOLUTE.source.slice(1)})`).check(
    unbroken((name) => {
      return ABSOLUTE.test(name) ? sentence("file", "takes a name relative to the plan", name) : null;
    }),
  );
}

/** One of a few words. */
export function oneOf<const T extends readonly [string, ...string[]]>(
  name: string,
  words: T,
  description: string,
) {
  const rule = `takes ${words.length === 1 ? "" : "one of "}${words.map(quoted).join(", ")}`;
  return z
    .enum(words, { error: (issue) => sentence(name, rule, issue.input) })
    .check(z.meta({ description }));
}

/**
 * An object with these keys and no others. `what` names it with its article, as `a waypoint`.
 *
 * @param foreign what is said of keys that it has not, where the nearest that it has would not help
 */
export function objectOf<T extends z.core.$ZodShape>(
  what: string,
  shape: T,
  description: string,
  foreign: Readonly<Record<string, string>> = {},
) {
  const keys = Object.keys(shape);
  return z
    .strictObject(shape, {
      error: (issue) => {
        if (issue.code !== "unrecognized_keys") return sentence(what, "is an object", issue.input);
        const key = issue.keys[0] ?? "";
        return foreign[key] ?? unknownKeySentence(what, key, keys);
      },
    })
    .check(z.meta({ description }));
}

/** A list of at least so many items. `what` names it, as `routes`. */
export function listOf<T extends z.ZodMiniType>(
  what: string,
  item: T,
  least: number,
  items: string,
  description: string,
) {
  const rule = least === 0 ? `takes a list of ${items}` : `takes a list of at least ${least} ${items}`;
  return z.array(item, { error: (issue) => sentence(what, rule, issue.input) }).check(
    z.minLength(least, {
      error: (issue) => `${what} ${rule}; found ${(issue.input as unknown[] | undefined)?.length ?? 0}`,
    }),
    z.meta({ description }),
  );
}

/** A key that may be left out. */
export const optional = z.optional;

/** A rule of its own: a function that gives the sentence of what breaks it, or `null`. */
function unbroken<T extends string | number>(broken: (value: T) => string | null) {
  return z.check<T>(({ value, issues }) => {
    const message = broken(value);
    if (message !== null) issues.push({ code: "custom", message, input: value });
  });
}

/** `<what> <rule>; found <input>`. */
export function sentence(what: string, rule: string, input: unknown): string {
  return `${what} ${rule}; found ${foundText(input)}`;
}

function unknownKeySentence(what: string, key: string, known: readonly string[]): string {
  return `${what} has no key ${quoted(key)}; the nearest that it has is ${quoted(nearest(key, known).name)}`;
}

/** The rule that a value breaks, or `null`. */
function brokenBound(
  value: number,
  { above, below, atLeast, atMost }: Bounds,
  text: (value: number) => string,
) {
  if (above !== undefined && below !== undefined)
    return value > above && value < below ? null : `is above ${text(above)} and below ${text(below)}`;
  if (above !== undefined && !(value > above)) return `is above ${text(above)}`;
  if (atLeast !== undefined && !(value >= atLeast)) return `is not below ${text(atLeast)}`;
  if (atMost !== undefined && !(value <= atMost)) return `is at most ${text(atMost)}`;
  return null;
}

function brokenSize(value: number, dimension?: Dimension): string | null {
  const { least, most } = dimension === "speed" ? SPEED_SIZES : SIZES;
  const size = Math.abs(value);
  if (size === 0 || (size >= least && size <= most)) return null;
  const unit = dimension === undefined || dimension === "share" ? "" : ` ${INNER_UNITS[dimension]}`;
  return size > most ? `is at most ${most}${unit}` : `is 0 or at least ${least}${unit}`;
}

function boundText(value: number, dimensions: readonly Dimension[]): string {
  const only = dimensions.length === 1 ? dimensions[0] : undefined;
  if (only === "share") return `${value * 100} %`;
  if (only === "time" && value !== 0 && value % 3600 === 0) return `${value / 3600} h`;
  if (only === "angle") return `${value} deg`;
  return only === undefined || value === 0 ? String(value) : `${value} ${INNER_UNITS[only]}`;
}

/** A text or number that a reader takes, which throws an InputError with the sentence. */
export function readBy<T, Input extends z.ZodMiniType>(input: Input, read: (value: z.output<Input>) => T) {
  return z.pipe(
    input,
    z.transform((value: z.output<Input>, context): T => {
      try {
        return read(value);
      } catch (error) {
        if (!(error instanceof InputError)) throw error;
        context.issues.push({ code: "custom", message: error.message, input: value });
        return z.NEVER;
      }
    }),
  );
}
