import { SPEED_CLASSES, speedColour } from "../format/palette.ts";
import { number, shownUnit } from "../format/units.ts";
import type { UnitsPreset } from "../state/page-view.ts";

/** What the colours of the shading stand for; nothing where nothing is shaded. */
export function ShadingLegend({ limit_m_s, units }: { limit_m_s: number | null; units: UnitsPreset }) {
  if (limit_m_s === null) return null;
  const { si, symbol } = shownUnit(units, "speed");
  const colours = Array.from({ length: SPEED_CLASSES }, (_, at) => speedColour(at));
  return (
    <div
      class="shading-legend"
      role="img"
      aria-label={`Shading from 0 to ${number(limit_m_s / si, 1)} ${symbol}; grey is a gap`}
    >
      <svg width="126" height="10" aria-hidden="true">
        {colours.map((colour, at) => (
          <rect key={colour} x={at * 14} width="14" height="10" fill={colour} />
        ))}
      </svg>
      <span>0</span>
      <span>
        {number(limit_m_s / si, 1)} {symbol}
      </span>
      <span class="gap-key">gap</span>
    </div>
  );
}
