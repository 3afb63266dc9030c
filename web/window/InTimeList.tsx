import type { InTime, SureInTime } from "../core.ts";
import { fullTimeText } from "../format/time-text.ts";
import type { PageState } from "../state/page-state.ts";
import { cellText } from "./cell-text.ts";
import { DepartureButton } from "./DepartureButton.tsx";
import { arrivalToKeep } from "./keep-arrival.ts";
import { SureMark } from "./SureMark.tsx";
import type { Filled } from "./window-fill.ts";

interface InTimeListProps {
  readonly page: PageState;
  readonly filled: Filled;
}

/** The latest departure of every route and speed that keeps the window's arrival, to the minute. */
export function InTimeList({ page, filled }: InTimeListProps) {
  const arriveBy = arrivalToKeep(filled);
  const inTime = filled.bests?.inTime ?? null;
  if (inTime === null || arriveBy === null) return null;
  return (
    <div class="bests in-time">
      <p>Latest departures that arrive by {fullTimeText(arriveBy, page.view.zone.value)}</p>
      <ul aria-label="Latest departures in time">
        {inTime.routes.map((own, at) => (
          <InTimeItem
            key={`${own.route} ${own.speed_m_s}`}
            page={page}
            filled={filled}
            own={own}
            tried={filled.sure?.inTime?.[at] ?? null}
          />
        ))}
      </ul>
    </div>
  );
}

interface InTimeItemProps {
  readonly page: PageState;
  readonly filled: Filled;
  readonly own: InTime["routes"][number];
  /** What was made of it in the plan's members and what-ifs; `null` where nothing is tried, or not yet. */
  readonly tried: SureInTime | null;
}

function InTimeItem({ page, filled, own, tried }: InTimeItemProps) {
  const { sure } = filled;
  const { route, latest, earliest } = own;
  if (latest === null)
    return (
      <li>
        <p>
          <strong>{route}: none arrives in time.</strong> The earliest: {cellText(page, earliest, filled)}
        </p>
      </li>
    );
  const held = tried === null ? latest : tried.sure;
  const mark = tried?.sure?.sure ?? null;
  const passed = tried !== null && tried.plain?.departure !== held?.departure ? tried.plain : null;
  return (
    <li>
      {held === null ? (
        <p>
          <strong>{route}: none that holds arrives in time.</strong>
        </p>
      ) : (
        <DepartureButton page={page} filled={filled} cell={held} sign={<LatestSign />}>
          {cellText(page, held, filled)}
          {mark !== null && sure !== null && <SureMark sure={mark} of={sure} />}
        </DepartureButton>
      )}
      {passed !== null && sure !== null && (
        <DepartureButton page={page} filled={filled} cell={passed} sign={<LatestSign isPassed={true} />}>
          <strong>By the plain estimate</strong> {cellText(page, passed, filled)}
          <SureMark sure={passed.sure} of={sure} />
        </DepartureButton>
      )}
    </li>
  );
}

/** The flag that stands on a row of the map at its latest departure in time; an outline of it where that does not hold. */
export function LatestSign({ isPassed = false }: { readonly isPassed?: boolean }) {
  return (
    <svg class={`latest-sign ${isPassed ? "passed" : ""}`} width="14" height="16" aria-hidden="true">
      <path d="M11 1V15M11 2H3L11 8Z" />
    </svg>
  );
}
