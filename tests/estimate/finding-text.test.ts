import { describe, expect, test } from "vitest";
import { minuteText, missedArrivalText, momentText, speedTexts } from "../../src/estimate/finding-text.ts";

const at = (iso: string) => Date.parse(iso);

describe("a moment in a finding", () => {
  test("has seconds where there are any, so that what is just outside a time never reads as that time", () => {
    expect(momentText(at("2027-05-04T06:00:00Z"))).toBe("2027-05-04 06:00 UTC");
    expect(momentText(at("2027-05-04T05:59:40Z"))).toBe("2027-05-04 05:59:40 UTC");
    // A root under way ends up to a microsecond off.
    expect(momentText(at("2027-05-04T06:00:00Z") - 0.001)).toBe("2027-05-04 06:00 UTC");
  });

  test("that was worked out is rounded to the minute as a table's is, over midnight too", () => {
    expect(minuteText(at("2027-05-04T11:25:34Z"))).toBe("2027-05-04 11:26 UTC");
    expect(minuteText(at("2027-05-04T11:25:29Z"))).toBe("2027-05-04 11:25 UTC");
    expect(minuteText(at("2027-12-31T23:59:30Z"))).toBe("2028-01-01 00:00 UTC");
  });
});

describe("an arrival missed", () => {
  test("by seconds has them, and by more is rounded to the minute", () => {
    expect(missedArrivalText(at("2027-05-04T10:59:52Z"), 8)).toBe("2027-05-04 10:59:52 UTC");
    expect(missedArrivalText(at("2027-05-04T11:33:42Z"), 822)).toBe("2027-05-04 11:34 UTC");
  });
});

describe("a speed beside the limit that it passes", () => {
  test("has the decimals that tell the two apart in both units", () => {
    expect(speedTexts(15.2, 14)).toEqual(["15.2 m/s (29.5 kn)", "14.0 m/s (27.2 kn)"]);
    expect(speedTexts(2.05, 2.0578)).toEqual(["2.05 m/s (3.98 kn)", "2.06 m/s (4.00 kn)"]);
    expect(speedTexts(14.00001, 14)).toEqual(["14.0000 m/s (27.2138 kn)", "14.0000 m/s (27.2138 kn)"]);
  });
});
