/** A place on a drawn route. */
export interface PlaceAlong {
  readonly lat: number;
  readonly lon: number;
  /** Metres from the start. */
  readonly distance_m: number;
}

interface Line {
  readonly lat: Float64Array;
  readonly lon: Float64Array;
  readonly distance_m: Float64Array;
}

/** The place at a distance, straight between samples; distances beyond an end are that end. `null` for an empty line. */
export function placeAtDistance(line: Line, distance_m: number): PlaceAlong | null {
  return placeOf(line, line.distance_m, distance_m);
}

/** The place at a time since departure; `null` before the start and after the last sample. */
export function placeAtTime(
  line: Line & { readonly time_s: Float64Array },
  time_s: number,
): PlaceAlong | null {
  const { time_s: times } = line;
  const last = times.at(-1);
  if (last === undefined || time_s < (times[0] ?? 0) || time_s > last) return null;
  return placeOf(line, times, time_s);
}

/** A figure of the profile at a distance, straight between samples. */
export function valueAtDistance(
  distances: Float64Array,
  values: Float64Array,
  distance_m: number,
): number | null {
  const { before, share } = bracket(distances, distance_m);
  return mix(values, before, share);
}

/** Index of the sample whose position is nearest, in a plane where a degree of longitude shrinks with latitude. */
export function nearestSample(line: Line, lat: number, lon: number): number | null {
  const narrow = Math.cos((lat * Math.PI) / 180);
  let nearest: number | null = null;
  let least = Number.POSITIVE_INFINITY;
  for (let at = 0; at < line.lat.length; at += 1) {
    const north = (line.lat[at] ?? 0) - lat;
    const east = ((line.lon[at] ?? 0) - lon) * narrow;
    const size = north * north + east * east;
    if (size < least) {
      least = size;
      nearest = at;
    }
  }
  return nearest;
}

function placeOf(line: Line, keys: Float64Array, key: number): PlaceAlong | null {
  const { before, share } = bracket(keys, key);
  const lat = mix(line.lat, before, share);
  const lon = mix(line.lon, before, share);
  const distance_m = mix(line.distance_m, before, share);
  return lat === null || lon === null || distance_m === null ? null : { lat, lon, distance_m };
}

/** Between which samples a key lies, by bisection of ascending keys. */
function bracket(keys: Float64Array, key: number): { before: number; share: number } {
  let low = 0;
  let high = keys.length - 1;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if ((keys[middle] ?? 0) <= key) low = middle;
    else high = middle;
  }
  const from = keys[low] ?? 0;
  const to = keys[high] ?? from;
  const share = to > from ? Math.min(Math.max((key - from) / (to - from), 0), 1) : 0;
  return { before: low, share };
}

function mix(values: Float64Array, before: number, share: number): number | null {
  const from = values[before];
  if (from === undefined) return null;
  const to = values[before + 1] ?? from;
  return from + (to - from) * share;
}
