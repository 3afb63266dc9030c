import type { DecidedRoute } from "../choose/decided.ts";
import type { Goal, RoutePlace, TurnBack, TurnLimit } from "../choose/turn-back-result.ts";
import { type Column, laidOut, leastWidth, TABLE_WIDTH } from "./columns.ts";
import { placedText } from "./number-text.ts";
import { clipped, wrapped } from "./plain-text.ts";
import { positionText } from "./position-text.ts";
import { inLastPlace } from "./rounding.ts";
import { figureText, LENGTH_WIDTH, type TableUnits } from "./table-units.ts";
import { clockSeconds, durationText, etaText } from "./time-text.ts";
import { goalText, limitText, noReturn, reasonText } from "./turn-back-text.ts";

interface Row {
  readonly what: string;
  readonly place: RoutePlace;
  /** Time to go from there, s. */
  readonly toGo: number | null;
}

/** Most room for what a row is of. */
const WHAT_WIDTH = 27;

function rowsOf(turn: TurnBack): Row[] {
  const name = (goal: number) => goalText(turn.goals[goal] as Goal);
  const limits = turn.limits.flatMap((limit) => {
    const place = noReturn(limit);
    // Where any of them is last reached, the one that is stands in the table already.
    if (place === null || limit.goal === null) return [];
    return [{ what: `No return: ${limitText(turn, limit)}`, place, toGo: null }];
  });
  const equal = turn.equalTime.map(({ between: [a, b], place, time_s }) => ({
    what: `Equal: ${name(a)}, ${name(b)}`,
    place,
    toGo: time_s,
  }));
  const nowhere = turn.nowhere.flatMap(({ reach, from, to }) => {
    const what = reach === "short" ? "Nothing in reach" : "Reach not known";
    return [
      { what: `${what} from`, place: from, toGo: null },
      { what: `${what} to`, place: to, toGo: null },
    ];
  });
  return [...limits, ...equal, ...nowhere].sort((p, q) => p.place.time_s - q.place.time_s);
}

/** What the points cannot say of a limit. */
function sentence(turn: TurnBack, limit: TurnLimit, units: TableUnits): string[] {
  const name = limitText(turn, limit);
  const goal = `${name[0]?.toUpperCase()}${name.slice(1)}`;
  const { last, beyond, notKnownFrom, reason } = limit;
  if (last !== null && beyond === null) return [`${goal}: in reach from the whole way.`];
  if (last === null && notKnownFrom === null) return [`${goal}: in reach from nowhere on the way.`];
  if (notKnownFrom === null) return [];
  const from = distanceText(notKnownFrom.distance_m, units);
  return [`${goal}: not known from ${from} on, ${reasonText(reason)} on the way there.`];
}

/** Where a limit of the craft is first broken on the way to a goal that is arrived at. */
function brokenLimits({ goals, samples }: TurnBack, units: TableUnits): string[] {
  return samples.goals.flatMap(({ limit }, goal) => {
    const first = limit.findIndex((code) => code !== null);
    if (first < 0) return [];
    const code = limit[first] === "gust-limit" ? "gust" : "wind";
    const name = goalText(goals[goal] as Goal);
    const from = distanceText(samples.distance_m[first] ?? 0, units);
    return [`The way to ${name} breaks the craft's ${code} limit, first from the sample ${from}.`];
  });
}

function distanceText(distance: number, { length }: TableUnits): string {
  return `${figureText(distance, length)} from the start`;
}

/** Where a row's place is, when, and how far it is from there. */
function placeColumns(rows: readonly Row[], { length, clock, finePositions, system }: TableUnits): Column[] {
  const toGo = (seconds: number | null) =>
    seconds === null ? "" : durationText(Math.round(seconds / clockSeconds(clock)), clock, 7);
  return [
    { head: ["", "Leg"], cells: rows.map(({ place }) => String(place.leg)) },
    {
      head: ["From start", length.symbol],
      cells: rows.map(({ place }) =>
        placedText(
          inLastPlace(place.distance_m / length.size, length.decimals),
          length.decimals,
          LENGTH_WIDTH + 1,
        ),
      ),
    },
    {
      head: ["At UTC", clock === "minute" ? "dd hh:mm" : "hh:mm:ss"],
      cells: rows.map(({ place }) => etaText(place.time, clock)),
    },
    { head: ["To go", clock === "minute" ? "h:mm" : "h:mm:ss"], cells: rows.map((row) => toGo(row.toGo)) },
    {
      head: ["", "Position"],
      cells: rows.map(({ place }) => positionText(place.lat, place.lon, system, finePositions)),
      align: "left",
    },
  ];
}

/** How far a route can still turn back or off: points of no return, equal-time points, and where nothing is in reach. */
export function turnBackTable({ turnBack: turn }: DecidedRoute, units: TableUnits): string[] {
  if (turn === undefined) return [];
  const rows = rowsOf(turn);
  const columns = placeColumns(rows, units);
  const room = Math.min(WHAT_WIDTH, TABLE_WIDTH - leastWidth(columns));
  const names = rows.map(({ what }) => clipped(what, room));
  const { head, rows: lines } = laidOut(
    [{ head: ["", "Point"], cells: names, align: "left" }, ...columns],
    0,
  );
  return [
    "Turning back, at once and without stays, the reserve kept",
    ...(rows.length === 0 ? [] : [...head, ...lines]),
    ...[
      ...turn.limits.flatMap((limit) => sentence(turn, limit, units)),
      ...brokenLimits(turn, units),
    ].flatMap((text) => wrapped(text, TABLE_WIDTH)),
  ];
}
