import { quoted } from "../found.ts";
import { CellFault } from "./number-cell.ts";

const ISO_8601 =
  /^(\d{4})-(\d\d)-(\d\d)[Tt ](\d\d):(\d\d)(?::(\d\d)(?:[.,](\d{1,9}))?)?\s?([Zz]|[+-]\d\d(?::?\d\d)?)?$/;
const ISO_8601_BASIC =
  /^(\d{4})(\d\d)(\d\d)T(\d\d)(\d\d)(?:(\d\d)(?:[.,](\d{1,9}))?)?(Z|[+-]\d\d(?:\d\d)?)?$/;

/**
 * A date and time of ISO 8601 with an explicit zone, in ms since 1970-01-01T00:00Z. A blank may stand for the T (RFC 3339).
 *
 * Errors: any other text, no zone, a date or time that is not in the calendar.
 */
export function timeCell(cell: string): number {
  const text = cell.trim();
  const match = ISO_8601.exec(text) ?? ISO_8601_BASIC.exec(text);
  if (match === null) {
    throw new CellFault(`is a date and time of ISO 8601, as 2027-05-04T06:00:00Z; found ${quoted(text)}`);
  }
  const zone = match[8];
  if (zone === undefined) throw new CellFault(`has an explicit zone, as Z or +02:00; found ${quoted(text)}`);
  const [year, month, day, hour, minute, second] = match
    .slice(1, 7)
    .map((part) => Number(part ?? 0)) as number[];
  const millisecond = Math.round(Number(`0.${match[7] ?? "0"}`) * 1000);
  const date = new Date(0);
  date.setUTCFullYear(year as number, (month as number) - 1, day);
  const inCalendar = date.getUTCMonth() + 1 === month && date.getUTCDate() === day;
  const inDay = (hour as number) < 24 && (minute as number) < 60 && (second as number) < 60;
  if (!inCalendar || !inDay) throw new CellFault(`is in the calendar; found ${quoted(text)}`);
  date.setUTCHours(hour as number, minute, second, millisecond);
  return date.getTime() - zoneOffset(zone, text);
}

/** A zone's lead over UTC, ms. */
function zoneOffset(zone: string, text: string): number {
  if (zone === "Z" || zone === "z") return 0;
  const hours = Number(zone.slice(1, 3));
  const minutes = Number(zone.slice(3).replace(":", "") || "0");
  if (hours > 23 || minutes > 59) throw new CellFault(`has a zone within a day; found ${quoted(text)}`);
  return (zone.startsWith("-") ? -1 : 1) * (hours * 60 + minutes) * 60_000;
}
