import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { alongClass, alongColour, roundLimit, routeHue, speedClass } from "../../web/format/palette.ts";
import { latText, lonText } from "../../web/format/position-text.ts";
import {
  clockSince,
  clockText,
  durationText,
  fromLocalInput,
  fullTimeText,
  localInput,
  signedDurationText,
  zoneText,
} from "../../web/format/time-text.ts";
import { inUnit, number, shownUnit, signed, storeUnit } from "../../web/format/units.ts";
import { instantText } from "../../web/shell/plan-words.ts";

describe("positions as text", () => {
  test("are degrees and minutes with a hemisphere", () => {
    expect(latText(58.1032)).toBe("58°06.19′N");
    expect(lonText(-6.3871)).toBe("006°23.23′W");
    expect(latText(-0.5)).toBe("00°30.00′S");
    expect(lonText(190)).toBe("170°00.00′W");
    expect(lonText(540)).toBe("180°00.00′E");
  });

  test("never show sixty minutes, nor a side of zero", () => {
    expect(latText(9.99999)).toBe("10°00.00′N");
    expect(lonText(-0.00001)).toBe("000°00.00′E");
    fc.assert(
      fc.property(
        fc.double({ min: -90, max: 90, noNaN: true }),
        fc.integer({ min: 0, max: 4 }),
        (lat, decimals) => {
          const [, degrees, minutes, side] = /^(\d\d)°([\d.]+)′([NS])$/.exec(latText(lat, decimals)) ?? [];
          expect(Number(minutes)).toBeLessThan(60);
          const value = (Number(degrees) + Number(minutes) / 60) * (side === "S" ? -1 : 1);
          // Half of the last decimal of a minute, and rounding of the sum.
          expect(Math.abs(value - lat)).toBeLessThanOrEqual(0.5 / 60 / 10 ** decimals + 1e-12);
        },
      ),
      { numRuns: 300 },
    );
  });
});

describe("times as text", () => {
  const at = Date.UTC(2027, 4, 4, 6, 5);

  test("are shown in the zone and say which", () => {
    expect(clockText(at, "UTC", false)).toBe("06:05");
    expect(clockText(at, "UTC", true)).toBe("Tue 4 May 06:05");
    expect(clockText(at, "Asia/Kolkata", false)).toBe("11:35");
    expect(zoneText(at, "UTC")).toBe("UTC");
    expect(zoneText(at, "Asia/Kolkata")).toBe("Asia/Kolkata (UTC+05:30)");
    expect(zoneText(at, "America/St_Johns")).toBe("America/St_Johns (UTC−02:30)");
  });

  test("are of the nearest minute, with the day that it falls on", () => {
    const late = Date.UTC(2027, 11, 31, 23, 59, 57);
    expect(clockText(late - 60_000, "UTC", false)).toBe("23:59");
    expect(clockText(late, "UTC", true)).toBe("Sat 1 Jan 00:00");
    expect(clockSince("2027-05-04T13:47:57Z", "2027-05-04T11:00:00Z", "UTC", "minute")).toBe("13:48");
    expect(clockSince("2027-05-04T13:47:29Z", "2027-05-04T11:00:00Z", "UTC", "minute")).toBe("13:47");
  });

  test("are of the nearest second where seconds count, with the day that it falls on", () => {
    const departure = "2027-12-31T23:58:00Z";
    expect(clockSince("2027-12-31T23:59:57.499Z", departure, "UTC", "second")).toBe("23:59:57");
    expect(clockSince("2027-12-31T23:59:59.500Z", departure, "UTC", "second")).toBe("1 Jan 00:00:00");
    expect(clockText("2027-12-31T23:59:59.5Z", "UTC", true, "second")).toBe("Sat 1 Jan 00:00:00");
    expect(clockText("2027-05-04T06:05:09Z", "Asia/Kolkata", false, "second")).toBe("11:35:09");
  });

  test("carry the date where it is another day than the departure's", () => {
    expect(clockSince("2027-05-04T23:10:00Z", "2027-05-04T06:00:00Z", "UTC", "minute")).toBe("23:10");
    expect(clockSince("2027-05-05T00:10:00Z", "2027-05-04T06:00:00Z", "UTC", "minute")).toBe("5 May 00:10");
  });

  test("go into the local control and come back, whatever the zone", () => {
    fc.assert(
      fc.property(
        fc.integer({ min: Date.UTC(2020, 0) / 60_000, max: Date.UTC(2030, 0) / 60_000 }),
        fc.constantFrom("UTC", "Asia/Kolkata", "America/St_Johns", "Pacific/Kiritimati", "Pacific/Pago_Pago"),
        (minutes, zone) => {
          const back = fromLocalInput(localInput(minutes * 60_000, zone), zone);
          // Once a year an hour happens twice; the control can't tell which of the two was meant.
          expect(Math.abs((back ?? Number.NaN) - minutes * 60_000) % 3_600_000).toBe(0);
          if (zone !== "America/St_Johns") expect(back).toBe(minutes * 60_000);
        },
      ),
      { numRuns: 200 },
    );
    expect(fromLocalInput("", "UTC")).toBeNull();
  });

  test("are durations of a fitting precision", () => {
    expect(durationText(11_220)).toBe("3 h 07");
    expect(durationText(3590)).toBe("1 h 00");
    expect(durationText(3540)).toBe("59 min");
    expect(durationText(1488)).toBe("25 min");
    expect(durationText(1488, "second")).toBe("24 min 48");
    expect(durationText(3599.6, "second")).toBe("1 h 00");
    expect(durationText(42)).toBe("42 s");
    expect(durationText(599)).toBe("9 min 59");
    expect(durationText(-154)).toBe("−2 min 34");
    expect(durationText(-0.2)).toBe("0 s");
    expect(durationText(null)).toBe("–");
    expect(signedDurationText(600)).toBe("+10 min");
    expect(signedDurationText(0)).toBe("0 s");
  });
});

describe("numbers as text", () => {
  test("have a true minus, and no minus at zero", () => {
    expect(number(-1.25, 1)).toBe("−1.3");
    expect(number(-0.01, 1)).toBe("0.0");
    expect(signed(0.04, 1)).toBe("0.0");
    expect(signed(2, 0)).toBe("+2");
  });

  test("are shown in the preset's units", () => {
    expect(inUnit(18_520, shownUnit("sea", "distance"))).toBe("10.0");
    expect(inUnit(10, shownUnit("metric", "distance"))).toBe("0.0");
    expect(inUnit(1852 / 360, shownUnit("air", "speed"))).toBe("10.0");
    expect(inUnit(30.48, shownUnit("air", "height"))).toBe("100");
    expect(inUnit(null, shownUnit("sea", "speed"))).toBe("–");
    expect(storeUnit("J", 8e8).symbol).toBe("kWh");
    expect(storeUnit("J", 1.6e6).symbol).toBe("Wh");
    expect(storeUnit("kg", 100_000).symbol).toBe("t");
    expect(storeUnit("kg", 40).symbol).toBe("kg");
  });
});

describe("colours that carry meaning", () => {
  test("are brown against the craft, pale where nothing moves, teal with it", () => {
    expect(alongClass(0, 2)).toBe(5);
    expect(alongClass(-9, 2)).toBe(0);
    expect(alongClass(9, 2)).toBe(10);
    expect(alongClass(1, 0)).toBe(5);
    expect(alongColour(0)).toBe("#543005");
    expect(alongColour(10)).toBe("#003c30");
  });

  test("have a scale that ends at a round number not below the value", () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-3, max: 1e3, noNaN: true }), (value) => {
        const knot = 1852 / 3600;
        const limit = roundLimit(value, knot);
        expect(limit).toBeGreaterThanOrEqual(value * (1 - 1e-12));
        expect(limit).toBeLessThanOrEqual(value * 1.5 + 1e-9);
      }),
      { numRuns: 200 },
    );
    expect(roundLimit(0, 1)).toBe(0);
    expect(speedClass(40, 40)).toBe(8);
    expect(speedClass(0, 40)).toBe(0);
  });

  test("give the first six routes a hue each", () => {
    expect(new Set([0, 1, 2, 3, 4, 5].map(routeHue)).size).toBe(6);
    expect(routeHue(6)).toBe(routeHue(0));
  });
});

describe("a time that is decided on", () => {
  test("has its weekday, month by name, year and zone", () => {
    const instant = Date.parse("2027-05-04T11:00:00Z");
    expect(fullTimeText(instant, "UTC")).toBe("Tue 4 May 2027 11:00 UTC");
    expect(fullTimeText(instant, "Asia/Kolkata")).toBe("Tue 4 May 2027 16:30 Asia/Kolkata (UTC+05:30)");
  });

  test("has its seconds where it has any, since it is the plan's own and not one that is worked out", () => {
    const late = Date.UTC(2027, 11, 31, 23, 59, 57);
    expect(fullTimeText(late, "UTC")).toBe("Fri 31 Dec 2027 23:59:57 UTC");
    expect(fullTimeText(late + 120, "UTC")).toBe("Fri 31 Dec 2027 23:59:57.120 UTC");
    expect(localInput(late, "Asia/Kolkata")).toBe("2028-01-01T05:29:57");
    expect(localInput(late + 3000, "UTC")).toBe("2028-01-01T00:00");
    expect(fromLocalInput(localInput(late + 120, "UTC"), "UTC")).toBe(late + 120);
    expect(instantText("2027-12-31T23:59:57Z", "UTC")).toBe("2027-12-31 23:59:57 UTC");
  });

  test("has the year of its zone", () => {
    const instant = Date.parse("2027-12-31T20:00:00Z");
    expect(fullTimeText(instant, "Asia/Kolkata")).toMatch(/^Sat 1 Jan 2028 01:30 /);
  });
});
