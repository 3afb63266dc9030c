import { ADVISORY } from "../constants.ts";
import type { FieldSummary } from "../estimate/result.ts";
import { rule, TABLE_WIDTH } from "./columns.ts";
import type { Units } from "./input.ts";
import { placedText } from "./number-text.ts";
import { plainText, wrapped } from "./plain-text.ts";
import { inLastPlace } from "./rounding.ts";
import { triedText } from "./sure-text.ts";
import { arriveText, fieldText, paceText } from "./table-head.ts";
import { instantText } from "./time-text.ts";
import { refusalLines, windowBests } from "./window-bests.ts";
import type { WindowReport } from "./window-input.ts";
import { windowMatrix } from "./window-matrix.ts";
import { type WindowUnits, windowUnits } from "./window-units.ts";

function stepText(seconds: number): string {
  if (seconds >= 7200 && seconds % 3600 === 0) return `${seconds / 3600} h`;
  return seconds % 60 === 0 ? `${seconds / 60} min` : `${seconds} s`;
}

function howText({ craft, pace, arrive, window }: WindowReport, units: WindowUnits): string {
  const over = pace.hold === "ground-speed" ? "over the ground" : `through the ${craft.moves}`;
  if (window.speeds_m_s !== null) return `holds each speed ${over} in turn`;
  if (arrive === null) return paceText(pace, craft.moves, units.speed);
  const iso = (time: number) => new Date(time).toISOString();
  const asked = {
    notBefore: arrive.notBefore === null ? null : iso(arrive.notBefore),
    notAfter: iso(arrive.notAfter),
  };
  return arriveText(asked, craft.moves);
}

/** A window has no findings of a field's own, so its head says what is left out. */
function unusedText({ unused = [] }: FieldSummary): string {
  return unused.length === 0 ? "" : `; nothing used of ${unused.map(plainText).join(", ")}`;
}

function head(report: WindowReport, units: WindowUnits): string[] {
  const { title, craft, window, fields, summary } = report;
  const { size, decimals, symbol } = units.store;
  const usable = placedText(inLastPlace(craft.store.usable / size, decimals), decimals, 12);
  const span = [window.from, window.to].map((time) =>
    instantText(new Date(time).toISOString(), units.departures),
  );
  const entries: [string, string][] = [
    ["Craft", `${plainText(craft.name)}, ${howText(report, units)}`],
    ["Store", `${usable} ${symbol} usable`],
    [
      "Window",
      `${span[0]} to ${span[1]}, every ${stepText(window.every_s)}: ${summary.possible} of ${summary.cells} can be done`,
    ],
    ...fields.map((field): [string, string] => [
      field.role === "wind" ? "Wind" : "Current",
      `${fieldText(field)}${unusedText(field)}`,
    ]),
  ];
  if (fields.length === 0) entries.push(["Fields", "none: still air and water"]);
  return [
    ...wrapped(title === "" ? "Untitled plan" : plainText(title), TABLE_WIDTH),
    ...entries.flatMap(([label, text]) => wrapped(text, TABLE_WIDTH, `${label}:`.padEnd(11))),
  ];
}

function legend({ window, arrive, refined, sure }: WindowReport, units: WindowUnits): string[] {
  const lead =
    window.speeds_m_s === null && arrive !== null
      ? `the speed found, ${units.speed.symbol}`
      : "ETA, with +1 on the day after departure";
  const minute = refined === null ? "" : " The bests below are to the minute, between the departures shown.";
  const tried = sure === undefined || sure === null ? null : triedText(sure);
  const held =
    tried === null
      ? "of these"
      : `of these that hold ${tried}; in brackets the plain estimate's, where they do not`;
  return wrapped(
    `ETD down; across ${lead}; left in ${units.store.symbol}. ! with cautions. x cannot be done, and why. T least time, ` +
      `U least use, L latest departure ${held}. All times UTC.${minute}`,
    TABLE_WIDTH,
  );
}

/**
 * A window of departures as text, at most 80 columns wide, with a final line end: head; departures down, routes and speeds across;
 * the bests; why the others cannot be done; the advisory.
 *
 * @example
 * const report = { title: "Two marks", fields: [], craft: { name: "Tender", moves: "water", store: { unit: "J", usable: 36000000 } }, pace: { hold: "least-energy" }, arrive: null, window: { from: 0, to: 0, every_s: 60, speeds_m_s: null }, cells: [], summary: summariseWindow([]), refined: null, inTime: null, paces: null };
 * writeWindowTable(report, "sea").split("\n")[2] // → "Store:     10.0 kWh usable"
 */
export function writeWindowTable(report: WindowReport, system: Units): string {
  const units = windowUnits(report, system);
  const why = refusalLines(report.summary.routes);
  return [
    ...head(report, units),
    "",
    ...windowMatrix(report, units),
    "",
    ...legend(report, units),
    "",
    ...windowBests(report, units),
    ...(why.length === 0 ? [] : ["", ...why]),
    "",
    rule("="),
    ...wrapped(ADVISORY, TABLE_WIDTH),
    "",
  ].join("\n");
}
