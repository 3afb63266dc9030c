/** Steps between lines of a graticule that read well in degrees and minutes, in degrees, largest first. */
const STEPS = [
  45,
  30,
  20,
  10,
  5,
  2,
  1,
  30 / 60,
  20 / 60,
  10 / 60,
  5 / 60,
  2 / 60,
  1 / 60,
  0.5 / 60,
  0.2 / 60,
  0.1 / 60,
  0.05 / 60,
  0.02 / 60,
  0.01 / 60,
] as const;

/** The finest step whose lines are at least `gap` px apart, where a degree measures `pxPerDegree`. */
export function graticuleStep(pxPerDegree: number, gap: number): number {
  const wide = STEPS.filter((step) => step * pxPerDegree >= gap);
  return wide.at(-1) ?? STEPS[0];
}

/** The multiples of a step within a range, each computed anew so that no error adds up. */
export function graticuleLines(from: number, to: number, step: number): number[] {
  const lines: number[] = [];
  for (let count = Math.ceil(from / step - 1e-9); count * step <= to + 1e-9; count += 1)
    lines.push(count * step);
  return lines;
}

/** Decimals of minutes that tell neighbouring lines apart. */
function minuteDecimals(step: number): number {
  const minutes = step * 60;
  if (minutes >= 1 - 1e-9) return 0;
  return minutes >= 0.1 - 1e-9 ? 1 : 2;
}

/** A label: whole degrees where the step is whole degrees, else degrees and minutes. */
export function graticuleLabel(value: number, step: number, axis: "lat" | "lon"): string {
  const turn = axis === "lon" ? ((((value + 180) % 360) + 360) % 360) - 180 : value;
  const decimals = minuteDecimals(step);
  const scale = 60 * 10 ** decimals;
  const units = Math.round(Math.abs(turn) * scale);
  const degrees = Math.floor(units / scale);
  const side = sideOf(turn, units, degrees, axis);
  if (step >= 1) return `${degrees}°${side}`;
  const minutes = ((units - degrees * scale) / 10 ** decimals).toFixed(decimals);
  return `${degrees}°${minutes.padStart(decimals === 0 ? 2 : decimals + 3, "0")}′${side}`;
}

function sideOf(value: number, units: number, degrees: number, axis: "lat" | "lon"): string {
  if (units === 0 || (axis === "lon" && degrees === 180)) return "";
  if (axis === "lat") return value > 0 ? "N" : "S";
  return value > 0 ? "E" : "W";
}
