import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { EXTENDED_FORMAT, readInstant, writtenInstant } from "../src/instant.ts";

describe("an instant as one would write it", () => {
  test("has no more digits than it needs", () => {
    expect(writtenInstant(Date.UTC(2027, 4, 4, 6))).toBe("2027-05-04T06:00Z");
    expect(writtenInstant(Date.UTC(2027, 4, 4, 6, 30, 5))).toBe("2027-05-04T06:30:05Z");
    expect(writtenInstant(Date.UTC(2027, 4, 4, 6, 30, 5, 70))).toBe("2027-05-04T06:30:05.070Z");
    expect(writtenInstant(Date.UTC(2027, 4, 4, 6, 30, 0, 1))).toBe("2027-05-04T06:30:00.001Z");
  });

  test("is read back as what it was", () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: Date.UTC(9999, 0) }), (instant) => {
        expect(readInstant(writtenInstant(instant), [EXTENDED_FORMAT])).toBe(instant);
      }),
      { endOnFailure: true },
    );
  });
});
