import { useId } from "preact/hooks";
import type { LinearScale } from "../format/linear-scale.ts";
import { storeLevel } from "./ribbon-measures.ts";
import type { LeftBetween } from "./spread-between.ts";

/** Half the width of the caps of a bar, px. */
const CAPS = { error: 4, ensemble: 7 } as const;

/** Under a stated forecast error, or among an ensemble's members. */
export type SpreadKind = keyof typeof CAPS;

interface SpreadBandProps {
  readonly between: readonly LeftBetween[];
  readonly usable: number;
  readonly scale: LinearScale;
  readonly kind: SpreadKind;
}

/** A band under the store line, straight between waypoints: hatched under a stated error, dashed among members. */
export function SpreadBand({ between, usable, scale, kind }: SpreadBandProps) {
  const hatch = useId();
  if (between.length < 2) return null;
  const point = (at: number, amount: number): string =>
    `${scale(at).toFixed(2)} ${storeLevel(amount, usable).toFixed(2)}`;
  const upper = between.map(({ at, high }) => point(at, high));
  const lower = [...between].reverse().map(({ at, low }) => point(at, low));
  return (
    <g class={`spread-band ${kind}`}>
      <SpreadHatch id={hatch} />
      <path class="band" fill={spreadFill(kind, hatch)} d={`M${[...upper, ...lower].join("L")}Z`} />
    </g>
  );
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

/** A band of a width and height in a picture of its own scale. */
export function SpreadBox({ kind, x, y, width, height }: SpreadBoxProps) {
  const hatch = useId();
  return (
    <g class={`spread-band ${kind}`}>
      <SpreadHatch id={hatch} />
      <rect
        class="band"
        fill={spreadFill(kind, hatch)}
        x={x}
        y={y}
        width={Math.max(width, 1)}
        height={height}
      />
    </g>
  );
}

interface SpreadBoxProps {
  readonly kind: SpreadKind;
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

/** Every picture has a hatching of its own: one in a pane that is not shown paints nothing. */
function SpreadHatch({ id }: { readonly id: string }) {
  return (
    <defs>
      <pattern id={id} width="4" height="4" patternUnits="userSpaceOnUse">
        <path class="spread-hatch" d="M-1 1L1 -1M0 4L4 0M3 5L5 3" />
      </pattern>
    </defs>
  );
}

function spreadFill(kind: SpreadKind, hatch: string): string {
  return kind === "error" ? `url(#${hatch})` : "none";
}
