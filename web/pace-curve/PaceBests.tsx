import type { WindowCell } from "../core.ts";
import { clockSince, durationText } from "../format/time-text.ts";
import { inUnit, shownUnit, storeUnit } from "../format/units.ts";
import type { PageState } from "../state/page-state.ts";
import type { PaceAnswer } from "../worker/protocol.ts";

interface PaceBestsProps {
  readonly page: PageState;
  readonly answer: PaceAnswer;
  readonly onLook: (speed_m_s: number | null, finely?: boolean) => void;
  readonly onChoose: (speed_m_s: number, finely?: boolean) => void;
}

/** The speed of least use and the fastest that keeps the reserve, each to be looked at and set. */
export function PaceBests({ page, answer, onLook, onChoose }: PaceBestsProps) {
  const { view } = page;
  const { least, fastest, curve } = answer;
  const unit = shownUnit(view.units.value, "speed");
  const amount = storeUnit(curve.storeUnit, curve.usable);
  const words = (cell: WindowCell, bound: string | null): string =>
    `${inUnit(cell.speed_m_s, unit)} ${unit.symbol}${bound === null ? "" : ` (${bound})`}: ${durationText(cell.passage_s, view.clock.value)}, arrives ${
      cell.arrival === null
        ? "–"
        : clockSince(cell.arrival, cell.departure, view.zone.value, view.clock.value)
    }, uses ${inUnit(cell.use, amount)} ${amount.symbol}, ${inUnit(cell.remaining, amount)} left`;
  const item = (
    letter: string,
    name: string,
    cell: WindowCell | null,
    bound: string | null,
    none: string,
  ) => (
    <li>
      {cell === null ? (
        <p class="none-possible">{none}</p>
      ) : (
        <button
          type="button"
          onPointerEnter={() => onLook(cell.speed_m_s, true)}
          onPointerLeave={() => onLook(null)}
          onFocus={() => onLook(cell.speed_m_s, true)}
          onBlur={() => onLook(null)}
          onClick={() => cell.speed_m_s !== null && onChoose(cell.speed_m_s, true)}
        >
          <span class="best-letter" aria-hidden="true">
            {letter}
          </span>
          <span>
            <strong>{name}</strong> {words(cell, bound)}
            {cell.status === "stop" && cell.worst !== null && `; cannot be done: ${cell.worst.message}`}
          </span>
        </button>
      )}
    </li>
  );
  return (
    <ul class="bests" aria-label="Speeds to choose">
      {item("U", "Least use", least, answer.leastBound, "No speed completes the route.")}
      {item(
        "F",
        "Fastest that keeps the reserve",
        fastest,
        answer.fastestBound,
        "No speed of the craft's keeps the reserve.",
      )}
    </ul>
  );
}
