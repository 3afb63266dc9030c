/* Times, to the nearest minute, and durations as the page shows them. Zones are those that the browser knows; every time says which it is in. */

const formats = new Map<string, Intl.DateTimeFormat>();

/** `06:00`, or `Tue 4 May 06:00` with the day, in a zone. */
export function clockText(instant: number | string, zone: string, withDay: boolean): string {
  const parts = partsIn(instant, zone);
  const clock = `${parts.hour}:${parts.minute}`;
  return withDay ? `${parts.weekday} ${Number(parts.day)} ${parts.month} ${clock}` : clock;
}

/** The date in a zone as ISO 8601 writes it: `2027-05-04`. */
export function dateText(instant: number, zone: string): string {
  return localInput(nearestMinute(instant), zone).slice(0, 10);
}

/** A time in full, as one that is decided on is read: `Tue 4 May 2027 06:00 UTC`. */
export function fullTimeText(instant: number, zone: string): string {
  const { weekday, day, month, hour, minute } = partsIn(instant, zone);
  const year = localInput(nearestMinute(instant), zone).slice(0, 4);
  return `${weekday} ${Number(day)} ${month} ${year} ${hour}:${minute} ${zoneText(instant, zone)}`;
}

/** `06:00` on the day of another instant, else with its date: `7 Nov 06:00`. */
export function clockSince(instant: string, since: string | null, zone: string): string {
  const { day, month, hour, minute } = partsIn(instant, zone);
  const start = since === null ? null : partsIn(since, zone);
  const clock = `${hour}:${minute}`;
  return start !== null && start.day === day && start.month === month
    ? clock
    : `${Number(day)} ${month} ${clock}`;
}

/** The zone's label beside a time: `UTC`, or its name and offset at that instant. */
export function zoneText(instant: number | string, zone: string): string {
  if (zone === "UTC") return "UTC";
  const offset = offsetMinutes(Number(new Date(instant)), zone);
  const size = Math.abs(offset);
  const hours = String(Math.floor(size / 60)).padStart(2, "0");
  return `${zone} (UTC${offset < 0 ? "−" : "+"}${hours}:${String(size % 60).padStart(2, "0")})`;
}

/** `3 h 07` from an hour up, `12 min` below; seconds under ten minutes. */
export function durationText(seconds: number | null): string {
  if (seconds === null) return "–";
  const sign = seconds < 0 ? "−" : "";
  const size = Math.abs(seconds);
  const whole = Math.round(size);
  if (whole < 600) return signOf(sign, whole) + shortDuration(whole);
  const minutes = Math.round(size / 60);
  if (minutes < 60) return `${sign}${minutes} min`;
  return `${sign}${Math.floor(minutes / 60)} h ${String(minutes % 60).padStart(2, "0")}`;
}

/** With its sign always, for differences. */
export function signedDurationText(seconds: number | null): string {
  if (seconds === null) return "–";
  return Math.round(seconds) > 0 ? `+${durationText(seconds)}` : durationText(seconds);
}

/** What a `datetime-local` control shows for an instant in a zone: `2027-05-04T06:00`. */
export function localInput(instant: number, zone: string): string {
  const shifted = new Date(instant + offsetMinutes(instant, zone) * 60_000);
  return shifted.toISOString().slice(0, 16);
}

/** The instant that a `datetime-local` text in a zone means, ms since 1970; `null` where it means none. */
export function fromLocalInput(text: string, zone: string): number | null {
  const asUtc = Date.parse(`${text}Z`);
  if (Number.isNaN(asUtc)) return null;
  // The offset belongs to the instant sought: one more look settles it except inside a clock change.
  const first = asUtc - offsetMinutes(asUtc, zone) * 60_000;
  return asUtc - offsetMinutes(first, zone) * 60_000;
}

function signOf(sign: string, whole: number): string {
  return whole === 0 ? "" : sign;
}

function shortDuration(whole: number): string {
  if (whole < 60) return `${whole} s`;
  return `${Math.floor(whole / 60)} min ${String(whole % 60).padStart(2, "0")}`;
}

function nearestMinute(instant: number | string): number {
  return Math.round(Number(new Date(instant)) / 60_000) * 60_000;
}

interface Parts {
  readonly weekday: string;
  readonly day: string;
  readonly month: string;
  readonly hour: string;
  readonly minute: string;
}

/** Of the nearest minute, as the leg table on file rounds. */
function partsIn(instant: number | string, zone: string): Parts {
  const found: Record<string, string> = {};
  for (const { type, value } of formatOf(zone).formatToParts(nearestMinute(instant))) found[type] = value;
  const { weekday = "", day = "", month = "", hour = "", minute = "" } = found;
  return { weekday, day, month, hour, minute };
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
  const clock = { hour: "2-digit", minute: "2-digit", hourCycle: "h23", timeZone: zone } as const;
  const made = numeric
    ? new Intl.DateTimeFormat("en-GB", { ...clock, year: "numeric", month: "numeric", day: "numeric" })
    : new Intl.DateTimeFormat("en-GB", { ...clock, weekday: "short", day: "numeric", month: "short" });
  formats.set(key, made);
  return made;
}
