import { NO_FIGURE } from "./number-text.ts";

/** The finest unit of time that a table prints. */
export type Clock = "minute" | "second";

const SECONDS = { minute: 60, second: 1 } as const;

/** Longest passage, s, up to which a table prints seconds. */
const SECONDS_UP_TO = 7200;

/** The clock of a table whose longest passage takes so many seconds, stays included. */
export function clockFor(longest_s: number): Clock {
  return longest_s < SECONDS_UP_TO ? "second" : "minute";
}

/** Seconds in one unit of the clock. */
export function clockSeconds(clock: Clock): number {
  return SECONDS[clock];
}

const two = (value: number): string => String(value).padStart(2, "0");

/** A whole number of minutes or seconds as h:mm or h:mm:ss, of at most `width` columns; `signed` puts + before positive ones. */
export function durationText(count: number | null, clock: Clock, width = 12, signed = false): string {
  if (count === null) return NO_FIGURE;
  const size = Math.abs(count);
  const sign = count < 0 ? "-" : signed && count > 0 ? "+" : "";
  const minutes = clock === "minute" ? size : Math.floor(size / 60);
  const hours = Math.floor(minutes / 60);
  const seconds = clock === "minute" ? "" : `:${two(size % 60)}`;
  const text = `${sign}${hours}:${two(minutes % 60)}${seconds}`;
  return text.length <= width ? text : `${sign}${hours.toExponential(0)}h`;
}

function roundedInstant(iso: string, clock: Clock): string {
  const unit = clockSeconds(clock) * 1000;
  return new Date(Math.round(Date.parse(iso) / unit) * unit).toISOString();
}

/** An instant in UTC for a column: day and time (`04 07:31`), or the time with its seconds (`07:31:05`). */
export function etaText(iso: string | null, clock: Clock): string {
  if (iso === null) return NO_FIGURE;
  const text = roundedInstant(iso, clock);
  return clock === "minute" ? `${text.slice(-16, -14)} ${text.slice(-13, -8)}` : text.slice(-13, -5);
}

/** The time of day of an instant in UTC: `07:31`, or with its seconds. */
export function clockText(iso: string, clock: Clock): string {
  const text = roundedInstant(iso, clock);
  return clock === "minute" ? text.slice(-13, -8) : text.slice(-13, -5);
}

/** An instant in words: `2027-05-04 07:31 UTC`, with seconds where the clock has them. */
export function instantText(iso: string | null, clock: Clock): string {
  if (iso === null) return NO_FIGURE;
  const text = roundedInstant(iso, clock);
  return `${text.slice(0, -14)} ${clock === "minute" ? text.slice(-13, -8) : text.slice(-13, -5)} UTC`;
}
