/* Heights of a ribbon's parts, px: the store above, the band below it, then what turning back has to say, then names. */

export const STORE_TOP = 3;
export const STORE_HEIGHT = 20;
export const BAND_TOP = STORE_TOP + STORE_HEIGHT + 2;
export const BAND_HEIGHT = 11;
export const BAND_BOTTOM = BAND_TOP + BAND_HEIGHT;
/** Of one strip that shows from where a goal is in reach. */
export const REACH_STEP = 5;
export const NAMES_HEIGHT = 16;

/** Where an amount of the store stands. */
export function storeLevel(amount: number, usable: number): number {
  const share = Math.min(Math.max(amount / usable, 0), 1) || 0;
  return STORE_TOP + STORE_HEIGHT - share * STORE_HEIGHT;
}
