import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { InputError } from "../../src/errors.ts";
import { formatTime, parseTime } from "../../src/plan/time.ts";

describe("times", () => {
  // Days since 1970-01-01: 2027-05-04 is day 20,942 (57 years of 365 days, 14 leap days, 123 days of 2027).
  const morning = (20_942 * 24 + 6) * 3600_000;
  test.each([
    ["2027-05-04T06:00:00Z", morning],
    ["2027-05-04T06:00Z", morning],
    ["2027-05-04T06:00:00.000Z", morning],
    ["2027-05-04t06:00:00z", morning],
    ["2027-05-04T08:00:00+02:00", morning],
    ["2027-05-04T08:00:00+0200", morning],
    ["2027-05-04T08+02", Number.NaN],
    ["2027-05-04T08:00:00+02", morning],
    ["2027-05-03T20:30:00-09:30", morning],
    ["2027-05-04T06:00:00-00:00", morning],
    ["2027-05-04T06:00:00.5Z", morning + 500],
    ["2027-05-04T06:00:00,25Z", morning + 250],
    ["2027-05-04T06:00:00.0004Z", morning],
    ["2027-05-04T06:00:00.9996Z", morning + 1000],
    ["1970-01-01T00:00:00Z", 0],
    ["1969-12-31T23:59:59Z", -1000],
    ["2028-02-29T00:00:00Z", 1835395200000],
    ["0001-01-01T00:00:00Z", -62135596800000],
  ])("%j is %d ms since 1970", (text, expected) => {
    if (Number.isNaN(expected)) expect(() => parseTime(text)).toThrow(InputError);
    else expect(parseTime(text)).toBe(expected);
  });

  test.each([
    ["2027-05-04T06:00:00", "takes an explicit zone: add Z for UTC, or +hh:mm"],
    ["2027-02-30T06:00:00Z", "takes a date of the calendar"],
    ["2027-02-29T06:00:00Z", "takes a date of the calendar"],
    ["1900-02-29T06:00:00Z", "takes a date of the calendar"],
    ["2027-13-01T06:00:00Z", "takes a date of the calendar"],
    ["2027-00-01T06:00:00Z", "takes a date of the calendar"],
    ["2027-04-31T06:00:00Z", "takes a date of the calendar"],
    ["2027-04-00T06:00:00Z", "takes a date of the calendar"],
    ["2027-05-04T24:00:00Z", "takes an hour of 00 to 23"],
    ["2027-05-04T06:60:00Z", "takes a minute of 00 to 59"],
    ["2016-12-31T23:59:60Z", "takes a second of 00 to 59, without leap seconds"],
    ["2027-05-04T06:00:00+24:00", "takes a zone within a day of UTC"],
    ["2027-05-04T06:00:00+02:60", "takes a zone within a day of UTC"],
    ["2027-05-04", "takes an ISO 8601 date and time with its zone"],
    ["2027-05-04 06:00Z", "takes an ISO 8601 date and time with its zone"],
    ["4 May 2027 06:00 UTC", "takes an ISO 8601 date and time with its zone"],
    ["2027-5-4T6:00Z", "takes an ISO 8601 date and time with its zone"],
    ["", "takes an ISO 8601 date and time with its zone"],
    [1809410400000, "takes an ISO 8601 date and time with its zone"],
    [undefined, "takes an ISO 8601 date and time with its zone"],
  ])("%j is refused: %s", (text, rule) => {
    const reading = () => parseTime(text, "departure");
    expect(reading).toThrow(InputError);
    expect(reading).toThrow(`departure ${rule}`);
    expect(reading).toThrow("; found ");
  });

  test("an instant is written in UTC with milliseconds, and read back", () => {
    expect(formatTime(morning)).toBe("2027-05-04T06:00:00.000Z");
    fc.assert(
      fc.property(fc.integer({ min: -62135596800000, max: 253402300799999 }), (instant) => {
        expect(parseTime(formatTime(instant))).toBe(instant);
      }),
      { numRuns: 1000 },
    );
  });

  test("no instant is written where there is none", () => {
    expect(() => formatTime(Number.NaN)).toThrow(RangeError);
  });
});
