import type { LinearScale } from "../format/linear-scale.ts";
import { storeLevel } from "./ribbon-measures.ts";
import type { LeftBetween } from "./spread-between.ts";

/** Half the width of the caps of a bar, px. */
const CAPS = { error: 4, ensemble: 7 } as const;

interface SpreadBandProps {
  readonly between: readonly LeftBetween[];
  readonly usable: number;
  readonly scale: LinearScale;
  readonly kind: "error" | "ensemble";
}

/** A band under the store line, straight between waypoints: hatched under a stated error, dashed among members. */
export function SpreadBand({ between, usable, scale, kind }: SpreadBandProps) {
  if (between.length < 2) return null;
  const point = (at: number, amount: number): string =>
    `${scale(at).toFixed(2)} ${storeLevel(amount, usable).toFixed(2)}`;
  const upper = between.map(({ at, high }) => point(at, high));
  const lower = [...between].reverse().map(({ at, low }) => point(at, low));
  return <path class={`spread-band ${kind} band`} d={`M${[...upper, ...lower].join("L")}Z`} />;
}

/** Its bar over the store line at every waypoint: where the band is narrower than the line, the caps tell that it is there. */
export function SpreadBars({ between, usable, scale, kind }: SpreadBandProps) {
  const level = (amount: number): string => storeLevel(amount, usable).toFixed(2);
  const cap = CAPS[kind];
  const bars = between.slice(1).map(({ at, low, high }) => {
    const x = scale(at);
    const across = (amount: number): string => `M${(x - cap).toFixed(2)} ${level(amount)}h${2 * cap}`;
    return `${across(high)}${across(low)}M${x.toFixed(2)} ${level(high)}V${level(low)}`;
  });
  return (
    <g class={`spread-band ${kind}`}>
      <path class="casing" d={bars.join("")} />
      <path class="bars" d={bars.join("")} />
    </g>
  );
}

/** The hatching of a band under a stated error. */
export function SpreadHatch() {
  return (
    <defs>
      <pattern id="spread-hatch" width="4" height="4" patternUnits="userSpaceOnUse">
        <path class="spread-hatch" d="M-1 1L1 -1M0 4L4 0M3 5L5 3" />
      </pattern>
    </defs>
  );
}
