import type { WindowCell } from "../choose/window-cell.ts";
import { isPossible, type WindowBest } from "../choose/window-summary.ts";
import type { FindingCode } from "../estimate/result.ts";
import { TABLE_WIDTH } from "./columns.ts";
import { NO_FIGURE, placedText } from "./number-text.ts";
import { clipped, displayWidth, isolated, leftAligned, plainText, rightAligned } from "./plain-text.ts";
import { leftInLastPlace } from "./rounding.ts";
import { figureText } from "./table-units.ts";
import { clockSeconds, clockText } from "./time-text.ts";
import { bestWords } from "./window-csv.ts";
import type { WindowReport } from "./window-input.ts";
import type { WindowUnits } from "./window-units.ts";

/** Between two candidates. */
const GAP = 2;
const STORE_WIDTH = 6;
/** An arrival in minutes, the mark of a later day beside it; one in seconds with that mark takes more. */
const LEAD_WIDTH = 8;
/** A route's name is shown in full up to this width, and beyond it where its column is wider. */
const NAME_WIDTH = 18;
const DAY = 86_400_000;
const MARKS: Readonly<Record<string, string>> = { time: "T", use: "U", "latest departure": "L" };

/** `T`, `U`, `L` at the bests that hold; in brackets at those of the plain estimate that do not. */
function letters(cell: WindowCell, { sure, summary }: WindowReport): string {
  const marks = (best: WindowBest): string[] =>
    bestWords(cell, best)
      .split(", ")
      .flatMap((word) => MARKS[word] ?? []);
  if (sure === undefined || sure === null) return marks(summary.best).join("");
  const held = marks(sure.best.sure);
  const passed = marks(sure.best.plain).filter((mark) => !held.includes(mark));
  const brackets = passed.length === 0 ? "" : `(${passed.join("")})`;
  return held.join("") + brackets;
}

const REASONS: Partial<Record<FindingCode, string>> = {
  "cannot-hold-track": "track",
  "outside-area": "off grid",
  "outside-time": "no forecast",
  gap: "data gap",
  "outside-power-table": "off table",
  "store-empty": "empty",
  "reserve-broken": "reserve",
  "wind-limit": "wind",
  "gust-limit": "gusts",
  "arrival-missed": "arrival",
};

/** A short word for what stops a cell. */
export function reasonWord(code: FindingCode): string {
  return REASONS[code] ?? code;
}

/** The time of arrival, with + and the number of midnights passed since the departure. */
function arrivalText(cell: WindowCell, units: WindowUnits): string {
  if (cell.arrival === null) return NO_FIGURE;
  const unit = 1000 * clockSeconds(units.clock);
  const arrival = Math.round(Date.parse(cell.arrival) / unit) * unit;
  const days = Math.floor(arrival / DAY) - Math.floor(Date.parse(cell.departure) / DAY);
  return clockText(cell.arrival, units.clock) + (days === 0 ? "" : `+${days}`);
}

/** What stands before the store in a column of cells, and how wide the widest is. */
interface Lead {
  readonly head: string;
  readonly width: number;
  readonly of: (cell: WindowCell) => string;
}

/** The speed that was found for an arrival, else the arrival. */
function leadOf(cells: readonly WindowCell[], units: WindowUnits, found: boolean): Lead {
  const { speed } = units;
  const of = (cell: WindowCell): string =>
    found && cell.speed_m_s !== null
      ? rightAligned((cell.speed_m_s / speed.size).toFixed(speed.decimals), 5)
      : arrivalText(cell, units);
  const widths = cells.filter(isPossible).map((cell) => displayWidth(of(cell)));
  return { head: found ? speed.symbol.padStart(5) : "ETA", width: Math.max(LEAD_WIDTH, ...widths), of };
}

/** `09:31    61.2!T`, or `x reserve` for a cell that cannot be done. */
function cellText(
  cell: WindowCell | undefined,
  report: WindowReport,
  units: WindowUnits,
  lead: Lead,
): string {
  if (cell === undefined) return "";
  if (!isPossible(cell)) return `x ${reasonWord(cell.worst?.code ?? "gap")}`;
  const { store } = units;
  const left = leftInLastPlace((cell.remaining ?? 0) / store.size, store.decimals);
  const mark = cell.status === "caution" ? "!" : " ";
  return `${leftAligned(lead.of(cell), lead.width)}${rightAligned(placedText(left, store.decimals, STORE_WIDTH), STORE_WIDTH)}${mark}${letters(cell, report)}`;
}

interface Candidate {
  readonly head: readonly string[];
  /** By departure. */
  readonly texts: ReadonlyMap<string, string>;
  readonly width: number;
}

function candidates(report: WindowReport, units: WindowUnits): Candidate[] {
  const { window, arrive } = report;
  const found = window.speeds_m_s === null && arrive !== null;
  const groups = new Map<string, WindowCell[]>();
  for (const cell of report.cells) {
    const key = JSON.stringify([cell.route, window.speeds_m_s === null ? null : cell.speed_m_s]);
    const own = groups.get(key);
    if (own === undefined) groups.set(key, [cell]);
    else own.push(cell);
  }
  return [...groups.values()].map((cells) => {
    const lead = leadOf(cells, units, found);
    const texts = new Map(cells.map((cell) => [cell.departure, cellText(cell, report, units, lead)]));
    const columnHead = `${leftAligned(lead.head, lead.width)}${rightAligned("Left", STORE_WIDTH)}`;
    const widest = [...texts.values()].reduce((most, text) => Math.max(most, displayWidth(text)), 0);
    const whole = displayWidth(plainText(cells[0]?.route ?? ""));
    const width = Math.max(displayWidth(columnHead), widest, Math.min(whole, NAME_WIDTH));
    const speed = window.speeds_m_s === null ? null : (cells[0]?.speed_m_s ?? null);
    const speedHead = speed === null ? [] : [figureText(speed, units.speed)];
    const name = isolated(clipped(plainText(cells[0]?.route ?? ""), width));
    return { head: [name, ...speedHead, columnHead], texts, width };
  });
}

/** As many candidates side by side as the table is wide; at least one. */
function packed(all: readonly Candidate[], room: number): Candidate[][] {
  const blocks: Candidate[][] = [];
  let used = 0;
  for (const candidate of all) {
    const last = blocks[blocks.length - 1];
    if (last === undefined || used + GAP + candidate.width > room) {
      blocks.push([candidate]);
      used = candidate.width;
    } else {
      last.push(candidate);
      used += GAP + candidate.width;
    }
  }
  return blocks;
}

/** Departures down, routes and speeds across: arrival, what is left, and marks; dates on lines of their own. */
export function windowMatrix(report: WindowReport, units: WindowUnits): string[] {
  const labelWidth = units.departures === "minute" ? 5 : 8;
  const departures = [...new Set(report.cells.map(({ departure }) => departure))];
  const blocks = packed(candidates(report, units), TABLE_WIDTH - labelWidth - GAP);
  const line = (label: string, block: readonly Candidate[], of: (candidate: Candidate) => string) =>
    [leftAligned(label, labelWidth), ...block.map((candidate) => leftAligned(of(candidate), candidate.width))]
      .join(" ".repeat(GAP))
      .trimEnd();
  return blocks.flatMap((block, index) => {
    const heads = block[0]?.head.length ?? 0;
    const head = Array.from({ length: heads }, (_, row) =>
      line(row === heads - 1 ? "ETD" : "", block, (candidate) => candidate.head[row] ?? ""),
    );
    const rows = departures.flatMap((departure, row) => {
      const date = departure.slice(0, -14);
      const isNewDay = date !== departures[row - 1]?.slice(0, -14);
      const text = line(
        clockText(departure, units.departures),
        block,
        ({ texts }) => texts.get(departure) ?? "",
      );
      return isNewDay ? [date, text] : [text];
    });
    return [...(index === 0 ? [] : [""]), ...head, ...rows];
  });
}
