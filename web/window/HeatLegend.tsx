import { SPEED_CLASSES, speedColour } from "../format/palette.ts";
import { clockText, durationText } from "../format/time-text.ts";
import { inUnit, storeUnit } from "../format/units.ts";
import type { PageState } from "../state/page-state.ts";
import { figureRange, type Measure } from "./heat-rows.ts";
import { LatestSign } from "./InTimeList.tsx";
import { arrivalToKeep } from "./keep-arrival.ts";
import type { Filled } from "./window-fill.ts";

const NAMES: Record<Measure, string> = { time: "time", use: "use", left: "left" };

interface HeatLegendProps {
  readonly page: PageState;
  readonly filled: Filled;
  readonly measure: Measure;
}

/** What the colours and hatchings of the window stand for. */
export function HeatLegend({ page, filled, measure }: HeatLegendProps) {
  const range = figureRange(filled.cells, measure);
  const arriveBy = arrivalToKeep(filled);
  const amount = storeUnit(filled.shape.storeUnit, filled.shape.usable);
  const text = (value: number): string =>
    measure === "time" ? durationText(value) : `${inUnit(value, amount)} ${amount.symbol}`;
  const [least, most] = range ?? [0, 0];
  const [best, worst] = measure === "left" ? [most, least] : [least, most];
  const classes = Array.from({ length: SPEED_CLASSES }, (_, at) => speedColour(at));
  return (
    <p class="heat-legend">
      {range !== null && (
        <span class="heat-scale">
          {NAMES[measure]} {text(best)}
          <svg width={classes.length * 12} height="10" aria-hidden="true">
            {classes.map((colour, at) => (
              <rect key={colour} x={at * 12} width="12" height="10" fill={colour} />
            ))}
          </svg>
          {text(worst)}
        </span>
      )}
      <span>
        <span class="heat-key broken" aria-hidden="true" /> arrives, but breaks the reserve or a limit
      </span>
      <span>
        <span class="heat-key ends" aria-hidden="true" /> does not arrive
      </span>
      <span>
        <span class="heat-key careful" aria-hidden="true" /> caution
      </span>
      <span>
        <span class="heat-key planned" aria-hidden="true" /> the plan's departure
      </span>
      {arriveBy !== null && (
        <>
          <span>
            <span class="heat-key timely" aria-hidden="true" /> arrives by{" "}
            {clockText(arriveBy, page.view.zone.value, true)}
          </span>
          <span>
            <LatestSign /> the latest departure that does
          </span>
        </>
      )}
    </p>
  );
}
