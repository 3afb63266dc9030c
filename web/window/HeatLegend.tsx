import { clockText } from "../format/time-text.ts";
import type { PageState } from "../state/page-state.ts";
import { LatestSign } from "./InTimeList.tsx";
import { arrivalToKeep } from "./keep-arrival.ts";
import type { Filled } from "./window-fill.ts";

interface HeatLegendProps {
  readonly page: PageState;
  readonly filled: Filled;
}

/** What the hatchings and marks of the map stand for. */
export function HeatLegend({ page, filled }: HeatLegendProps) {
  const arriveBy = arrivalToKeep(filled);
  return (
    <p class="heat-legend">
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
