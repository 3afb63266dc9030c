import { InputError, type Place } from "../errors.ts";
import { foundText } from "../found.ts";

const DATE_TIME =
  /^(\d{4})-(\d\d)-(\d\d)[Tt](\d\d):(\d\d)(?::(\d\d)(?:[.,](\d+))?)?(?:([Zz])|([+-])(\d\d)(?::?(\d\d))?)?$/;

const TAKES = "an ISO 8601 date and time with its zone";
const EXAMPLE = 'as "2027-05-04T06:00:00Z"';

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
  const fault = (rule: string) => new InputError(`${name} ${rule}; found ${foundText(text)}`, place);
  const match = typeof text === "string" ? DATE_TIME.exec(text.trim()) : null;
  if (match === null) throw fault(`takes ${TAKES}, ${EXAMPLE}`);
  const part = (group: number) => Number(match[group] ?? 0);
  const midnight = new Date(0);
  midnight.setUTCFullYear(part(1), part(2) - 1, part(3));
  if (midnight.getUTCMonth() + 1 !== part(2) || midnight.getUTCDate() !== part(3))
    throw fault("takes a date of the calendar");
  if (part(4) > 23) throw fault("takes an hour of 00 to 23");
  if (part(5) > 59) throw fault("takes a minute of 00 to 59");
  if (part(6) > 59) throw fault("takes a second of 00 to 59, without leap seconds");
  const sign = match[9];
  if (match[8] === undefined && sign === undefined)
    throw fault("takes an explicit zone: add Z for UTC, or +hh:mm");
  if (part(10) > 23 || part(11) > 59) throw fault("takes a zone within a day of UTC, as +02:00");
  const lead = (sign === "-" ? -1 : 1) * (part(10) * 60 + part(11));
  const milliseconds = Math.round(Number(`0.${match[7] ?? "0"}`) * 1000);
  return midnight.getTime() + ((part(4) * 60 + part(5) - lead) * 60 + part(6)) * 1000 + milliseconds;
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
