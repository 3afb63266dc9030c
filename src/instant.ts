/** What is wrong with a text that should name an instant. */
export type InstantFault = "form" | "calendar" | "hour" | "minute" | "second" | "no-zone" | "zone";

/** ISO 8601's extended format, the zone optional so that its lack can be told (ISO 8601-1:2019, section 5.4). */
export const EXTENDED_FORMAT =
  /^(\d{4})-(\d\d)-(\d\d)[Tt](\d\d):(\d\d)(?::(\d\d)(?:[.,](\d+))?)?(?:([Zz])|([+-])(\d\d)(?::?(\d\d))?)?$/;

/** The same with a blank for the T (RFC 3339, section 5.6), and one before the zone. */
export const SPACED_FORMAT =
  /^(\d{4})-(\d\d)-(\d\d) (\d\d):(\d\d)(?::(\d\d)(?:[.,](\d+))?)?\s?(?:([Zz])|([+-])(\d\d)(?::?(\d\d))?)?$/;

/** ISO 8601's basic format. */
export const BASIC_FORMAT =
  /^(\d{4})(\d\d)(\d\d)T(\d\d)(\d\d)(?:(\d\d)(?:[.,](\d+))?)?(?:(Z)|([+-])(\d\d)(\d\d)?)?$/;

/**
 * The instant that a text names in one of the formats, in ms since 1970-01-01T00:00Z, or what is wrong with it. Decimals of a
 * second beyond the millisecond are rounded; 24:00 and leap seconds are refused.
 */
export function readInstant(text: string, formats: readonly RegExp[]): number | InstantFault {
  const match = formats.map((format) => format.exec(text)).find((found) => found !== null) ?? null;
  if (match === null) return "form";
  const part = (group: number) => Number(match[group] ?? 0);
  const midnight = new Date(0);
  midnight.setUTCFullYear(part(1), part(2) - 1, part(3));
  if (midnight.getUTCMonth() + 1 !== part(2) || midnight.getUTCDate() !== part(3)) return "calendar";
  if (part(4) > 23) return "hour";
  if (part(5) > 59) return "minute";
  if (part(6) > 59) return "second";
  const sign = match[9];
  if (match[8] === undefined && sign === undefined) return "no-zone";
  if (part(10) > 23 || part(11) > 59) return "zone";
  const lead = (sign === "-" ? -1 : 1) * (part(10) * 60 + part(11));
  const milliseconds = Math.round(Number(`0.${match[7] ?? "0"}`) * 1000);
  return midnight.getTime() + ((part(4) * 60 + part(5) - lead) * 60 + part(6)) * 1000 + milliseconds;
}

/** An instant (ms since 1970-01-01T00:00Z) as one would write it in a plan: no seconds, no decimals where there are none. */
export function writtenInstant(milliseconds: number): string {
  return new Date(milliseconds).toISOString().replace(/(?::00)?\.000Z$/, "Z");
}
