import type { DecidedRoute } from "../choose/decided.ts";
import type { RoutePlace, TurnBack } from "../choose/turn-back-result.ts";
import { noReturn } from "./turn-back-text.ts";

/** Places of one kind, of which a leg's row has those that lie on it. */
type Places = (turn: TurnBack) => readonly (RoutePlace | null)[];

const COLUMNS: readonly (readonly [header: string, places: Places])[] = [
  ["no return to start at [m]", ({ limits }) => limits.filter(({ goal }) => goal === 0).map(noReturn)],
  [
    "no return to start or any alternate at [m]",
    // Without alternates there is one limit, to the start.
    ({ limits }) => limits.slice(-1).map(noReturn),
  ],
  [
    "equal time to start and destination at [m]",
    ({ equalTime }) =>
      equalTime.filter(({ between }) => between[0] === 0 && between[1] === 1).map(({ place }) => place),
  ],
];

/** Headers with the cell of a route's leg: metres from the leg's start, several with a space between, nothing where none lies on it. */
export const TURN_BACK_COLUMNS: readonly (readonly [
  header: string,
  cell: (route: DecidedRoute, leg: number) => number | string | null,
])[] = COLUMNS.map(([header, places]) => [
  header,
  ({ turnBack }, leg) => {
    const here = turnBack === undefined ? [] : places(turnBack).filter((place) => place?.leg === leg);
    const metres = here.flatMap((place) => (place === null ? [] : [place.at_m]));
    return metres.length > 1 ? metres.join(" ") : (metres[0] ?? null);
  },
]);
