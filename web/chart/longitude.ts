/** Longitudes as one continuous line: each within half a turn of the one before it, the first as it is. */
export function continuousLongitudes(lons: readonly number[]): number[] {
  const line: number[] = [];
  for (const lon of lons) {
    const before = line.at(-1);
    line.push(before === undefined ? lon : before + withinHalfTurn(lon - before));
  }
  return line;
}

/** Whole turns, in degrees, that bring a line with its middle at `middle` nearest to a chart centred on `centre`. */
export function turnsToward(middle: number, centre: number): number {
  return 360 * Math.round((centre - middle) / 360) + 0;
}

function withinHalfTurn(difference: number): number {
  return ((((difference + 180) % 360) + 360) % 360) - 180;
}
