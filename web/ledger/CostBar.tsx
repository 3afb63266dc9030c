import type { RouteEstimate } from "../core.ts";
import { durationText, signedDurationText } from "../format/time-text.ts";
import { costBar } from "./cost-bar.ts";

/** A route's time as one stacked bar on the ledger's common scale, and the same in figures. */
export function CostBar({ route, end }: { readonly route: RouteEstimate; readonly end: number }) {
  const { still, penalty, stay_s } = route.totals;
  const words = [
    `still ${durationText(still.time_s)}`,
    ...(penalty === null
      ? []
      : [
          `along ${signedDurationText(penalty.alongTime_s)}`,
          `cross ${signedDurationText(penalty.crossTime_s)}`,
        ]),
    ...(stay_s > 0 ? [`stays ${durationText(stay_s)}`] : []),
    // A figure is not torn apart at the end of a line.
  ].map((part) => part.replaceAll(" ", "\u00A0"));
  return (
    <div class="cost-bar">
      <div class="bar" aria-hidden="true">
        {costBar(route).map(({ kind, from, to }) => (
          <span
            key={kind}
            class={kind}
            style={{ left: `${(100 * from) / end}%`, width: `${(100 * (to - from)) / end}%` }}
          />
        ))}
      </div>
      <p>{words.join(" · ")}</p>
    </div>
  );
}
