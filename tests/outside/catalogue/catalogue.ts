import { readFileSync } from "node:fs";

/*
 * The catalogue of outside checks (checks.json; see tests/outside/README.md) and the form in which our own figures are set
 * against it.
 */

export type Figure = number | string | readonly Figure[];

/** What a case expects of one quantity. */
export interface Expected {
  readonly value: Figure;
  /** Absolute, ours against `value`, in `unit`. */
  readonly tol: number;
  readonly unit: string;
  /** The figure as its source prints it. */
  readonly published?: string;
  /** Ours against the printed figure; 0 means as printed, to the last digit. */
  readonly tol_vs_published?: number;
  readonly note?: string;
}

export interface CatalogueCase {
  readonly id: string;
  readonly title: string;
  readonly kind: string;
  readonly source: string;
  readonly inputs: Readonly<Record<string, unknown>>;
  readonly expected: Readonly<Record<string, Expected>>;
}

export const CASES = (
  JSON.parse(readFileSync(new URL("../checks.json", import.meta.url), "utf8")) as {
    readonly cases: readonly CatalogueCase[];
  }
).cases;

/** Our figure for a quantity of a case. */
export interface Answer {
  /** What the quantity is, in words. */
  readonly words: string;
  readonly ours: () => Figure | Promise<Figure>;
  /** Compared as directions: whole turns do not count. */
  readonly direction?: true;
  /**
   * The printed figure as numbers, where its text is more than one plain number; `null` where the catalogue names a
   * tolerance but does not carry the printed figures.
   */
  readonly printed?: Figure | null;
  /** Half a unit of the last printed digit, where the print is no plain number and its tolerance is `as printed`. */
  readonly printedWithin?: number;
  /** The part of the expected value that this answer is about. */
  readonly part?: (value: Figure) => Figure;
  /** The tolerance that the quantity's unit states for this part, as written there. */
  readonly toleranceInUnit?: string;
}

/** Our answers: by case, by quantity. */
export type Answers = Readonly<Record<string, Readonly<Record<string, Answer | readonly Answer[]>>>>;

export function caseOf(id: string): CatalogueCase {
  const found = CASES.find((each) => each.id === id);
  if (found === undefined) throw new Error(`the catalogue has no case ${id}`);
  return found;
}

/** The inputs of a case, or of a named part of them, as numbers. */
export function given(id: string, part?: string): Readonly<Record<string, number>> {
  const { inputs } = caseOf(id);
  const numbers = part === undefined ? inputs : inputs[part];
  return new Proxy(numbers as Record<string, number>, {
    get(target, key) {
      const value = target[key as string];
      if (typeof value !== "number") throw new Error(`${id} has no number ${String(key)}`);
      return value;
    },
  });
}

/** A list of numbers among the inputs of a case. */
export function listOf(id: string, key: string): readonly number[] {
  return caseOf(id).inputs[key] as readonly number[];
}

/** Both ends of a case's line. */
export function endsOf(id: string, part?: string) {
  const { lat1, lon1, lat2, lon2 } = given(id, part);
  return {
    from: { lat: lat1 as number, lon: lon1 as number },
    to: { lat: lat2 as number, lon: lon2 as number },
  };
}
