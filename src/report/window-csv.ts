import type { BestPair, Sure } from "../choose/sure.ts";
import type { WindowCell } from "../choose/window-cell.ts";
import type { WindowBest } from "../choose/window-summary.ts";
import { ADVISORY } from "../constants.ts";
import { csvCell } from "./csv.ts";
import type { WindowReport } from "./window-input.ts";

type CsvColumn = readonly [header: string, cell: (cell: WindowCell) => string | number | null];

function columns(unit: string, best: WindowBest): readonly CsvColumn[] {
  return [
    ["route", ({ route }) => route],
    ["departure [UTC]", ({ departure }) => departure],
    ["speed [m/s]", ({ speed_m_s }) => speed_m_s],
    ["status", ({ status }) => status],
    ["arrival [UTC]", ({ arrival }) => arrival],
    ["time under way [s]", ({ time_s }) => time_s],
    ["departure to arrival [s]", ({ passage_s }) => passage_s],
    [`use [${unit}]`, ({ use }) => use],
    [`left [${unit}]`, ({ remaining }) => remaining],
    [`reserve [${unit}]`, ({ reserve }) => reserve],
    ["best", (cell) => bestWords(cell, best)],
    ["finding", ({ worst }) => worst?.code ?? null],
    ["message", ({ worst }) => worst?.message ?? null],
    ["advisory", () => ADVISORY],
  ];
}

/** How sure the bests are; empty for cells that are none. */
function sureColumns({ plain, sure }: BestPair): readonly CsvColumn[] {
  const tested = [plain, sure].flatMap(({ time, use, latest }) => [time, use, latest]);
  const of = (cell: WindowCell): Sure | undefined =>
    tested.find((each) => each !== null && isSameCell(each, cell))?.sure;
  return [
    ["sure best", (cell) => bestWords(cell, sure)],
    ["sure status", (cell) => of(cell)?.status ?? null],
    ["sure decided by", (cell) => decidedText(of(cell))],
    ["sure finding", (cell) => of(cell)?.worst?.code ?? null],
    ["sure message", (cell) => of(cell)?.worst?.message ?? null],
    ["members in which the reserve holds [1]", (cell) => of(cell)?.ensemble?.reserveHolds ?? null],
    ["probability that the reserve holds [1]", (cell) => of(cell)?.reserveHolds ?? null],
  ];
}

function decidedText(sure: Sure | undefined): string | null {
  if (sure === undefined) return null;
  const { member, whatIf, error } = sure.decidedBy;
  if (error === true) return "stated error";
  if (member !== null) return `member ${member}`;
  return whatIf === null ? "plain estimate" : `what if ${whatIf}`;
}

/** What a cell is the best by: `time`, `use`, `latest departure`. */
export function bestWords(
  cell: WindowCell,
  { time, use, latest }: Pick<WindowBest, "time" | "use" | "latest">,
): string {
  const words: readonly [WindowCell | null, string][] = [
    [time, "time"],
    [use, "use"],
    [latest, "latest departure"],
  ];
  return words
    .filter(([best]) => best !== null && isSameCell(best, cell))
    .map(([, word]) => word)
    .join(", ");
}

function isSameCell(a: WindowCell, b: WindowCell): boolean {
  return a.route === b.route && a.departure === b.departure && a.speed_m_s === b.speed_m_s;
}

/**
 * A window of departures as CSV (RFC 4180, CRLF, UTF-8 without BOM): one row a cell, SI units in the headers, full precision, an
 * empty cell where there is no figure; the bests to the minute, where they were asked for, follow as rows of their own. Where the plan names
 * members, what-ifs or a stated error, columns at the end say how sure the bests are, and which hold.
 *
 * @example
 * const report = { title: "Two marks", fields: [], craft: { name: "Tender", moves: "water", store: { unit: "J", usable: 36000000 } }, pace: { hold: "least-energy" }, arrive: null, window: { from: 0, to: 0, every_s: 60, speeds_m_s: null }, cells: [], summary: summariseWindow([]), refined: null, inTime: null, paces: null };
 * writeWindowCsv(report).split(",")[1] // → "departure [UTC]"
 */
export function writeWindowCsv({ craft, cells, summary, refined, sure }: WindowReport): string {
  const pair = (sure?.refined ?? sure)?.best;
  const best = pair?.plain ?? refined?.best ?? summary.best;
  const found = [best, ...(pair === undefined ? [] : [pair.sure])]
    .flatMap(({ time, use, latest }) => [time, use, latest])
    .filter((cell) => cell !== null);
  const added = found.filter(
    (cell, index) =>
      !cells.some((known) => isSameCell(known, cell)) &&
      !found.slice(0, index).some((known) => isSameCell(known, cell)),
  );
  const all = [...columns(craft.store.unit, best), ...(pair === undefined ? [] : sureColumns(pair))];
  const lines = [
    all.map(([header]) => csvCell(header)),
    ...[...cells, ...added].map((cell) => all.map(([, of]) => csvCell(of(cell)))),
  ];
  return lines.map((line) => `${line.join(",")}\r\n`).join("");
}
