import { shownUnit } from "../format/units.ts";
import { LazyPart } from "../shell/LazyPart.tsx";
import { StaleMark } from "../shell/StaleMark.tsx";
import { useWidth } from "../shell/use-width.ts";
import { alongLimit } from "../state/along-scale.ts";
import type { PageState } from "../state/page-state.ts";
import { AlongAxis } from "./AlongAxis.tsx";
import { AlongLegend } from "./AlongLegend.tsx";
import { alongScale, farthest } from "./along-axis.ts";
import { isSpread, loadSpreadLegend } from "./decided-parts.ts";
import { Ribbon } from "./Ribbon.tsx";

/** All routes unrolled on one axis, of distance or of time since departure. */
export function Ribbons({ page }: { readonly page: PageState }) {
  const { ref, width } = useWidth<HTMLDivElement>(640);
  const { view, store, answers } = page;
  const answer = answers.answer.value;
  const decided = page.routes.value[store.selection.value.route] ?? null;
  const axis = view.axis.value;
  const end = farthest(answer, axis === "time");
  const scale = alongScale(end, width);
  const limit = alongLimit(answer, shownUnit(view.units.value, "speed").si);

  return (
    <section class="pane ribbons" data-pane="ribbons" aria-labelledby="ribbons-title">
      <header class="pane-head">
        <h2 id="ribbons-title">Ribbons</h2>
        <StaleMark page={page} />
        {decided !== null && isSpread(decided) && (
          <LazyPart load={loadSpreadLegend} page={page} decided={decided} />
        )}
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
        <AlongAxis page={page} scale={scale} end={end} width={width} />
      </div>
    </section>
  );
}
