import { useSignal } from "@preact/signals";
import { useEffect, useMemo } from "preact/hooks";
import { type ShownUnit, shownUnit } from "../format/units.ts";
import { Swatch } from "../ribbon/Ribbon.tsx";
import { departingAt } from "../state/departing-at.ts";
import type { Preview } from "../state/desk.ts";
import { estimable } from "../state/estimable.ts";
import { latestWins, SUPERSEDED } from "../state/latest-wins.ts";
import type { PageState } from "../state/page-state.ts";
import type { PlanDocument } from "../state/plan-document.ts";
import type { PaceAnswer } from "../worker/protocol.ts";
import { PaceBests } from "./PaceBests.tsx";
import { PacePlot } from "./PacePlot.tsx";

interface Asked {
  readonly plan: PlanDocument;
  readonly route: number;
}

/** Time and use of the chosen route against the speed through the medium; a click sets the speed. */
export function PaceView({ page }: { readonly page: PageState }) {
  const { store, desk, view } = page;
  const answer = useSignal<PaceAnswer | null>(null);
  const fault = useSignal<string | null>(null);
  const pointed = useSignal<number | null>(null);
  const ask = useMemo(
    () => latestWins(({ plan, route }: Asked) => page.second().paceCurve(plan, route)),
    [page],
  );
  const plan = store.plan.value;
  const { route } = store.selection.value;
  const { landPending } = page.answers.answer.value;

  useEffect(() => {
    const part = estimable(plan);
    const at = part?.routes.indexOf(route) ?? -1;
    if (part === null || at < 0) {
      answer.value = null;
      return;
    }
    void ask({ plan: part.plan, route: at }).then((found) => {
      if (found === SUPERSEDED) return;
      fault.value = found.ok ? null : found.fault;
      answer.value = found.ok ? found : null;
    });
  }, [ask, plan, route, landPending, answer, fault]);
  useEffect(
    () => () => {
      desk.preview.value = null;
    },
    [desk],
  );

  const previewAt = (speed_m_s: number, finely: boolean): Preview => {
    const speed = orderedSpeed(speed_m_s, shownUnit(view.units.value, "speed"), finely);
    return { departure: plan.departure, speed, through: true };
  };
  const look = (speed_m_s: number | null, finely = false): void => {
    pointed.value = speed_m_s;
    desk.preview.value = speed_m_s === null ? null : previewAt(speed_m_s, finely);
  };
  const choose = (speed_m_s: number, finely = false): void => {
    const preview = previewAt(speed_m_s, finely);
    desk.preview.value = null;
    store.edit("Choose speed", (old) => departingAt(old, preview));
    view.announcement.value = `Speed set to ${preview.speed}`;
  };

  if (fault.value !== null) return <p class="fault">{fault.value}</p>;
  if (answer.value === null) return <p class="quiet window-none">Working out the curve…</p>;
  const shared = {
    page,
    answer: answer.value,
    route,
    pointed: pointed.value,
    onLook: look,
    onChoose: choose,
  };
  return (
    <div class="pace-view">
      <h3 class="leg-route">
        <Swatch route={route} /> {plan.routes[route]?.name}
      </h3>
      <div class="pace-plots">
        <PacePlot {...shared} measure="use" />
        <PacePlot {...shared} measure="time" />
      </div>
      <PaceBests {...shared} />
    </div>
  );
}

/** A speed as a plan orders it: to a tenth, or finely to a hundredth and then never above the one found. */
function orderedSpeed(speed_m_s: number, { si, symbol }: ShownUnit, finely: boolean): string {
  const shown = speed_m_s / si;
  // A speed that is a hundredth but for rounding stays one.
  return `${finely ? (Math.floor(shown * 100 + 1e-6) / 100).toFixed(2) : shown.toFixed(1)} ${symbol}`;
}
