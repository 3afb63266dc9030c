import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { courseText, placedText } from "../../src/report/number-text.ts";
import {
  clipped,
  displayWidth,
  isolated,
  plainText,
  rightAligned,
  wrapped,
} from "../../src/report/plain-text.ts";
import { positionText } from "../../src/report/position-text.ts";
import { inLastPlace, leftInLastPlace, roundedRows } from "../../src/report/rounding.ts";
import { clockFor, durationText, etaText, instantText } from "../../src/report/time-text.ts";

describe("courses", () => {
  it("are three digits, and 360 is 000", () => {
    expect([0, 5.4, 45, 359.4, 359.5, 359.999, 360, -0.2].map(courseText)).toEqual([
      "000",
      "005",
      "045",
      "359",
      "000",
      "000",
      "000",
      "000",
    ]);
    expect(courseText(null)).toBe("–");
  });
});

describe("durations", () => {
  it("carry into the hour and never print a minute or a second as 60", () => {
    expect(durationText(60, "minute")).toBe("1:00");
    expect(durationText(119, "minute")).toBe("1:59");
    expect(durationText(3600, "second")).toBe("1:00:00");
    expect(durationText(3599, "second")).toBe("0:59:59");
    expect(durationText(-61, "second", 12, true)).toBe("-0:01:01");
    expect(durationText(0, "second", 12, true)).toBe("0:00:00");
    expect(durationText(17446, "minute")).toBe("290:46");
  });
  it("keep to their width, with an exponent where they must", () => {
    fc.assert(
      fc.property(
        fc.integer({ min: -1e12, max: 1e12 }),
        fc.constantFrom("minute" as const, "second" as const),
        (count, clock) => {
          expect(durationText(count, clock, 9, true).length).toBeLessThanOrEqual(9);
        },
      ),
      { numRuns: 200 },
    );
  });
});

describe("instants", () => {
  it("are told to the second where the longest passage takes less than two hours", () => {
    expect([0, 7199.9, 7200, 1e6].map(clockFor)).toEqual(["second", "second", "minute", "minute"]);
  });

  it("round to the minute across the hour, the day and the year", () => {
    expect(etaText("2027-12-31T23:59:30.000Z", "minute")).toBe("01 00:00");
    expect(instantText("2027-12-31T23:59:30.000Z", "minute")).toBe("2028-01-01 00:00 UTC");
    expect(instantText("2027-05-04T06:00:29.499Z", "second")).toBe("2027-05-04 06:00:29 UTC");
    expect(etaText(null, "minute")).toBe("–");
  });
});

describe("positions", () => {
  it("are degrees and minutes that carry into the degree", () => {
    expect(positionText(58.1032, -6.3871, "sea", false)).toBe("58°06.19'N 006°23.23'W");
    expect(positionText(9.999999, 179.999999, "sea", false)).toBe("10°00.00'N 180°00.00'E");
    expect(positionText(-0.00001, 0, "air", false)).toBe("00°00.00'N 000°00.00'E");
    expect(positionText(-33.5, 190.25, "air", true)).toBe("33°30.000'S 169°45.000'W");
  });
  it("are aligned decimal degrees under metric units, zero without a sign", () => {
    expect(positionText(-0.000001, -177, "metric", false)).toBe(" 0.0000 -177.0000".padStart(18));
    expect(positionText(-33.5, 6.25, "metric", true)).toBe("-33.500000    6.250000");
  });
});

describe("figures", () => {
  it("show a sign where asked, none on zero, and an exponent where too wide", () => {
    expect(placedText(12, 1, 6, true)).toBe("+1.2");
    expect(placedText(-12, 1, 6, true)).toBe("-1.2");
    expect(placedText(0, 1, 6, true)).toBe("0.0");
    expect(placedText(1234567, 1, 6)).toBe("1.2e+5");
    expect(placedText(null, 1, 6)).toBe("–");
  });
  it("keep to their width for any size", () => {
    fc.assert(
      fc.property(
        fc.double({ min: -1e300, max: 1e300, noNaN: true }),
        fc.integer({ min: 0, max: 3 }),
        (value, decimals) => {
          expect(placedText(Math.round(value), decimals, 7, true).length).toBeLessThanOrEqual(7);
        },
      ),
    );
  });
  it("round halves away from zero, as decimals and not as binary fractions", () => {
    expect(inLastPlace(1.005, 2)).toBe(101);
    expect(inLastPlace(-1.005, 2)).toBe(-101);
    expect(Object.is(inLastPlace(-0.001, 2), 0)).toBe(true);
  });
  it("add up: rows rounded by their running sum make the rounded total, each within one place", () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: -1e4, max: 1e4, noNaN: true }), { minLength: 1, maxLength: 30 }),
        (values) => {
          const { rows, total } = roundedRows(values, 1);
          const sum = values.reduce((a, b) => a + b, 0);
          expect(rows.reduce((a: number, b) => a + (b ?? 0), 0)).toBe(total);
          expect(total).toBe(inLastPlace(sum, 1));
          for (const [index, row] of rows.entries())
            expect(Math.abs((row ?? 0) - (values[index] ?? 0) * 10)).toBeLessThanOrEqual(1.0001);
        },
      ),
      { numRuns: 300 },
    );
  });
  it("stay empty from the first that is missing, and so does their total", () => {
    expect(roundedRows([1, null, 2], 0)).toEqual({ rows: [1, null, null], total: null });
  });
  it("never print an overdrawn store as zero", () => {
    expect(leftInLastPlace(-0.01, 1)).toBe(-1);
    expect(leftInLastPlace(0.01, 1)).toBe(0);
    expect(leftInLastPlace(-1e-12, 1)).toBe(0);
  });
});

describe("strangers' text", () => {
  it("loses controls, line separators and characters that turn the direction of writing", () => {
    expect(plainText("a\u0000b\nc\u2028d\u202ee\u2066f\ufeffg\u001b[2J")).toBe("a b c d e f g [2J");
    expect(plainText("\ud800x")).toBe("\ufffdx");
  });
  it("has the width of a terminal: wide scripts and emoji two, combining marks none", () => {
    expect([..."e\u0301"].length).toBe(2);
    expect(displayWidth("e\u0301")).toBe(1);
    expect(displayWidth("港口")).toBe(4);
    expect(displayWidth("👩‍🚀")).toBe(2);
    expect(displayWidth("🇮🇸")).toBe(2);
    expect(displayWidth("58°06'–→")).toBe(8);
  });
  it("is cut between characters, never within one", () => {
    expect(clipped("abcdef", 4)).toBe("abc…");
    expect(clipped("港港港", 4)).toBe("港…");
    expect(clipped("👩‍🚀👩‍🚀", 3)).toBe("👩‍🚀…");
    expect(clipped("abcd", 4)).toBe("abcd");
  });
  it("is isolated where it runs from right to left, and only there", () => {
    expect(isolated("مرسى")).toBe("\u2068مرسى\u2069");
    expect(isolated("Quay")).toBe("Quay");
    expect(displayWidth(isolated("مرسى"))).toBe(displayWidth("مرسى"));
  });
  it("is aligned by width", () => {
    expect(rightAligned("港", 4)).toBe("  港");
  });
  it("wraps within the width, words too long included, and loses nothing", () => {
    fc.assert(
      fc.property(
        fc.array(fc.string({ minLength: 1, maxLength: 30 }), { maxLength: 20 }),
        fc.integer({ min: 8, max: 40 }),
        (words, width) => {
          const text = plainText(words.join(" "));
          const lines = wrapped(text, width, "* ");
          for (const line of lines) expect(displayWidth(line)).toBeLessThanOrEqual(width);
          const bare = (value: string) => value.replace(/\s/g, "");
          expect(bare(lines.join(""))).toBe(bare(`* ${text}`));
        },
      ),
      { numRuns: 200 },
    );
  });
});
