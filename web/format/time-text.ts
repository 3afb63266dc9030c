import type { Clock } from "../core.ts";

/*
 * Times, to the nearest minute or second as in the command's tables, and durations as the page shows them. Zones are those that the
 * browser knows; every time says which it is in.
 */

const formats = new Map<string, Intl.DateTimeFormat>();

/** `06:00`, or `Tue 4 May 06:00` with the day, in a zone; with its seconds where they count. */
export function clockText(
  instant: number | string,
  zone: string,
  withDay: boolean,
  clock: Clock = "minute",
): string {
  const { weekday, day, month, time } = partsIn(instant, zone, clock);
  return withDay ? `${weekday} ${Number(day)} ${month} ${time}` : time;
}

/** A time in full, as one that is decided on is read: `Tue 4 May 2027 06:00 UTC`, with its seconds where it has any. */
export function fullTimeText(instant: number, zone: string): string {
  const { weekday, day, month } = partsIn(Math.floor(instant / 60_000) * 60_000, zone, "minute");
  const local = localInput(instant, zone);
  return `${weekday} ${Number(day)} ${month} ${local.slice(0, 4)} ${local.slice(11)} ${zoneText(instant, zone)}`;
}

/** `06:00`, or `06:00:12`, on the day of another instant, else with its date: `7 Nov 06:00`. */
export function clockSince(instant: string, since: string | null, zone: string, clock: Clock): string {
  const { day, month, time } = partsIn(instant, zone, clock);
  const start = since === null ? null : partsIn(since, zone, clock);
  return start !== null && start.day === day && start.month === month
    ? time
    : `${Number(day)} ${month} ${time}`;
}

/** The zone's label beside a time: `UTC`, or its name and offset at that instant. */
export function zoneText(instant: number | string, zone: string): string {
  if (zone === "UTC") return "UTC";
  const offset = offsetMinutes(Number(new Date(instant)), zone);
  const size = Math.abs(offset);
  const hours = String(Math.floor(size / 60)).padStart(2, "0");
  return `${zone} (UTC${offset < 0 ? "−" : "+"}${hours}:${String(size % 60).padStart(2, "0")})`;
}

/** `3 h 07` from an hour up, `12 min` below; seconds under ten minutes, and under an hour where they count. */
export function durationText(seconds: number | null, clock: Clock = "minute"): string {
  if (seconds === null) return "–";
  const sign = seconds < 0 ? "−" : "";
  const size = Math.abs(seconds);
  const whole = Math.round(size);
  if (whole < (clock === "minute" ? 600 : 3600)) return signOf(sign, whole) + shortDuration(whole);
  const minutes = Math.round(size / 60);
  if (minutes < 60) return `${sign}${minutes} min`;
  return `${sign}${Math.floor(minutes / 60)} h ${String(minutes % 60).padStart(2, "0")}`;
}

/** With its sign always, for differences. */
export function signedDurationText(seconds: number | null): string {
  if (seconds === null) return "–";
  return Math.round(seconds) > 0 ? `+${durationText(seconds)}` : durationText(seconds);
}

/** What a `datetime-local` control shows for an instant in a zone: `2027-05-04T06:00`, and seconds where there are any. */
export function localInput(instant: number, zone: string): string {
  const shifted = new Date(instant + offsetMinutes(instant, zone) * 60_000);
  return shifted.toISOString().replace(/(:00)?(\.000)?Z$/, "");
}

/** The instant that a `datetime-local` text in a zone means, ms since 1970; `null` where it means none. */
export function fromLocalInput(text: string, zone: string): number | null {
  const asUtc = Date.parse(`${text}Z`);
  if (Number.isNaN(asUtc)) return null;
  // The offset belongs to the instant sought: one more look settles it except inside a clock change.
  const first = asUtc - offsetMinutes(asUtc, zone) * 60_000;
  return asUtc - offsetMinutes(first, zone) * 60_000;
}

/** An instant as a plan writes it. */
export function timeOf(instant: number): string {
  return new Date(instant).toISOString().replace(".000Z", "Z");
}

function signOf(sign: string, whole: number): string {
  return whole === 0 ? "" : sign;
}

function shortDuration(whole: number): string {
  if (whole < 60) return `${whole} s`;
  return `${Math.floor(whole / 60)} min ${String(whole % 60).padStart(2, "0")}`;
}

function nearest(instant: number | string, clock: Clock): number {
  const unit = clock === "minute" ? 60_000 : 1000;
  return Math.round(Number(new Date(instant)) / unit) * unit;
}

interface Parts {
  readonly weekday: string;
  readonly day: string;
  readonly month: string;
  readonly time: string;
}

/** Of the nearest minute or second, as the leg table on file rounds. */
function partsIn(instant: number | string, zone: string, clock: Clock): Parts {
  const found: Record<string, string> = {};
  for (const { type, value } of formatOf(zone).formatToParts(nearest(instant, clock))) found[type] = value;
  const { weekday = "", day = "", month = "", hour, minute, second } = found;
  return { weekday, day, month, time: `${hour}:${minute}${clock === "minute" ? "" : `:${second}`}` };
}

function offsetMinutes(instant: number, zone: string): number {
  if (zone === "UTC") return 0;
  const found: Record<string, number> = {};
  for (const { type, value } of formatOf(zone, true).formatToParts(new Date(instant))) {
    found[type] = Number(value);
  }
  const { year = 0, month = 1, day = 1, hour = 0, minute = 0 } = found;
  const minutes = Math.floor(instant / 60_000);
  return Date.UTC(year, month - 1, day, hour, minute) / 60_000 - minutes;
}

function formatOf(zone: string, numeric = false): Intl.DateTimeFormat {
  const key = `${zone} ${numeric}`;
  const kept = formats.get(key);
  if (kept !== undefined) return kept;
  const two = "2-digit";
  const clock = { hour: two, minute: two, second: two, hourCycle: "h23", timeZone: zone } as const;
  const made = numeric
    ? new Intl.DateTimeFormat("en-GB", { ...clock, year: "numeric", month: "numeric", day: "numeric" })
    : new Intl.DateTimeFormat("en-GB", { ...clock, weekday: "short", day: "numeric", month: "short" });
  formats.set(key, made);
  return made;
}
