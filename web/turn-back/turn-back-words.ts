import type { RoutePlace, TurnBack, TurnLimit } from "../core.ts";
import { clockSince, durationText, zoneText } from "../format/time-text.ts";
import { inUnit, shownUnit } from "../format/units.ts";
import type { PageView } from "../state/page-view.ts";
import { goalName } from "./turn-back-places.ts";

/** What turning back comes to, one sentence a line, with the place that it is about. */
export interface TurnBackLine {
  readonly text: string;
  readonly place: RoutePlace | null;
  readonly kind: "no-return" | "equal-time" | "reach" | "unknown" | "nowhere";
}

type Shown = Pick<PageView, "units" | "zone" | "clock">;

const REASONS: Readonly<Record<string, string>> = {
  "outside-time": "the data end in time on the way there",
  "outside-area": "the data end in area on the way there",
  gap: "data are missing on the way there",
  "cannot-hold-track": "the track there cannot be held",
  "outside-power-table": "the power model ends on the way there",
};

/** @param departure of the route, for the times */
export function turnBackLines(turn: TurnBack, departure: string, view: Shown): TurnBackLine[] {
  const where = (place: RoutePlace): string => placeText(place, departure, view);
  const limits = turn.limits.map((limit) => limitLine(turn, limit, where));
  const equal = turn.equalTime.map(
    ({ between: [a, b], place, time_s }): TurnBackLine => ({
      kind: "equal-time",
      place,
      text: `Equal time to ${goalName(turn, a)} and ${goalName(turn, b)}: ${where(place)}, ${durationText(time_s)} to either.`,
    }),
  );
  const nowhere = turn.nowhere.map(
    ({ reach, from, to }): TurnBackLine => ({
      kind: reach === "short" ? "nowhere" : "unknown",
      place: from,
      text:
        reach === "short"
          ? `Nothing is in reach with the reserve kept from ${where(from)} to ${where(to)}.`
          : `Whether anything is in reach is not known from ${where(from)} to ${where(to)}.`,
    }),
  );
  return [...nowhere, ...limits, ...equal];
}

function limitLine(turn: TurnBack, limit: TurnLimit, where: (place: RoutePlace) => string): TurnBackLine {
  const goal = goalName(turn, limit.goal);
  const { last, beyond, notKnownFrom, reason } = limit;
  if (last !== null && (beyond === "short" || beyond === "cannot")) {
    const why = beyond === "short" ? "the reserve would be broken" : "the craft could not go there";
    return {
      kind: "no-return",
      place: last,
      text: `Point of no return, ${goal}: ${where(last)}; beyond it ${why}.`,
    };
  }
  if (notKnownFrom !== null) {
    const why = reason === null ? "the data end" : (REASONS[reason] ?? reason);
    return {
      kind: "unknown",
      place: notKnownFrom,
      text: `${atStart(turn, limit.goal)}: not known from ${where(notKnownFrom)} on, ${why}.`,
    };
  }
  const isNever = last === null;
  const reach = isNever ? "in reach from nowhere on the route" : "in reach from the whole route";
  const kind = isNever ? "nowhere" : "reach";
  return { kind, place: null, text: `${atStart(turn, limit.goal)}: ${reach} with the reserve kept.` };
}

/** A goal's name where a sentence begins with it; an alternate's name stays as it is. */
function atStart(turn: TurnBack, goal: number | null): string {
  const name = goalName(turn, goal);
  const isAlternate = goal !== null && turn.goals[goal]?.kind === "alternate";
  return isAlternate ? name : `${name[0]?.toUpperCase()}${name.slice(1)}`;
}

function placeText(place: RoutePlace, departure: string, { units, zone, clock }: Shown): string {
  const distance = shownUnit(units.value, "distance");
  const time = clockSince(place.time, departure, zone.value, clock.value);
  return `${inUnit(place.distance_m, distance)} ${distance.symbol} from the start, leg ${place.leg}, ${time} ${zone.value === "UTC" ? "UTC" : zoneText(place.time, zone.value)}`;
}
