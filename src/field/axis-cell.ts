/** Where a value lies on an axis: between nodes `index` and `index + 1`, at `weight` of the way; on a node the weight is 0. */
export interface AxisCell {
  readonly index: number;
  readonly weight: number;
}

/** Values this far beyond the ends, in degrees, are on the end: rounding of positions along a track (0.1 mm). */
const AT_THE_END = 1e-9;

/** The cell of a strictly ascending axis that holds a value, or `null` where the value lies outside. */
export function axisCell(axis: Float64Array, value: number, slack = 0): AxisCell | null {
  const last = axis.length - 1;
  const lowest = axis[0] as number;
  const highest = axis[last] as number;
  if (!(value >= lowest - slack && value <= highest + slack)) return null;
  if (value <= lowest) return { index: 0, weight: 0 };
  if (value >= highest) return { index: last, weight: 0 };
  let low = 0;
  let high = last;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if ((axis[middle] as number) <= value) low = middle;
    else high = middle;
  }
  const from = axis[low] as number;
  return { index: low, weight: (value - from) / ((axis[high] as number) - from) };
}

/** The cell of an axis of latitudes that holds one. */
export function latitudeCell(axis: Float64Array, lat: number): AxisCell | null {
  return axisCell(axis, lat, AT_THE_END);
}

/** The cell of an axis of longitudes that holds one of any turn. */
export function longitudeCell(axis: Float64Array, lon: number): AxisCell | null {
  const first = axis[0] as number;
  const turned = lon - 360 * Math.floor((lon - first + AT_THE_END) / 360);
  return axisCell(axis, turned, AT_THE_END);
}
