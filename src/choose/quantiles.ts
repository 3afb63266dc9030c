/** Least, 10 %, 50 %, 90 % and greatest of a set of figures. */
export interface Quantiles<Figure = number> {
  readonly min: Figure;
  readonly p10: Figure;
  readonly p50: Figure;
  readonly p90: Figure;
  readonly max: Figure;
}

/**
 * Quantiles of a set of figures by definition 7 of Hyndman & Fan, "Sample quantiles in statistical packages", The American
 * Statistician 50 (1996): the order statistics stand at shares 0, 1/(n-1), … 1, and between two of them a straight line
 * holds; the default of R and NumPy.
 *
 * @returns `null` of no figures
 * @example
 * quantiles([4, 1, 2, 3]) // → { min: 1, p10: 1.3, p50: 2.5, p90: 3.7, max: 4 }
 */
export function quantiles(figures: readonly number[]): Quantiles | null {
  if (figures.length === 0) return null;
  const sorted = Float64Array.from(figures).sort();
  const at = (share: number) => quantile(sorted, share);
  return { min: at(0), p10: at(0.1), p50: at(0.5), p90: at(0.9), max: at(1) };
}

/** @param sorted ascending, not empty @param share 0..1 */
function quantile(sorted: Float64Array, share: number): number {
  const place = (sorted.length - 1) * share;
  const below = Math.floor(place);
  const lower = sorted[below] as number;
  const upper = sorted[Math.min(below + 1, sorted.length - 1)] as number;
  return lower + (place - below) * (upper - lower);
}
