import type { DecidedRoute } from "../core.ts";
import type { LinearScale } from "../format/linear-scale.ts";
import { valueAtDistance } from "../state/along-route.ts";
import type { PageState } from "../state/page-state.ts";
import type { RouteDrawing } from "../worker/protocol.ts";
import { axisOf } from "./along-axis.ts";
import { SpreadBand, SpreadBars } from "./SpreadBand.tsx";
import { alongAxis, errorBetween, membersBetween } from "./spread-between.ts";
import "./spread.css";

interface RibbonSpreadProps {
  readonly page: PageState;
  readonly decided: DecidedRoute;
  readonly drawing: RouteDrawing;
  readonly scale: LinearScale;
  /** Whether the bands under the store line, or the bars over it. */
  readonly under: boolean;
}

/** How sure what is left is, on a ribbon: under a stated error and among members, the one never mixed with the other. */
export function RibbonSpread({ page, decided, drawing, scale, under }: RibbonSpreadProps) {
  const { profile } = drawing;
  if (profile === null) return null;
  const axis = axisOf(profile, page.view.axis.value === "time");
  const ends = Array.from(
    drawing.waypoints,
    (sample) => valueAtDistance(profile.distance_m, axis, drawing.distance_m[sample] ?? 0) ?? 0,
  );
  const shared = { usable: decided.usable, scale };
  const error = alongAxis(decided, ends, errorBetween(decided));
  const members = alongAxis(decided, ends, membersBetween(decided));
  const Part = under ? SpreadBand : SpreadBars;
  return (
    <>
      <Part kind="error" between={error} {...shared} />
      <Part kind="ensemble" between={members} {...shared} />
    </>
  );
}
