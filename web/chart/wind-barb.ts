/** A point of a symbol, px, x to the right, y down, from the symbol's own place. */
export type Point = readonly [number, number];

/** A symbol as lines to stroke and polygons to fill. */
export interface FlowSymbol {
  readonly strokes: readonly (readonly Point[])[];
  readonly fills: readonly (readonly Point[])[];
  /** Radius of the circle of a calm, px; `null` where it isn't calm. */
  readonly calm: number | null;
}

const STEP = 0.15;
const BARB = 0.42;
const CALM_RADIUS = 3.5;

/** What a speed is drawn with: rounded to 5 kn, in pennants of 50, full barbs of 10 and half barbs of 5 kn. */
export interface Feathers {
  readonly pennants: number;
  readonly full: number;
  readonly half: number;
}

/** @param speed_kn not negative */
export function feathersOf(speed_kn: number): Feathers {
  const fives = Math.round(speed_kn / 5);
  const pennants = Math.floor(fives / 10);
  const full = Math.floor((fives - pennants * 10) / 2);
  return { pennants, full, half: fives - pennants * 10 - full * 2 };
}

/**
 * A wind barb after WMO-No. 485: the shaft points to where the wind comes from; seen along the wind, the barbs lie left of the
 * shaft in the northern hemisphere and right of it in the southern.
 *
 * @param speed_kn speed, kn, not negative
 * @param from_deg direction that the wind comes from, degrees clockwise from up
 * @param southern whether the place lies south of the equator
 * @param length of the shaft, px
 */
export function windBarb(speed_kn: number, from_deg: number, southern: boolean, length: number): FlowSymbol {
  const { pennants, full, half } = feathersOf(speed_kn);
  if (pennants + full + half === 0) return { strokes: [], fills: [], calm: CALM_RADIUS };

  const angle = (from_deg * Math.PI) / 180;
  const out: Point = [Math.sin(angle), -Math.cos(angle)];
  const hand = southern ? -1 : 1;
  const side: Point = [hand * Math.cos(angle), hand * Math.sin(angle)];
  /** The place `along` the shaft and `aside` from it, in shares of its length. */
  const at = (along: number, aside: number): Point => [
    length * (along * out[0] + aside * side[0]),
    length * (along * out[1] + aside * side[1]),
  ];

  const strokes: Point[][] = [[[0, 0], at(1, 0)]];
  const fills: Point[][] = [];
  let place = 1;
  for (let count = 0; count < pennants; count += 1) {
    fills.push([at(place, 0), at(place - STEP / 2, BARB), at(place - STEP, 0)]);
    place -= STEP;
  }
  // A gap keeps the first barb from closing the last pennant.
  if (pennants > 0) place -= STEP / 2;
  for (let count = 0; count < full; count += 1) {
    strokes.push([at(place, 0), at(place + BARB / 3, BARB)]);
    place -= STEP;
  }
  if (half > 0) {
    // A half barb alone stands in from the end, so that it isn't taken for a full one.
    if (pennants + full === 0) place -= STEP;
    strokes.push([at(place, 0), at(place + BARB / 6, BARB / 2)]);
  }
  return { strokes, fills, calm: null };
}
