import { useSignal } from "@preact/signals";
import type { WindowBest, WindowCell } from "../core.ts";
import type { PageState } from "../state/page-state.ts";
import { BESTS } from "./best-marks.ts";
import { cellText } from "./cell-text.ts";
import { chooseDeparture } from "./heat-places.ts";
import type { Filled } from "./window-fill.ts";

interface BestsProps {
  readonly page: PageState;
  readonly filled: Filled;
  readonly onRefine: () => void;
}

/** The best departures of the window, each to be looked at and chosen, and why routes cannot be done. */
export function Bests({ page, filled, onRefine }: BestsProps) {
  const asked = useSignal<Filled["plan"] | null>(null);
  const { bests, shape, plan } = filled;
  if (bests === null) return null;
  const { summary, refined, inTime } = bests;
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
      {inTime?.routes.map(({ route, speed_m_s, latest, earliest }) => (
        <p key={`${route} ${speed_m_s}`}>
          {latest === null
            ? `${route}: none arrives in time; the earliest, ${cellText(page, earliest, shape)}`
            : `In time at the latest: ${cellText(page, latest, shape)}`}
        </p>
      ))}
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
  const { desk } = page;
  const { shape, plan } = filled;
  const speed = plan.window?.speeds?.[shape.speeds?.indexOf(cell.speed_m_s ?? Number.NaN) ?? -1] ?? null;
  const preview = { departure: cell.departure.replace(".000Z", "Z"), speed };
  const look = (): void => {
    desk.preview.value = preview;
  };
  const leave = (): void => {
    desk.preview.value = null;
  };
  return (
    <li>
      <button
        type="button"
        onPointerEnter={look}
        onPointerLeave={leave}
        onFocus={look}
        onBlur={leave}
        onClick={() =>
          chooseDeparture(
            page,
            preview,
            page.store.plan.peek().routes.findIndex(({ name: own }) => own === cell.route),
          )
        }
      >
        <span class="best-letter" aria-hidden="true">
          {letter}
        </span>
        <span>
          <strong>{name}</strong> {cellText(page, cell, shape)}
        </span>
      </button>
    </li>
  );
}
