import { LazyPart } from "../shell/LazyPart.tsx";
import type { DeskPart } from "../state/desk.ts";
import type { PageState } from "../state/page-state.ts";
import { loadWindow } from "../window/load-window.ts";
import { DeskTabs } from "./DeskTabs.tsx";
import "./desk-views.css";

type Question = Exclude<DeskPart, "legs">;

const LOADS = {
  window: loadWindow,
  pace: () => import("../pace-curve/PaceView.tsx").then(({ PaceView }) => PaceView),
  "turn-back": () => import("../turn-back/TurnBackView.tsx").then(({ TurnBackView }) => TurnBackView),
  sure: () => import("../spread/SureView.tsx").then(({ SureView }) => SureView),
} as const;

const TITLES: Record<Question, string> = {
  window: "Departures compared",
  pace: "Pace",
  "turn-back": "Turning back and off",
  sure: "How sure it is",
};

/** One of the questions that a decision asks, on the desk in place of the legs. */
export function DeskPane({ page }: { readonly page: PageState }) {
  const { desk, answers } = page;
  const part = desk.part.value;
  const { fault } = answers.answer.value;
  if (part === "legs") return null;
  return (
    <section
      class="pane decide"
      data-pane="decide"
      data-printed={desk.printed.value ? "yes" : undefined}
      aria-label={TITLES[part]}
    >
      <h2 class="only-print">{TITLES[part]}</h2>
      <DeskTabs page={page} legs={false} />
      {/* biome-ignore lint/a11y/noNoninteractiveTabindex: what scrolls must be reached by keyboard (WCAG 2.1.1) */}
      <section class="scroll desk-body" aria-label={`${TITLES[part]}, in full`} tabIndex={0}>
        {/* Where neither the ledger nor the plan's bar is beside it; two of the questions say of themselves what is wrong. */}
        {fault !== null && (part === "turn-back" || part === "sure") && (
          <p class="fault phone-fault" role="alert">
            {fault}
          </p>
        )}
        <LazyPart page={page} load={LOADS[part]} />
      </section>
      <label class="desk-print">
        <input
          type="checkbox"
          checked={desk.printed.value}
          onChange={({ currentTarget: { checked } }) => {
            desk.printed.value = checked;
          }}
        />{" "}
        Print with the leg table
      </label>
    </section>
  );
}
