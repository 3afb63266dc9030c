/** A path through points, for `d` of an SVG path, to a thousandth of a pixel; empty where there are no points. */
export function linePath(count: number, x: (at: number) => number, y: (at: number) => number): string {
  let path = "";
  for (let at = 0; at < count; at += 1) path += `${at === 0 ? "M" : "L"}${short(x(at))} ${short(y(at))}`;
  return path;
}

/** The area between that path and a level. */
export function areaPath(
  count: number,
  x: (at: number) => number,
  y: (at: number) => number,
  level: number,
): string {
  if (count === 0) return "";
  return `${linePath(count, x, y)}V${short(level)}H${short(x(0))}Z`;
}

function short(value: number): number {
  return Math.round(value * 1000) / 1000;
}
