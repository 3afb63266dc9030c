import { useSignal } from "@preact/signals";
import type { WindowBest, WindowCell } from "../core.ts";
import type { PageState } from "../state/page-state.ts";
import { BESTS } from "./best-marks.ts";
import { cellText } from "./cell-text.ts";
import { DepartureButton } from "./DepartureButton.tsx";
import type { Filled } from "./window-fill.ts";

interface BestsProps {
  readonly page: PageState;
  readonly filled: Filled;
  readonly onRefine: () => void;
}

/** The best departures of the window, each to be looked at and chosen, and why routes cannot be done. */
export function Bests({ page, filled, onRefine }: BestsProps) {
  const asked = useSignal<Filled["plan"] | null>(null);
  const { bests, plan } = filled;
  if (bests === null) return null;
  const { summary, refined } = bests;
  const best: WindowBest = refined?.best ?? summary.best;
  return (
    <div class="bests">
      {summary.possible === 0 ? (
        <p class="none-possible">No departure of the window can be done on any route.</p>
      ) : (
        <ul aria-label="Best departures">
          {BESTS.map(([key, letter, name]) => {
            const cell = best[key];
            return cell === null ? null : (
              <BestItem key={key} page={page} filled={filled} letter={letter} name={name} cell={cell} />
            );
          })}
          {best.closedBy !== null && <li class="quiet">after the latest: {best.closedBy.message}</li>}
        </ul>
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
      {summary.possible > 0 && refined === null && (
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

interface BestItemProps {
  readonly page: PageState;
  readonly filled: Filled;
  readonly letter: string;
  readonly name: string;
  readonly cell: WindowCell;
}

function BestItem({ page, filled, letter, name, cell }: BestItemProps) {
  const sign = (
    <span class="best-letter" aria-hidden="true">
      {letter}
    </span>
  );
  return (
    <li>
      <DepartureButton page={page} filled={filled} cell={cell} sign={sign}>
        <strong>{name}</strong> {cellText(page, cell, filled.shape)}
      </DepartureButton>
    </li>
  );
}
