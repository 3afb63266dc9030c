/** Longitudes nearer than this are one meridian, degrees: 0.1 mm on the equator, far above rounding and far below any grid. */
const SAME_MERIDIAN = 1e-9;
/** Longitudes turned by 360° are rounded to this fraction of a degree, so that 200.1 - 360 is -159.9. */
const TURNED_DIGITS = 1e10;

/** A file's longitudes, put in order around the globe. */
export interface LongitudeAxis {
  /** Degrees, strictly ascending; where `global`, with the first meridian again at the end. */
  readonly lon: Float64Array;
  /** Per longitude the indices of the file's own longitudes that lie on it. */
  readonly sources: readonly (readonly number[])[];
  readonly global: boolean;
}

interface Meridian {
  readonly lon: number;
  readonly sources: number[];
}

/**
 * Orders longitudes of any turn: the axis begins after the widest opening (of equals the one before the most western in
 * -180..180), and closes around the globe where that opening is no wider than the widest other step.
 */
export function longitudeAxis(found: readonly number[]): LongitudeAxis {
  const meridians = meridiansOf(found);
  const count = meridians.length;
  const openings = meridians.map((meridian, index) => {
    const next = meridians[index + 1];
    return (next === undefined ? (meridians[0] as Meridian).lon + 360 : next.lon) - meridian.lon;
  });
  let widest = count - 1;
  for (const [index, opening] of openings.entries()) {
    if (opening > (openings[widest] as number) + SAME_MERIDIAN) widest = index;
  }
  const widestOther = openings.reduce(
    (most, opening, index) => (index === widest ? most : Math.max(most, opening)),
    0,
  );
  const global = count > 1 && (openings[widest] as number) <= widestOther + SAME_MERIDIAN;
  const ordered = meridians.map((_, offset) => {
    const index = (widest + 1 + offset) % count;
    const { lon, sources } = meridians[index] as Meridian;
    return { lon: index <= widest && widest < count - 1 ? rounded(lon + 360) : lon, sources };
  });
  if (global) ordered.push({ ...(ordered[0] as Meridian), lon: rounded((ordered[0] as Meridian).lon + 360) });
  return {
    lon: Float64Array.from(ordered, ({ lon }) => lon),
    sources: ordered.map(({ sources }) => sources),
    global,
  };
}

/** Distinct meridians, west to east in -180..180. */
function meridiansOf(found: readonly number[]): Meridian[] {
  const turned = found.map((lon, index) => ({ lon: inFirstTurn(lon), index })).sort((a, b) => a.lon - b.lon);
  const meridians: Meridian[] = [];
  for (const { lon, index } of turned) {
    const last = meridians.at(-1);
    if (last !== undefined && lon - last.lon <= SAME_MERIDIAN) last.sources.push(index);
    else meridians.push({ lon, sources: [index] });
  }
  const [first, last] = [meridians[0], meridians.at(-1)];
  if (
    first !== undefined &&
    last !== undefined &&
    first !== last &&
    first.lon + 360 - last.lon <= SAME_MERIDIAN
  ) {
    first.sources.push(...last.sources);
    meridians.pop();
  }
  return meridians;
}

/** The same meridian in -180 ≤ λ < 180. */
function inFirstTurn(lon: number): number {
  if (lon >= -180 && lon < 180) return lon;
  const turned = rounded(lon - 360 * Math.floor((lon + 180) / 360));
  return turned === 180 ? -180 : turned;
}

function rounded(lon: number): number {
  return Math.round(lon * TURNED_DIGITS) / TURNED_DIGITS;
}
