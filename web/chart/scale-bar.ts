/** A bar of a scale: its length in px and its label's number, in the unit asked for. */
export interface ScaleBar {
  readonly px: number;
  readonly value: number;
}

/**
 * The longest bar of a round length (1, 2 or 5 × a power of ten) that fits.
 *
 * @param metresPerPx at the chart's middle
 * @param unit_m metres in the shown unit
 * @param widest px
 */
export function scaleBar(metresPerPx: number, unit_m: number, widest: number): ScaleBar {
  const most = (metresPerPx * widest) / unit_m;
  const power = 10 ** Math.floor(Math.log10(most));
  const factor = [5, 2, 1].find((step) => step * power <= most) ?? 1;
  const value = factor * power;
  return { px: (value * unit_m) / metresPerPx, value };
}
