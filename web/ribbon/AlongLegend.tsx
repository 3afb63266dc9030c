import { ALONG_CLASSES, alongColour } from "../format/palette.ts";
import { number, shownUnit } from "../format/units.ts";
import type { UnitsPreset } from "../state/page-view.ts";

/** What the colours of ribbons and routes stand for. */
export function AlongLegend({ limit_m_s, units }: { limit_m_s: number; units: UnitsPreset }) {
  if (limit_m_s === 0) return null;
  const { si, symbol } = shownUnit(units, "speed");
  const end = number(limit_m_s / si, 1);
  const colours = Array.from({ length: ALONG_CLASSES }, (_, at) => alongColour(at));
  return (
    <div
      class="along-legend"
      role="img"
      aria-label={`Along-track component from ${end} ${symbol} against to ${end} ${symbol} with the craft`}
    >
      <span aria-hidden="true">against −{end}</span>
      <svg width={colours.length * 11} height="10" aria-hidden="true">
        {colours.map((colour, at) => (
          <rect key={colour} x={at * 11} width="11" height="10" fill={colour} />
        ))}
      </svg>
      <span aria-hidden="true">
        +{end} {symbol} with
      </span>
    </div>
  );
}
