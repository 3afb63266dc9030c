import { useSignal } from "@preact/signals";
import { type SureWindow, triedText, type WindowBest } from "../core.ts";
import type { PageState } from "../state/page-state.ts";
import { type ToldBest, toldBests } from "./best-marks.ts";
import { cellText } from "./cell-text.ts";
import { DepartureButton } from "./DepartureButton.tsx";
import { SureMark } from "./SureMark.tsx";
import type { Filled } from "./window-fill.ts";

interface BestsProps {
  readonly page: PageState;
  readonly filled: Filled;
  readonly onRefine: () => void;
}

/** The best departures of the window, each to be looked at and chosen, and why routes cannot be done. */
export function Bests({ page, filled, onRefine }: BestsProps) {
  const asked = useSignal<Filled["plan"] | null>(null);
  const { bests, plan, sure, sureFault, shape } = filled;
  if (bests === null) return null;
  const { summary, refined } = bests;
  const { best, pair } = bestsToTell(filled);
  return (
    <div class="bests">
      {summary.possible === 0 ? (
        <p class="none-possible">No departure of the window can be done on any route.</p>
      ) : (
        <ul aria-label="Best departures">
          {toldBests(pair, best).map((told) => (
            <BestItem key={told.name} page={page} filled={filled} told={told} />
          ))}
          {best.closedBy !== null && <li class="quiet">after the latest: {best.closedBy.message}</li>}
        </ul>
      )}
      {sureFault !== null && (
        <p class="fault" role="alert">
          {sureFault}
        </p>
      )}
      {shape.tried && summary.possible > 0 && sure === null && sureFault === null && (
        <p class="quiet">Trying the bests in every member and what-if of the plan…</p>
      )}
      <ul class="refusals" aria-label="What cannot be done">
        {summary.routes.flatMap(({ route, cells, refused }) =>
          refused.map(({ code, cells: count, message }) => (
            <li key={`${route} ${code}`} class="quiet">
              {route}: {count} of {cells} not possible, the first because {message}
            </li>
          )),
        )}
      </ul>
      {summary.possible > 0 && (refined === null || sure?.refined === null) && (
        <button
          type="button"
          disabled={asked.value === plan}
          onClick={() => {
            asked.value = plan;
            onRefine();
          }}
        >
          {asked.value === plan ? "Refining…" : "Refine the bests to the minute"}
        </button>
      )}
    </div>
  );
}

/** The bests to the minute once they are there: by the plain estimate, or what was made of them in members and what-ifs. */
function bestsToTell({ bests, sure }: Filled): {
  readonly best: Pick<WindowBest, "time" | "use" | "latest" | "closedBy">;
  readonly pair: SureWindow["best"] | null;
} {
  const pair = (sure?.refined ?? sure)?.best ?? null;
  const plain = bests?.refined?.best ?? bests?.summary.best;
  const best = pair?.sure ?? plain;
  if (best === undefined) throw new Error("a window without bests");
  return { best, pair };
}

interface BestItemProps {
  readonly page: PageState;
  readonly filled: Filled;
  readonly told: ToldBest;
}

function BestItem({ page, filled, told: { letter, name, isPassed, cell } }: BestItemProps) {
  const sign = (
    <span class={`best-letter ${isPassed ? "passed" : ""}`} aria-hidden="true">
      {isPassed ? `(${letter})` : letter}
    </span>
  );
  if (cell === null) {
    const tried = filled.sure === null ? null : triedText(filled.sure);
    return (
      <li>
        <p>
          <strong>{name}</strong> none{tried === null ? "" : ` holds ${tried}`}
        </p>
      </li>
    );
  }
  return (
    <li>
      <DepartureButton page={page} filled={filled} cell={cell} sign={sign}>
        <strong>{name}</strong> {cellText(page, cell, filled)}
        {"sure" in cell && filled.sure !== null && <SureMark sure={cell.sure} of={filled.sure} />}
      </DepartureButton>
    </li>
  );
}
