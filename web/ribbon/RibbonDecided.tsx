import type { DecidedRoute } from "../core.ts";
import type { LinearScale } from "../format/linear-scale.ts";
import { valueAtDistance } from "../state/along-route.ts";
import type { PageState } from "../state/page-state.ts";
import { RibbonReach } from "../turn-back/RibbonReach.tsx";
import type { RouteDrawing } from "../worker/protocol.ts";
import { axisOf } from "./along-axis.ts";
import { SensitivityStroke } from "./SensitivityStroke.tsx";
import { ensembleBetween, SpreadBand, spreadBetween } from "./SpreadBand.tsx";

interface RibbonDecidedProps {
  readonly page: PageState;
  readonly route: number;
  readonly decided: DecidedRoute;
  readonly drawing: RouteDrawing;
  readonly scale: LinearScale;
}

/** What is decided on top of a route's estimate, on its ribbon. */
export function RibbonDecided({ page, route, decided, drawing, scale }: RibbonDecidedProps) {
  const { view, desk, decisions, store } = page;
  const { profile } = drawing;
  if (profile === null) return null;
  const byTime = view.axis.value === "time";
  const axis = axisOf(profile, byTime);
  const ends = Array.from(
    drawing.waypoints,
    (sample) => valueAtDistance(profile.distance_m, axis, drawing.distance_m[sample] ?? 0) ?? 0,
  );
  const sensitivity = desk.sensitivity.value ? (decisions.decided.value?.sensitivities[route] ?? null) : null;
  const { usable, turnBack } = decided;
  return (
    <>
      <SpreadBand kind="error" between={spreadBetween(decided, ends)} usable={usable} scale={scale} />
      <SpreadBand kind="ensemble" between={ensembleBetween(decided, ends)} usable={usable} scale={scale} />
      {sensitivity !== null && <SensitivityStroke profile={sensitivity} byTime={byTime} scale={scale} />}
      {turnBack !== undefined && (
        <RibbonReach
          turn={turnBack}
          byTime={byTime}
          scale={scale}
          strips={store.selection.value.route === route}
        />
      )}
    </>
  );
}
