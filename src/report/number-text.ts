/** Stands where there is no figure. */
export const NO_FIGURE = "–";

function exponential(value: number, width: number): string {
  const digits = Math.max(0, width - value.toExponential(0).length - 1);
  return value.toExponential(Math.min(digits, 6));
}

/**
 * A whole number of units of 10^-decimals as text of at most `width` columns; `signed` puts + before positive ones.
 * A figure too wide for its column is written with an exponent.
 */
export function placedText(count: number | null, decimals: number, width: number, signed = false): string {
  if (count === null) return NO_FIGURE;
  const value = count / 10 ** decimals;
  const sign = signed && count > 0 ? "+" : "";
  const text = Math.abs(value) < 1e15 ? sign + value.toFixed(decimals) : "";
  return text !== "" && text.length <= width ? text : sign + exponential(value, width - sign.length);
}

/** How many decimals a column can carry, at most `wanted`, its widest figure being `largest` and a sign included. */
export function decimalsThatFit(largest: number, wanted: number, width: number): number {
  const whole = Math.floor(Math.abs(largest)).toFixed(0).length + 1;
  return Math.max(0, Math.min(wanted, width - whole - 1));
}

/** Course or heading in whole degrees as three digits, 000 to 359: 360 is 000. */
export function courseText(degrees: number | null): string {
  if (degrees === null) return NO_FIGURE;
  const whole = ((Math.round(degrees) % 360) + 360) % 360;
  return String(whole).padStart(3, "0");
}
