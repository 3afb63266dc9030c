/** Which two slices hold, for several departures: index n is the departure's. Times in s since it. */
export interface SliceClock {
  /** The slice before; the one after is the next, or the same for a steady tile. */
  readonly slice: Int32Array;
  /** When it holds exactly, and when the one after does. */
  readonly from: Float64Array;
  readonly until: Float64Array;
  /** Share of the way between them that passes in a second. */
  readonly perSecond: Float64Array;
}

export function makeSliceClock(count: number): SliceClock {
  return {
    slice: new Int32Array(count),
    from: new Float64Array(count),
    until: new Float64Array(count).fill(Number.NEGATIVE_INFINITY),
    perSecond: new Float64Array(count),
  };
}

/**
 * Turns the clock of departure n to the slices that hold at a moment.
 *
 * @param times valid times, ms since 1970; `null` for a steady tile
 * @param departure ms since 1970
 * @param moment s since departure, not before the last one asked for
 * @returns whether there are such slices
 */
export function turnClock(
  clock: SliceClock,
  n: number,
  times: Float64Array | null,
  departure: number,
  moment: number,
): boolean {
  if (times === null) {
    clock.until[n] = Number.POSITIVE_INFINITY;
    return true;
  }
  const last = times.length - 1;
  if (!(moment >= since(times, 0, departure) && moment < since(times, last, departure))) return false;
  let slice = clock.slice[n] as number;
  while (since(times, slice + 1, departure) <= moment) slice += 1;
  clock.slice[n] = slice;
  clock.from[n] = since(times, slice, departure);
  clock.until[n] = since(times, slice + 1, departure);
  // From the valid times themselves: the same for every departure.
  clock.perSecond[n] = 1000 / ((times[slice + 1] as number) - (times[slice] as number));
  return true;
}

/** A valid time in seconds since a departure. */
function since(times: Float64Array, slice: number, departure: number): number {
  return ((times[slice] as number) - departure) / 1000;
}
