import { useSignal } from "@preact/signals";
import { useEffect, useRef } from "preact/hooks";
import { latText, lonText } from "../format/position-text.ts";
import { inUnit, shownUnit } from "../format/units.ts";
import type { PageState } from "../state/page-state.ts";
import { type PageView, shownLevel } from "../state/page-view.ts";
import type { FieldAt } from "../worker/protocol.ts";
import { type ChartSession, openChart } from "./chart-session.ts";
import type { ReadPlace } from "./read-place.ts";
import { ShadingLegend } from "./ShadingLegend.tsx";
import { scaleBar } from "./scale-bar.ts";
import { UnderPointer } from "./UnderPointer.tsx";

/** The chart with its tools and read-outs. The table of waypoints is its equivalent for those who can't see it. */
export function Chart({ page }: { readonly page: PageState }) {
  const host = useRef<HTMLDivElement>(null);
  const session = useRef<ChartSession | null>(null);
  const place = useSignal<ReadPlace | null>(null);
  const under = useSignal<readonly FieldAt[]>([]);
  const levels = useSignal<readonly number[]>([]);
  const metresPerPx = useSignal(1);
  const shadingLimit = useSignal<number | null>(null);

  useEffect(() => {
    if (!host.current) return;
    const opened = openChart(host.current, page, { place, under, metresPerPx, shadingLimit });
    session.current = opened;
    return () => opened.close();
  }, [page, place, under, metresPerPx, shadingLimit]);
  const fields = page.answers.answer.value.estimate?.fields;
  useEffect(() => {
    if (fields === undefined) return;
    void page.engine.levels().then((found) => {
      levels.value = found.heights;
      page.view.routesLevel.value = found.ofRoutes;
    });
  }, [fields, page, levels]);

  const { view } = page;
  const bar = scaleBar(metresPerPx.value, shownUnit(view.units.value, "distance").si, 120);
  const read = place.value;
  return (
    <div class="chart">
      <section ref={host} class="chart-map" id="chart" aria-label="Chart" aria-describedby="chart-keys" />
      <p id="chart-keys" class="unseen">
        Arrow keys move the chart, plus and minus zoom it; what the fields say in its middle is told.
      </p>
      <p id="handle-keys" class="unseen">
        Arrow keys move it, with Shift in fine steps; Insert adds a waypoint on the next leg; Delete removes
        it.
      </p>
      <div class="chart-tools" role="toolbar" aria-label="Chart tools">
        <button type="button" aria-label="Zoom in" onClick={() => session.current?.zoom(1)}>
          +
        </button>
        <button type="button" aria-label="Zoom out" onClick={() => session.current?.zoom(-1)}>
          −
        </button>
        <button type="button" onClick={() => session.current?.fitRoutes()}>
          Show all
        </button>
        <button
          type="button"
          aria-pressed={view.adding.value}
          title="Click or tap the chart to add waypoints to the chosen route; Enter adds one at the middle"
          onClick={() => {
            view.adding.value = !view.adding.value;
          }}
        >
          Add waypoints
        </button>
        <label class="chart-shade">
          Shade{" "}
          <select
            value={view.shading.value}
            onChange={(event) => {
              const { value } = event.currentTarget;
              if (value === "none" || value === "wind" || value === "current") view.shading.value = value;
            }}
          >
            <option value="none">nothing</option>
            <option value="current">current</option>
            <option value="wind">wind</option>
          </select>
        </label>
        <LevelChoice view={view} levels={levels.value} />
      </div>
      <ShadingLegend limit_m_s={shadingLimit.value} units={view.units.value} />
      <div class="chart-scale" aria-hidden="true">
        <svg width={bar.px + 2} height="7">
          <title>Scale</title>
          <path d={`M1 0V6H${bar.px + 1}V0`} />
        </svg>
        {bar.value} {shownUnit(view.units.value, "distance").symbol}
      </div>
      {/* A mouse moves too fast to be told of. */}
      <output
        class="chart-position"
        aria-label="What the fields say here"
        aria-live={read?.by === "mouse" ? "off" : "polite"}
        aria-atomic="true"
      >
        {read !== null && (
          <>
            <UnderPointer fields={under.value} units={view.units.value} />
            <span>{`${latText(read.lat)}  ${lonText(read.lon)}`}</span>
          </>
        )}
      </output>
    </div>
  );
}

/** The height of the fields on the chart, where they have more than one. */
function LevelChoice({ view, levels }: { readonly view: PageView; readonly levels: readonly number[] }) {
  if (levels.length < 2) return null;
  const unit = shownUnit(view.units.value, "height");
  const level = shownLevel(view) ?? levels[0] ?? 0;
  return (
    <label class="chart-shade">
      Height{" "}
      <select
        value={level}
        onChange={({ currentTarget: { value } }) => {
          view.level.value = Number(value);
        }}
      >
        {levels.map((height) => (
          <option key={height} value={height}>
            {inUnit(height, unit)} {unit.symbol}
          </option>
        ))}
      </select>
    </label>
  );
}
