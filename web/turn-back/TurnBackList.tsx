import type { DecidedRoute } from "../core.ts";
import type { PageState } from "../state/page-state.ts";
import { type TurnBackLine, turnBackLines } from "./turn-back-words.ts";
import "./turn-back-list.css";

interface TurnBackListProps {
  readonly page: PageState;
  /** The page's index of the route. */
  readonly at: number;
  readonly route: DecidedRoute;
}

/** Points of no return and equal-time points in words; each leads to its place. */
export function TurnBackList({ page, at, route }: TurnBackListProps) {
  const { turnBack } = route;
  if (turnBack === undefined) return null;
  const lines = turnBackLines(turnBack, route.departure, page.view);
  return (
    <ul class="turn-back-lines">
      {lines.map((line) => (
        <li key={line.text}>
          {line.place === null ? (
            <p>
              <TurnBackSign kind={line.kind} /> {line.text}
            </p>
          ) : (
            <button type="button" onClick={() => goTo(page, at, line)}>
              <TurnBackSign kind={line.kind} />
              <span>{line.text}</span>
            </button>
          )}
        </li>
      ))}
    </ul>
  );
}

const SIGNS: Readonly<Record<TurnBackLine["kind"], string>> = {
  "no-return": "M11 1V15M11 1H2L11 8Z",
  "equal-time": "M8 1L14 8L8 15L2 8Z",
  reach: "M2 8H14",
  unknown: "M2 8H14",
  nowhere: "M3 3L13 13M13 3L3 13",
};

/** The sign of a line, as ribbons and chart draw it. */
function TurnBackSign({ kind }: { readonly kind: TurnBackLine["kind"] }) {
  return (
    <svg class={`turn-sign ${kind}`} width="16" height="16" aria-hidden="true">
      <path d={SIGNS[kind]} />
    </svg>
  );
}

function goTo({ store, view }: PageState, route: number, { place }: TurnBackLine): void {
  if (place === null) return;
  store.select({ route, waypoint: place.leg });
  view.pointed.value = { route, distance_m: place.distance_m };
  view.lookAt.value = { lat: place.lat, lon: place.lon };
}
