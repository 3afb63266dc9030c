/*
 * Colours that carry meaning, from published colour-blind-safe scales, values typed in.
 *
 * BrBG (11 classes, diverging) and YlGnBu (9 classes, sequential): ColorBrewer 2.0, Cynthia Brewer, Mark Harrower and The
 * Pennsylvania State University, Apache License 2.0; both marked colour-blind safe by their authors.
 * Route hues: Okabe & Ito, Color Universal Design (2008).
 */

const ALONG = [
  "#543005",
  "#8c510a",
  "#bf812d",
  "#dfc27d",
  "#f6e8c3",
  "#f5f5f5",
  "#c7eae5",
  "#80cdc1",
  "#35978f",
  "#01665e",
  "#003c30",
] as const;

const SPEED = [
  "#ffffd9",
  "#edf8b1",
  "#c7e9b4",
  "#7fcdbb",
  "#41b6c4",
  "#1d91c0",
  "#225ea8",
  "#253494",
  "#081d58",
] as const;

const ROUTES = ["#0072b2", "#d55e00", "#cc79a7", "#009e73", "#56b4e9", "#e69f00"] as const;

export const ALONG_CLASSES = ALONG.length;

/** Class of an along-track component, 0 (most against) … 10 (most with), where the outer classes begin at ±`limit`. */
export function alongClass(along_m_s: number, limit: number): number {
  const middle = (ALONG_CLASSES - 1) / 2;
  if (limit === 0) return middle;
  const place = Math.round((along_m_s / limit) * middle) + middle;
  return Math.min(Math.max(place, 0), ALONG_CLASSES - 1);
}

export function alongColour(classNumber: number): string {
  return ALONG[classNumber] ?? "#f5f5f5";
}

/** Class of a speed, 0 … 8, of 0 … `limit`. */
export function speedClass(speed_m_s: number, limit: number): number {
  if (limit === 0) return 0;
  return Math.min(Math.floor((speed_m_s / limit) * SPEED.length), SPEED.length - 1);
}

export function speedColour(classNumber: number): string {
  return SPEED[classNumber] ?? SPEED[0];
}

export const SPEED_CLASSES = SPEED.length;

/** A route's own hue; after six they come round again, and the name tells routes apart. */
export function routeHue(index: number): string {
  return ROUTES[index % ROUTES.length] ?? ROUTES[0];
}

const ROUND = [1, 1.5, 2, 3, 4, 5, 6, 8, 10] as const;

/** A limit for a scale, round in the unit that it is shown in: the least round number of units not below the value. */
export function roundLimit(value: number, unit: number): number {
  if (value <= 0) return 0;
  const shown = value / unit;
  const power = 10 ** Math.floor(Math.log10(shown));
  const step = ROUND.find((factor) => factor * power >= shown) ?? 10;
  return step * power * unit;
}
