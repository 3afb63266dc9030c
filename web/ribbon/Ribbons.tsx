import { scaleLinear } from "d3-scale";
import { durationText } from "../format/time-text.ts";
import { shownUnit } from "../format/units.ts";
import { useWidth } from "../shell/use-width.ts";
import { alongLimit } from "../state/along-scale.ts";
import type { PageState } from "../state/page-state.ts";
import { AlongLegend } from "./AlongLegend.tsx";
import { Ribbon } from "./Ribbon.tsx";

const MARGIN = 8;

/** All routes unrolled on one axis, of distance or of time since departure. */
export function Ribbons({ page }: { readonly page: PageState }) {
  const { ref, width } = useWidth<HTMLDivElement>(640);
  const { view, store, answers } = page;
  const answer = answers.answer.value;
  const axis = view.axis.value;
  const profiles = answer.drawings.map((drawing) => drawing?.profile ?? null);
  const farthest = Math.max(
    0,
    ...answer.drawings.map((drawing, at) =>
      axis === "distance" ? (drawing?.distance_m.at(-1) ?? 0) : (profiles[at]?.time_s.at(-1) ?? 0),
    ),
  );
  const scale = scaleLinear()
    .domain([0, Math.max(farthest, 1e-9)])
    .range([MARGIN, Math.max(width - MARGIN, MARGIN + 1)]);
  const limit = alongLimit(answer, shownUnit(view.units.value, "speed").si);

  return (
    <section class="pane ribbons" data-pane="ribbons" aria-labelledby="ribbons-title">
      <header class="pane-head">
        <h2 id="ribbons-title">Ribbons</h2>
        <AlongLegend limit_m_s={limit} units={view.units.value} />
        <fieldset class="choice">
          <legend class="unseen">Axis of the ribbons</legend>
          {(["distance", "time"] as const).map((choice) => (
            <label key={choice}>
              <input
                type="radio"
                name="ribbon-axis"
                checked={axis === choice}
                onChange={() => {
                  view.axis.value = choice;
                }}
              />
              <span>{choice === "distance" ? "Distance" : "Time"}</span>
            </label>
          ))}
        </fieldset>
      </header>
      <div class="ribbon-rows">
        <div ref={ref} class="ribbon-measure" aria-hidden="true" />
        {store.plan.value.routes.map((_, route) => (
          <Ribbon key={route} page={page} route={route} scale={scale} width={width} limit={limit} />
        ))}
        <svg class="ribbon-axis" width={width} height="20" aria-hidden="true">
          {axisTicks(
            farthest,
            axis === "distance" ? shownUnit(view.units.value, "distance").si : null,
            width,
          ).map((tick) => (
            <g
              key={tick}
              class={scale(tick) > width - 40 ? "at-end" : ""}
              transform={`translate(${scale(tick)} 0)`}
            >
              <path d="M0 0V4" />
              <text y="15">{axis === "distance" ? distanceLabel(tick, page) : durationText(tick)}</text>
            </g>
          ))}
        </svg>
      </div>
    </section>
  );
}

/** Round places on the axis: round in the shown unit of distance, or in minutes or hours. */
function axisTicks(farthest: number, unit: number | null, width: number): number[] {
  const count = Math.max(Math.floor(width / 110), 2);
  const step = unit ?? (farthest > 3600 * 3 ? 3600 : 60);
  if (farthest <= 0) return [];
  return scaleLinear()
    .domain([0, farthest / step])
    .ticks(count)
    .map((tick) => tick * step);
}

function distanceLabel(metres: number, { view }: PageState): string {
  const { si, symbol } = shownUnit(view.units.value, "distance");
  const value = metres / si;
  return `${Number(value.toFixed(6))} ${symbol}`;
}
