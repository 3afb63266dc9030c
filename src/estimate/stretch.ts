/*
 * Stretches: where along a leg something holds. A watched quantity is fed as a margin (positive = it holds) at places
 * in order along the leg; a whole span is covered at once. Repeats on one leg merge into one stretch that knows
 * its extent, the distance touched and the largest amount.
 */

export interface Stretch {
  /** First and last place, metres from the leg's start; `from` is -1 while nothing was found. */
  from: number;
  to: number;
  /** Distance on which it holds, and how many separate times. */
  touched: number;
  times: number;
  /** Largest amount seen while it held. */
  peak: number;
  open: boolean;
  lastPlace: number;
  lastMargin: number;
}

export function makeStretch(): Stretch {
  return { from: -1, to: -1, touched: 0, times: 0, peak: 0, open: false, lastPlace: -1, lastMargin: 0 };
}

/** Feeds the margin and the amount at a place; the edges are where the margin, linear between places, is zero. */
export function feed(stretch: Stretch, place: number, margin: number, amount: number): void {
  if (margin > 0) {
    if (!stretch.open) openAt(stretch, edge(stretch, place, margin));
    if (amount > stretch.peak) stretch.peak = amount;
  } else if (stretch.open) {
    closeAt(stretch, edge(stretch, place, margin));
  }
  stretch.lastPlace = place;
  stretch.lastMargin = margin;
}

/** Ends an open stretch at the leg's end. */
export function closeStretch(stretch: Stretch, place: number): void {
  if (stretch.open) closeAt(stretch, place);
}

/** Two spans nearer than this are one (a millimetre). */
const JOINT_M = 1e-3;

/** Adds a whole span on which it holds. */
export function cover(stretch: Stretch, from: number, to: number): void {
  if (stretch.from < 0) stretch.from = from;
  if (stretch.times === 0 || from - stretch.to > JOINT_M) stretch.times += 1;
  stretch.to = to;
  stretch.touched += to - from;
}

function edge(stretch: Stretch, place: number, margin: number): number {
  const { lastPlace, lastMargin } = stretch;
  if (lastPlace < 0 || lastMargin === margin) return place;
  return lastPlace + ((place - lastPlace) * lastMargin) / (lastMargin - margin);
}

function openAt(stretch: Stretch, place: number): void {
  stretch.open = true;
  if (stretch.from < 0) stretch.from = place;
  if (stretch.times === 0 || place - stretch.to > JOINT_M) stretch.times += 1;
  stretch.to = place;
}

function closeAt(stretch: Stretch, place: number): void {
  stretch.open = false;
  stretch.touched += place - stretch.to;
  stretch.to = place;
}
