import { fullTimeText } from "../format/time-text.ts";
import type { PageState } from "../state/page-state.ts";
import { cellText } from "./cell-text.ts";
import { DepartureButton } from "./DepartureButton.tsx";
import { arrivalToKeep } from "./keep-arrival.ts";
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
  const { shape } = filled;
  return (
    <div class="bests in-time">
      <p>Latest departures that arrive by {fullTimeText(arriveBy, page.view.zone.value)}</p>
      <ul aria-label="Latest departures in time">
        {inTime.routes.map(({ route, speed_m_s, latest, earliest }) => (
          <li key={`${route} ${speed_m_s}`}>
            {latest === null ? (
              <p>
                <strong>{route}: none arrives in time.</strong> The earliest:{" "}
                {cellText(page, earliest, shape)}
              </p>
            ) : (
              <DepartureButton page={page} filled={filled} cell={latest} sign={<LatestSign />}>
                {cellText(page, latest, shape)}
              </DepartureButton>
            )}
          </li>
        ))}
      </ul>
    </div>
  );
}

/** The flag that stands on a row of the map at its latest departure in time. */
export function LatestSign() {
  return (
    <svg class="latest-sign" width="14" height="16" aria-hidden="true">
      <path d="M11 1V15M11 2H3L11 8Z" />
    </svg>
  );
}
