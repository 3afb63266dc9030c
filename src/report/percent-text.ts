/** `93 %`; never 0 % or 100 % unless it is. */
export function percentText(share: number): string {
  const percent = share * 100;
  if (share > 0 && percent < 0.1) return "less than 0.1 %";
  if (share < 1 && percent > 99.9) return "more than 99.9 %";
  return `${percent.toFixed(share === 0 || share === 1 || (percent > 1 && percent < 99) ? 0 : 1)} %`;
}

/** A probability asked for, with the digits that it was given with: `99.5 %`. */
export function askedText(confidence: number): string {
  return `${Number((100 * confidence).toPrecision(12))} %`;
}
