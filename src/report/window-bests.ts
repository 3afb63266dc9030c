import type { PaceBound } from "../choose/pace-bound.ts";
import type { RoutePaces } from "../choose/route-paces.ts";
import type { WindowCell } from "../choose/window-cell.ts";
import type { RouteSummary, WindowBest } from "../choose/window-summary.ts";
import { type Column, laidOut, leastWidth, TABLE_WIDTH } from "./columns.ts";
import { NO_FIGURE, placedText } from "./number-text.ts";
import { clipped, isolated, plainText, wrapped } from "./plain-text.ts";
import { inLastPlace, leftInLastPlace } from "./rounding.ts";
import { boundText, triedText } from "./sure-text.ts";
import { figureText } from "./table-units.ts";
import { clockSeconds, durationText, etaText, instantText } from "./time-text.ts";
import type { WindowReport } from "./window-input.ts";
import { reasonWord } from "./window-matrix.ts";
import { lateLines, passedOverLines, sureColumn, sureLegend } from "./window-sure.ts";
import type { WindowUnits } from "./window-units.ts";

const STORE_WIDTH = 7;

interface Row {
  readonly what: string;
  readonly cell: WindowCell;
}

function rowsOf(best: WindowBest): Row[] {
  const all: readonly [string, WindowCell | null][] = [
    ["least time", best.time],
    ["least use", best.use],
    ["latest", best.latest],
  ];
  return all.flatMap(([what, cell]) => (cell === null ? [] : [{ what, cell }]));
}

function columnsOf(rows: readonly Row[], units: WindowUnits): Column[] {
  const { speed, store, clock } = units;
  const amount = (value: number | null, round: (value: number, decimals: number) => number) =>
    placedText(
      value === null ? null : round(value / store.size, store.decimals),
      store.decimals,
      STORE_WIDTH,
    );
  const speedText = ({ speed_m_s }: WindowCell) =>
    speed_m_s === null ? NO_FIGURE : (speed_m_s / speed.size).toFixed(speed.decimals);
  const timeText = ({ passage_s }: WindowCell) =>
    durationText(passage_s === null ? null : Math.round(passage_s / clockSeconds(clock)), clock, 8);
  const speeds: Column[] = units.speeds
    ? [{ head: ["Speed", speed.symbol], cells: rows.map(({ cell }) => speedText(cell)) }]
    : [];
  return [
    ...speeds,
    { head: ["ETD", "dd hh:mm"], cells: rows.map(({ cell }) => etaText(cell.departure, "minute")) },
    {
      head: ["ETA", clock === "minute" ? "dd hh:mm" : "hh:mm:ss"],
      cells: rows.map(({ cell }) => etaText(cell.arrival, clock)),
    },
    {
      head: ["Time", clock === "minute" ? "h:mm" : "h:mm:ss"],
      cells: rows.map(({ cell }) => timeText(cell)),
    },
    { head: ["Use", store.symbol], cells: rows.map(({ cell }) => amount(cell.use, inLastPlace)) },
    { head: ["Left", store.symbol], cells: rows.map(({ cell }) => amount(cell.remaining, leftInLastPlace)) },
    ...sureColumn(rows.map(({ cell }) => cell)),
  ];
}

/** The latest departures that arrive in time, as rows, and a line for every route and speed that has none. */
function inTimeOf({ inTime, sure }: WindowReport, units: WindowUnits): { rows: Row[]; missed: string[] } {
  const found = inTime?.routes ?? [];
  const held = sure?.inTime?.map((own) => own.sure) ?? found.map(({ latest }) => latest);
  const rows = held.flatMap((cell) => (cell === null ? [] : [{ what: "in time", cell }]));
  const missed = found.flatMap(({ route, speed_m_s, latest, earliest }) => {
    if (latest !== null || inTime === null) return [];
    const at = speed_m_s === null ? "" : ` at ${figureText(speed_m_s, units.speed)}`;
    const why =
      earliest.arrival === null || earliest.status === "stop"
        ? (earliest.worst?.message ?? "")
        : `it arrives ${instantText(earliest.arrival, "minute")}`;
    const text = `${plainText(route)}${at}: no departure arrives by ${instantText(inTime.notAfter, "minute")}; the first, ${instantText(earliest.departure, "minute")}: ${plainText(why)}.`;
    return wrapped(text, TABLE_WIDTH);
  });
  return { rows, missed };
}

/** Per route and at its best departure by use, the bests among all speeds of the craft's range. */
function pacesOf({ paces, sure }: WindowReport): Row[] {
  return (sure?.paces ?? paces ?? []).flatMap((own) => {
    const { leastUse, fastest } = own;
    const held = "sureFastest" in own && own.sureFastest !== fastest ? own.sureFastest : null;
    return [
      ...(leastUse === null ? [] : [{ what: "any speed, use", cell: leastUse }]),
      ...(fastest === null ? [] : [{ what: "any, fastest", cell: fastest }]),
      ...(held === null ? [] : [{ what: "fastest held", cell: held }]),
    ];
  });
}

/** The bests of all cells and of each route, to the minute where that was asked for; those that hold, where they were put to the test. */
function bestsOf({ summary, refined, sure }: WindowReport): {
  readonly best: WindowBest;
  readonly routes: readonly WindowBest[];
} {
  if (sure === undefined || sure === null) {
    const { best, routes } = refined ?? summary;
    return { best, routes: routes.map((route) => route.best) };
  }
  const { best, routes } = sure.refined ?? sure;
  return { best: best.sure, routes: routes.map((route) => route.sure) };
}

/** The bests of all cells, and of each route where there are several. */
export function windowBests(report: WindowReport, units: WindowUnits): string[] {
  const { inTime, sure = null } = report;
  const { best, routes: own } = bestsOf(report);
  const several = own.length > 1;
  const overall = rowsOf(best);
  const late = inTimeOf(report, units);
  const rows = [...overall, ...(several ? own.flatMap(rowsOf) : []), ...late.rows, ...pacesOf(report)];
  const passed =
    sure === null ? [] : [...passedOverLines(sure, units), ...lateLines(sure.inTime ?? [], units)];
  if (rows.length === 0) return [...wrapped(noneText(report), TABLE_WIDTH), ...passed, ...late.missed];
  const rest = columnsOf(rows, units);
  const whats = rows.map(({ what }, index) => (index < overall.length ? `of all, ${what}` : what));
  const bests: Column = {
    head: ["", "Best"],
    cells: several ? whats : rows.map(({ what }) => what),
    align: "left",
  };
  const room = TABLE_WIDTH - leastWidth([bests, ...rest]);
  const names = rows.map(({ cell }) => isolated(clipped(plainText(cell.route), room)));
  const { head, rows: lines } = laidOut(
    [bests, { head: ["", "Route"], cells: names, align: "left" }, ...rest],
    0,
  );
  const kept =
    inTime === null
      ? []
      : [`In time: the latest departure that arrives by ${instantText(inTime.notAfter, "minute")}.`];
  const any = pacesText(report, units);
  const tried =
    sure === null
      ? []
      : sureLegend(
          sure,
          rows.map(({ cell }) => cell),
        );
  return [...head, ...lines, ...tried, ...closing(best), ...passed, ...kept, ...any, ...late.missed];
}

function noneText({ summary, sure }: WindowReport): string {
  const tried = sure === undefined || sure === null ? null : triedText(sure);
  return tried === null || summary.possible === 0
    ? "Nothing in the window can be done."
    : `Nothing in the window holds ${tried}.`;
}

function pacesText({ paces, sure }: WindowReport, units: WindowUnits): string[] {
  if (paces === null) return [];
  const any =
    "Any speed: of the craft's whole range, at the route's departure of least use; least use, and the fastest that keeps the reserve.";
  const tried = sure === undefined || sure === null ? null : triedText(sure);
  const lines = [...wrapped(any, TABLE_WIDTH), ...paces.flatMap((own) => boundLines(own, units))];
  if (tried === null) return lines;
  const own = sure?.paces ?? [];
  const held = own.some(({ fastest, sureFastest }) => sureFastest !== null && sureFastest !== fastest);
  const none = own.flatMap(({ route, sureFastest }) => (sureFastest === null ? [route] : []));
  return [
    ...lines,
    ...(held
      ? wrapped(
          `Fastest held: the fastest that holds ${tried}, at the route's departure of least use that does.`,
          TABLE_WIDTH,
        )
      : []),
    ...none.flatMap((route) =>
      wrapped(`${isolated(plainText(route))}: no speed holds ${tried}.`, TABLE_WIDTH),
    ),
  ];
}

/** What keeps a route's speeds from being true bests: of the craft, or of what is known of the field. */
function boundLines(
  { route, leastUse, leastUseBound, fastest, fastestBound }: RoutePaces,
  { speed }: WindowUnits,
): string[] {
  const told = (what: string, cell: WindowCell | null, bound: PaceBound | null): string[] =>
    cell === null || cell.speed_m_s === null || bound === null
      ? []
      : [`${what} at ${figureText(cell.speed_m_s, speed)}, ${boundText(bound)}`];
  const parts = [
    ...told("least use", leastUse, leastUseBound),
    ...told("fastest", fastest, fastestBound),
  ].join("; ");
  return parts === "" ? [] : wrapped(`${isolated(plainText(route))}, any speed: ${parts}.`, TABLE_WIDTH);
}

function closing({ latest, closedBy }: WindowBest): string[] {
  if (latest === null) return [];
  const text =
    closedBy === null
      ? "The window ends with the latest departure: later ones were not tried."
      : `After the latest departure, on the same route: ${plainText(closedBy.message)}.`;
  return wrapped(text, TABLE_WIDTH);
}

/** Why cells cannot be done, route by route; nothing where all can. */
export function refusalLines(routes: readonly RouteSummary[]): string[] {
  const lines = routes.flatMap(({ route, cells, possible, refused }) => {
    if (refused.length === 0) return [];
    const name = isolated(clipped(plainText(route), 40));
    return [
      `${name}: ${cells - possible} of ${cells} cannot be done`,
      ...refused.flatMap(({ code, cells: count, from, to, message }) => {
        const first = instantText(from, "minute");
        const span =
          from === to ? first : `first ${first.replace(" UTC", "")}, last ${instantText(to, "minute")}`;
        return wrapped(
          `${count}, ${span}: ${plainText(message)}`,
          TABLE_WIDTH,
          `  ${reasonWord(code).padEnd(12)}`,
        );
      }),
    ];
  });
  return lines.length === 0 ? [] : ["Why", ...lines];
}
