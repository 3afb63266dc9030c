import type { DecidedRoute } from "../core.ts";
import type { LinearScale } from "../format/linear-scale.ts";
import type { PageState } from "../state/page-state.ts";
import { RibbonReach } from "../turn-back/RibbonReach.tsx";
import type { RouteDrawing } from "../worker/protocol.ts";
import { RibbonSpread } from "./RibbonSpread.tsx";
import { SensitivityStroke } from "./SensitivityStroke.tsx";

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
  const sensitivity = desk.sensitivity.value ? (decisions.decided.value?.sensitivities[route] ?? null) : null;
  const { turnBack } = decided;
  return (
    <>
      <RibbonSpread page={page} decided={decided} drawing={drawing} scale={scale} under={false} />
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
