import type { BestBy } from "../choose/rank.ts";
import type { BestPair, Sure, SureCell } from "../choose/sure.ts";
import type { SureInTime } from "../choose/sure-in-time.ts";
import type { SureWindow } from "../choose/sure-window.ts";
import type { WindowCell } from "../choose/window-cell.ts";
import type { RouteStatus } from "../estimate/result.ts";
import { type Column, TABLE_WIDTH } from "./columns.ts";
import { NO_FIGURE } from "./number-text.ts";
import { percentText } from "./percent-text.ts";
import { isolated, plainText, wrapped } from "./plain-text.ts";
import { fateText, triedText } from "./sure-text.ts";
import { figureText } from "./table-units.ts";
import { instantText } from "./time-text.ts";
import type { WindowUnits } from "./window-units.ts";

const WORDS: readonly (readonly [BestBy, string])[] = [
  ["time", "the quickest"],
  ["use", "the one of least use"],
  ["latest", "the latest"],
];

/** A best by the plain estimate that does not hold, and what it is the best by. */
interface PassedOver {
  readonly cell: SureCell;
  readonly by: BestBy[];
}

/**
 * Sentences on the bests by the plain estimate that do not hold: which they are, and what breaks them; first of all routes, then for each
 * those that were not told.
 */
export function passedOverLines(sure: SureWindow, units: WindowUnits): string[] {
  const { best, routes } = sure.refined ?? sure;
  const several = routes.length > 1;
  const overall = passedOver(best);
  const told = new Set(overall.flatMap(({ cell, by }) => by.map((each) => `${each} ${cellKey(cell)}`)));
  const lines = sentence(several ? "Of all, " : "", several, overall, units);
  if (!several) return lines;
  return [
    ...lines,
    ...routes.flatMap((own) => {
      const rest = passedOver(own).flatMap(({ cell, by }) => {
        const untold = by.filter((each) => !told.has(`${each} ${cellKey(cell)}`));
        return untold.length === 0 ? [] : [{ cell, by: untold }];
      });
      const none = own.plain.time !== null && own.sure.time === null ? "no departure holds; " : "";
      return sentence(`${isolated(plainText(own.route))}: ${none}`, false, rest, units);
    }),
  ];
}

function passedOver({ plain, sure }: BestPair): PassedOver[] {
  const found = new Map<string, PassedOver>();
  for (const [by] of WORDS) {
    const cell = plain[by];
    const own = sure[by];
    if (cell === null || (own !== null && cellKey(own) === cellKey(cell))) continue;
    const known = found.get(cellKey(cell)) ?? { cell, by: [] };
    known.by.push(by);
    found.set(cellKey(cell), known);
  }
  return [...found.values()];
}

function cellKey({ route, departure, speed_m_s }: WindowCell): string {
  return JSON.stringify([route, departure, speed_m_s]);
}

function sentence(lead: string, naming: boolean, cells: readonly PassedOver[], units: WindowUnits): string[] {
  if (cells.length === 0) return [];
  const parts = cells.map(({ cell, by }) => {
    const words = WORDS.flatMap(([each, word]) => (by.includes(each) ? [word] : []));
    const what = words.join(", ").replace(/, (?=[^,]*$)/, " and ");
    const route = naming ? `${isolated(plainText(cell.route))}, ` : "";
    return `${what}, ${route}${whenText(cell, units)}, ${fateText(cell.sure)}`;
  });
  const text = `${lead}${parts.join("; ")}.`;
  return wrapped(text.replace(/^t/, "T"), TABLE_WIDTH);
}

/** `2027-05-04 06:00 UTC at 8.0 kn` */
function whenText({ departure, speed_m_s }: WindowCell, { speed, speeds }: WindowUnits): string {
  const at = speed_m_s === null || !speeds ? "" : ` at ${figureText(speed_m_s, speed)}`;
  return `${instantText(departure, "minute")}${at}`;
}

/** Sentences on the latest departures in time by the plain estimate that do not hold, or are too late in a member or what-if. */
export function lateLines(inTime: readonly SureInTime[], units: WindowUnits): string[] {
  return inTime.flatMap(({ route, plain, sure }) => {
    if (plain === null || (sure !== null && cellKey(plain) === cellKey(sure))) return [];
    const none = sure === null ? "no departure holds and arrives in time; " : "";
    const text = `${isolated(plainText(route))}: ${none}the latest in time, ${whenText(plain, units)}, ${fateText(plain.sure)}.`;
    return wrapped(text, TABLE_WIDTH);
  });
}

/** How sure each of some bests is: the probability that its reserve holds, and a mark; nothing where there is neither. */
export function sureColumn(cells: readonly WindowCell[]): Column[] {
  const all = cells.map((cell): Sure | null => ("sure" in cell ? (cell as SureCell).sure : null));
  const stated = all.some((sure) => sure !== null && sure.reserveHolds !== null);
  const marked = all.some((sure) => sure !== null && sure.status !== "clear");
  if (!stated && !marked) return [];
  const mark = (sure: Sure | null): string => (marked ? MARKS[sure?.status ?? "clear"] : "");
  const chance = (sure: Sure | null): string =>
    sure === null || sure.reserveHolds === null ? (stated ? NO_FIGURE : "") : shareText(sure.reserveHolds);
  return [
    {
      head: stated ? ["Holds", marked ? "% " : "%"] : ["", ""],
      cells: all.map((sure) => `${chance(sure)}${mark(sure)}`),
    },
  ];
}

const MARKS: Readonly<Record<RouteStatus, string>> = { clear: " ", caution: "!", stop: "x" };

/** A share in percent: `98`, `99.9`, `>99.9`; 0 and 100 only where it is. */
function shareText(share: number): string {
  return percentText(share).replace("less than ", "<").replace("more than ", ">").replace(" %", "");
}

/** What the column says, and in what the bests were tried. */
export function sureLegend(sure: SureWindow, cells: readonly WindowCell[]): string[] {
  const [column] = sureColumn(cells);
  const tried = triedText(sure);
  const statuses = cells.flatMap((cell) => ("sure" in cell ? [(cell as SureCell).sure.status] : []));
  const parts = [
    tried === null ? [] : [`Bests of the departures that hold ${tried}.`],
    column?.head[0] === "Holds"
      ? ["Holds: probability that the reserve does, under the stated forecast error."]
      : [],
    statuses.includes("caution") ? ["! with cautions, there too."] : [],
    statuses.includes("stop") ? ["x does not hold."] : [],
  ].flat();
  return parts.length === 0 ? [] : wrapped(parts.join(" "), TABLE_WIDTH);
}
