import { InputError, type Place } from "../errors.ts";
import { foundText } from "../found.ts";
import { EXTENDED_FORMAT, type InstantFault, readInstant } from "../instant.ts";

const TAKES = "an ISO 8601 date and time with its zone";
const EXAMPLE = 'as "2027-05-04T06:00:00Z"';

const RULES: Readonly<Record<InstantFault, string>> = {
  form: `takes ${TAKES}, ${EXAMPLE}`,
  calendar: "takes a date of the calendar",
  hour: "takes an hour of 00 to 23",
  minute: "takes a minute of 00 to 59",
  second: "takes a second of 00 to 59, without leap seconds",
  "no-zone": "takes an explicit zone: add Z for UTC, or +hh:mm",
  zone: "takes a zone within a day of UTC, as +02:00",
};

/**
 * Reads an instant: a date and time in ISO 8601's extended format with an explicit zone (`Z`, `+02:00`, `+0200`, `+02`).
 * Seconds and their decimals may be left out; decimals beyond the millisecond are rounded. 24:00 and leap seconds are refused.
 *
 * @returns ms since 1970-01-01T00:00Z
 * @throws InputError for any other text, a date that the calendar does not have, or no zone
 * @see ISO 8601-1:2019, section 5.4
 * @example
 * parseTime("1970-01-01T02:00:01+02:00") // → 1000
 */
export function parseTime(text: unknown, name = "time", place: Place = {}): number {
  const read = typeof text === "string" ? readInstant(text.trim(), [EXTENDED_FORMAT]) : "form";
  if (typeof read === "number") return read;
  throw new InputError(`${name} ${RULES[read]}; found ${foundText(text)}`, place);
}

/**
 * Writes an instant in ISO 8601, UTC, to the millisecond.
 *
 * @param instant ms since 1970-01-01T00:00Z
 * @throws RangeError where it is no instant that the calendar holds
 * @example
 * formatTime(1000) // → "1970-01-01T00:00:01.000Z"
 */
export function formatTime(instant: number): string {
  return new Date(instant).toISOString();
}
