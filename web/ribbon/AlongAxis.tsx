import { type LinearScale, linearScale } from "../format/linear-scale.ts";
import { durationText } from "../format/time-text.ts";
import { shownUnit } from "../format/units.ts";
import type { PageState } from "../state/page-state.ts";

interface AlongAxisProps {
  readonly page: PageState;
  readonly scale: LinearScale;
  /** Where the axis ends: metres, or seconds. */
  readonly end: number;
  readonly width: number;
}

/** The axis below ribbons and profile, of distance or of time since departure. */
export function AlongAxis({ page, scale, end, width }: AlongAxisProps) {
  const byTime = page.view.axis.value === "time";
  const distance = shownUnit(page.view.units.value, "distance");
  const step = byTime ? (end > 3600 * 3 ? 3600 : 60) : distance.si;
  return (
    <svg class="ribbon-axis" width={width} height="20" aria-hidden="true">
      {axisTicks(end, step, width).map((tick) => (
        <g
          key={tick}
          class={scale(tick) > width - 40 ? "at-end" : ""}
          transform={`translate(${scale(tick)} 0)`}
        >
          <path d="M0 0V4" />
          <text y="15">
            {byTime ? durationText(tick) : `${Number((tick / distance.si).toFixed(6))} ${distance.symbol}`}
          </text>
        </g>
      ))}
    </svg>
  );
}

/** Round places on the axis: round in the shown unit of distance, or in minutes or hours. */
function axisTicks(end: number, step: number, width: number): number[] {
  const count = Math.max(Math.floor(width / 110), 2);
  if (end <= 1e-9) return [];
  return linearScale([0, end / step], [0, width])
    .ticks(count)
    .map((tick) => tick * step);
}
