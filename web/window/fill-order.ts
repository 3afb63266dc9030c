/**
 * Departures in the order in which they are worked out: the first, then every halving of the steps between, so that the whole
 * window shows at once in coarse steps and then in finer ones.
 */
export function coarseToFine(count: number): number[] {
  const order: number[] = [];
  let step = 2 ** Math.ceil(Math.log2(Math.max(count, 1)));
  for (let at = 0; at < count; at += step) order.push(at);
  for (; step > 1; step /= 2) {
    for (let at = step / 2; at < count; at += step) order.push(at);
  }
  return order;
}

/** Indices of a window's cells, departure by departure in that order. */
export function cellOrder(departures: number, perDeparture: number): Int32Array {
  const order = new Int32Array(departures * perDeparture);
  let filled = 0;
  for (const departure of coarseToFine(departures)) {
    for (let at = 0; at < perDeparture; at += 1) {
      order[filled] = departure * perDeparture + at;
      filled += 1;
    }
  }
  return order;
}
