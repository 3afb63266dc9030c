/** Takes values to positions on the screen, in proportion. */
export interface LinearScale {
  (value: number): number;
  /** The value at a position. */
  invert(position: number): number;
  /** Round values across the domain, about so many: steps of 1, 2 or 5 by a power of ten. */
  ticks(count: number): number[];
}

type Ends = readonly [number, number];

/** @param domain two different values, the smaller first @param range their positions */
export function linearScale([from, to]: Ends, [start, end]: Ends): LinearScale {
  const perValue = (end - start) / (to - from);
  const scale = (value: number): number => start + (value - from) * perValue;
  scale.invert = (position: number): number => from + (position - start) / perValue;
  scale.ticks = (count: number): number[] => roundValues(from, to, count);
  return scale;
}

function roundValues(from: number, to: number, count: number): number[] {
  const rough = (to - from) / Math.max(count, 1);
  if (!(rough > 0 && rough < Number.POSITIVE_INFINITY)) return [];
  const power = Math.floor(Math.log10(rough));
  const unit = 10 ** Math.abs(power);
  const over = power < 0 ? rough * unit : rough / unit;
  // The nearest of the three in proportion: the bounds are their geometric means.
  const step = over < Math.SQRT2 ? 1 : over < Math.sqrt(10) ? 2 : over < Math.sqrt(50) ? 5 : 10;
  // Below 1, whole steps are divided, so that 3 steps of a tenth are 0.3.
  const valueAt = (n: number): number => (power < 0 ? (n * step) / unit : n * step * unit);
  const size = valueAt(1);
  // A bound that lies on a value must not fall beside it by rounding.
  const first = Math.ceil(from / size - 1e-9);
  const last = Math.floor(to / size + 1e-9);
  return Array.from({ length: Math.max(last - first + 1, 0) }, (_, n) => valueAt(first + n));
}
