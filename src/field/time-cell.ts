import { quoted } from "../found.ts";
import { BASIC_FORMAT, EXTENDED_FORMAT, type InstantFault, readInstant, SPACED_FORMAT } from "../instant.ts";
import { CellFault } from "./number-cell.ts";

const FORMATS = [EXTENDED_FORMAT, SPACED_FORMAT, BASIC_FORMAT];

const RULES: Readonly<Record<InstantFault, string>> = {
  form: "is a date and time of ISO 8601, as 2027-05-04T06:00:00Z",
  calendar: "is in the calendar",
  hour: "is in the calendar",
  minute: "is in the calendar",
  second: "is in the calendar",
  "no-zone": "has an explicit zone, as Z or +02:00",
  zone: "has a zone within a day",
};

/**
 * A date and time of ISO 8601 with an explicit zone, in ms since 1970-01-01T00:00Z. A blank may stand for the T (RFC 3339).
 *
 * Errors: any other text, no zone, a date or time that is not in the calendar.
 */
export function timeCell(cell: string): number {
  const text = cell.trim();
  const read = readInstant(text, FORMATS);
  if (typeof read === "number") return read;
  throw new CellFault(`${RULES[read]}; found ${quoted(text)}`);
}
