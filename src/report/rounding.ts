/*
 * Figures as whole numbers of their last printed place. A column is rounded by its running sum, so the printed rows add up
 * to the printed total; a row stands at most one in its last place from its own rounding.
 */

/** The value as a whole number of units of 10^-decimals, halves away from zero. */
export function inLastPlace(value: number, decimals: number): number {
  const scaled = Math.abs(value) * 10 ** decimals;
  // Decimal halves such as 1.005 sit a rounding error below themselves in binary.
  const rounded = Math.round(scaled + scaled * Number.EPSILON);
  return value < 0 && rounded !== 0 ? -rounded : rounded;
}

export interface RoundedColumn {
  /** One entry a row; `null` from the first row on that has no value. */
  readonly rows: readonly (number | null)[];
  /** Of all rows; `null` where any row is. */
  readonly total: number | null;
}

/** Rows rounded by their running sum; a `null` row and those after it stay `null`. */
export function roundedRows(values: readonly (number | null)[], decimals: number): RoundedColumn {
  let sum = 0;
  let printed = 0;
  let complete = true;
  const rows = values.map((value) => {
    if (value === null || !complete) {
      complete = false;
      return null;
    }
    sum += value;
    const now = inLastPlace(sum, decimals);
    const row = now - printed;
    printed = now;
    return row;
  });
  return { rows, total: complete ? printed : null };
}

/** What is left, never printed as zero or more where it is below: nearest, but at least one in the last place below zero. */
export function leftInLastPlace(left: number, decimals: number): number {
  const rounded = inLastPlace(left, decimals);
  return left < 0 && rounded === 0 && left * 10 ** decimals < -1e-6 ? -1 : rounded;
}
