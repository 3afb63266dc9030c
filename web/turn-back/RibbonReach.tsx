import type { Reach, RoutePlace, TurnBack } from "../core.ts";
import type { LinearScale } from "../format/linear-scale.ts";
import { BAND_BOTTOM, BAND_TOP, REACH_STEP } from "../ribbon/ribbon-measures.ts";
import { awayGoals, noReturns } from "./turn-back-places.ts";
import "./reach.css";

interface RibbonReachProps {
  readonly turn: TurnBack;
  readonly byTime: boolean;
  readonly scale: LinearScale;
  /** Whether strips of reach have room below the band. */
  readonly strips: boolean;
}

/** Points of no return and equal-time points on a ribbon, and from where each goal is in reach. */
export function RibbonReach({ turn, byTime, scale, strips }: RibbonReachProps) {
  const x = ({ time_s, distance_m }: RoutePlace): number => scale(byTime ? time_s : distance_m);
  return (
    <g class="reach">
      {strips &&
        awayGoals(turn).map((goal, row) =>
          (turn.stretches[goal] ?? []).map(({ reach, from, to }) => (
            <path
              key={`${goal} ${from.time_s}`}
              class={reach}
              d={`M${x(from)} ${stripY(row)}H${Math.max(x(to), x(from) + 0.5)}`}
            />
          )),
        )}
      {turn.equalTime.map(({ between, place }) => (
        <path
          key={`${between}`}
          class="equal-time"
          d={`M${x(place)} ${BAND_TOP - 1}l5 6.5l-5 6.5l-5 -6.5Z`}
        />
      ))}
      {noReturns(turn).map(({ goal, place }) => (
        <path
          key={goal}
          class="no-return"
          d={`M${x(place)} ${BAND_TOP - 5}V${BAND_BOTTOM + 3}M${x(place)} ${BAND_TOP - 5}h-7l7 6Z`}
        />
      ))}
    </g>
  );
}

function stripY(row: number): number {
  return BAND_BOTTOM + 5 + row * REACH_STEP;
}

/** How each state of reach is drawn and called. */
export const REACH_WORDS: readonly (readonly [Reach, string])[] = [
  ["reachable", "in reach, the reserve kept"],
  ["short", "the reserve would be broken"],
  ["cannot", "the craft cannot go there so"],
  ["unknown", "not known, the data end"],
];
