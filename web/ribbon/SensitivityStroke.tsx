import type { SensitivityProfile } from "../core.ts";
import type { LinearScale } from "../format/linear-scale.ts";
import { BAND_BOTTOM, BAND_HEIGHT } from "./ribbon-measures.ts";
import "./sensitivity.css";

interface SensitivityStrokeProps {
  readonly profile: SensitivityProfile;
  readonly byTime: boolean;
  readonly scale: LinearScale;
}

/** Where a wrong forecast adds most to the spread of the use: a line over the band, as high as the place adds per metre. */
export function SensitivityStroke({ profile, byTime, scale }: SensitivityStrokeProps) {
  const { from_m, to_m, time_s, useVariance } = profile;
  const density = Array.from(useVariance, (part, at) => {
    const length = (to_m[at] ?? 0) - (from_m[at] ?? 0);
    return length > 0 ? Math.max(part, 0) / length : null;
  });
  const most = Math.max(...density.map((value) => value ?? 0));
  if (!(most > 0)) return null;
  const points = density.flatMap((value, at) => {
    if (value === null) return [];
    const middle = byTime ? (time_s[at] ?? 0) : ((from_m[at] ?? 0) + (to_m[at] ?? 0)) / 2;
    return [`${scale(middle).toFixed(2)} ${(BAND_BOTTOM - (BAND_HEIGHT * value) / most).toFixed(2)}`];
  });
  return (
    <g class="sensitivity">
      <path class="casing" d={`M${points.join("L")}`} />
      <path d={`M${points.join("L")}`} />
    </g>
  );
}
