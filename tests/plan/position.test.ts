import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { InputError } from "../../src/errors.ts";
import { parseCoordinate } from "../../src/plan/position.ts";
import { formatCoordinate, formatPosition } from "../../src/plan/position-format.ts";
import { parsePosition } from "../../src/plan/position-pair.ts";

describe("latitude and longitude", () => {
  const northern = 50 + 21.5 / 60;
  test.each([
    "50°21.5'N",
    "50° 21.5' N",
    "50 21.5 N",
    "50 21.5N",
    "50-21.5N",
    "50-21.5'N",
    "50:21.5N",
    "N50°21.5'",
    "N 50 21.5",
    "n50°21.5'",
    "50°21.5'n",
    "50º21.5'N",
    "50°21.5′N",
    "50°21.5’N",
    "50°21'30\"N",
    "50°21′30″N",
    "50°21’30”N",
    "50°21'30''N",
    "50 21 30 N",
    "50-21-30N",
    "50:21:30 N",
    "+50 21.5",
    "+50°21'30\"",
    "  50\u00a0°\u00a021.5'\u00a0N ",
  ])("%j is 50 degrees and 21.5 minutes north", (text) => {
    expect(parseCoordinate(text, "lat")).toBeCloseTo(northern, 13);
  });

  test.each([
    ["50.358 N", "lat", 50.358],
    ["50.358N", "lat", 50.358],
    ["50.358°S", "lat", -50.358],
    ["S 50.358", "lat", -50.358],
    ["+50.358", "lat", 50.358],
    ["50.358", "lat", 50.358],
    ["-4.15", "lon", -4.15],
    ["\u22124.15", "lon", -4.15],
    ["4°09'03\"W", "lon", -(4 + 9 / 60 + 3 / 3600)],
    ["004°09.05'W", "lon", -(4 + 9.05 / 60)],
    ["4 30 w", "lon", -4.5],
    ["-4 30", "lon", -4.5],
    ["e004°30'", "lon", 4.5],
    ["180°00.0'W", "lon", -180],
    ["179°59.99'E", "lon", 179 + 59.99 / 60],
    ["359.5", "lon", 359.5],
    ["350 30 E", "lon", 350.5],
    ["0°00.0'S", "lat", 0],
    ["90 00 S", "lat", -90],
    [50.358, "lat", 50.358],
    [-180, "lon", -180],
    [360, "lon", 360],
    [-0, "lat", 0],
  ] as const)("%j as %s is %d", (text, axis, degrees) => {
    expect(parseCoordinate(text, axis)).toBeCloseTo(degrees, 13);
    expect(Object.is(parseCoordinate(text, axis), -0)).toBe(false);
  });

  test.each([
    ["50°60.0'N", "lat", "latitude takes minutes below 60"],
    ["50°21'60\"N", "lat", "latitude takes seconds below 60"],
    ["50°21.5'30\"N", "lat", "latitude takes whole minutes before seconds"],
    ["50.5°21'N", "lat", "latitude takes whole degrees before minutes"],
    ["50°21.5'E", "lat", "latitude takes the hemisphere N or S"],
    ["4°09.05'N", "lon", "longitude takes the hemisphere E or W"],
    ["-50°21.5'N", "lat", "latitude takes a sign or a hemisphere letter, not both"],
    ["+4 W", "lon", "longitude takes a sign or a hemisphere letter, not both"],
    ["N50°21.5'N", "lat", "latitude takes one hemisphere letter"],
    ["50 21.5", "lat", "latitude takes a hemisphere, N or S, beside degrees and minutes"],
    ["50°21,5'N", "lat", "latitude takes a point as its decimal sign"],
    ["90°00.1'N", "lat", "latitude is in -90..90"],
    ["91 N", "lat", "latitude is in -90..90"],
    ["+5021.5", "lat", "latitude is in -90..90"],
    ["200 W", "lon", "longitude is in -180..180 or 0..360"],
    ["-180.5", "lon", "longitude is in -180..180 or 0..360"],
    ["361 E", "lon", "longitude is in -180..180 or 0..360"],
    [90.0001, "lat", "latitude is in -90..90"],
    [Number.NaN, "lat", "latitude is in -90..90"],
    [Number.POSITIVE_INFINITY, "lon", "longitude is in -180..180 or 0..360"],
    ["", "lat", "latitude takes degrees"],
    ["N", "lat", "latitude takes degrees"],
    ["north", "lat", "latitude takes degrees"],
    ["50'21.5\"N", "lat", "latitude takes degrees"],
    ['50°21.5"N', "lat", "latitude takes degrees"],
    ["50 21 30 15 N", "lat", "latitude takes degrees"],
    ["1e1", "lat", "latitude takes degrees"],
    ["+50.358-004.15", "lat", "latitude takes whole degrees before minutes"],
    ["50°21.5'N 4°W", "lon", "longitude takes degrees"],
    [null, "lat", "latitude takes degrees"],
    [[50], "lat", "latitude takes degrees"],
    [true, "lon", "longitude takes degrees"],
  ] as const)("%j as %s is refused: %s", (value, axis, rule) => {
    const reading = () => parseCoordinate(value, axis);
    expect(reading).toThrow(InputError);
    expect(reading).toThrow(rule);
    expect(reading).toThrow("; found ");
  });

  test("any text is a degree in range or an InputError of one line", () => {
    const piece = fc.constantFrom(
      "50",
      "4",
      "21.5",
      "60",
      "°",
      "'",
      '"',
      "N",
      "w",
      "-",
      "+",
      " ",
      ":",
      ",",
      "′",
      "x",
    );
    fc.assert(
      fc.property(
        fc.oneof(
          fc.array(piece).map((all) => all.join("")),
          fc.string({ unit: "binary" }),
        ),
        (text) => {
          try {
            const degrees = parseCoordinate(text, "lon");
            expect(degrees).toBeGreaterThanOrEqual(-180);
            expect(degrees).toBeLessThanOrEqual(360);
          } catch (error) {
            expect(error).toBeInstanceOf(InputError);
            expect((error as Error).message).not.toMatch(/[\n\r\u2028\u2029]/);
          }
        },
      ),
      { numRuns: 3000 },
    );
  });
});

describe("positions written", () => {
  test.each([
    [50.358333333333334, -4.150833333333333, "50°21.50'N 004°09.05'W", "50.35833, -4.15083"],
    [0, 0, "00°00.00'N 000°00.00'E", "0.00000, 0.00000"],
    [-0.0000001, -0.0000001, "00°00.00'N 000°00.00'E", "0.00000, 0.00000"],
    [59.99999, 359.99999, "60°00.00'N 000°00.00'E", "59.99999, -0.00001"],
    [-90, 180, "90°00.00'S 180°00.00'E", "-90.00000, 180.00000"],
    [1, -180, "01°00.00'N 180°00.00'W", "1.00000, -180.00000"],
    [1, 190, "01°00.00'N 170°00.00'W", "1.00000, -170.00000"],
    [1, 725, "01°00.00'N 005°00.00'E", "1.00000, 5.00000"],
    [1, -190, "01°00.00'N 170°00.00'E", "1.00000, 170.00000"],
  ])("%d, %d reads %s and %s", (lat, lon, minutes, decimal) => {
    expect(formatPosition(lat, lon, "minutes")).toBe(minutes);
    expect(formatPosition(lat, lon, "decimal")).toBe(decimal);
  });

  test("a rounded minute carries into the degree and never reads 60", () => {
    expect(formatCoordinate(9.999999, "lat", "minutes", 1)).toBe("10°00.0'N");
    expect(formatCoordinate(9.999, "lat", "minutes", 0)).toBe("10°00'N");
  });

  test("no number is written where there is none", () => {
    expect(() => formatPosition(Number.NaN, 0, "minutes")).toThrow(RangeError);
  });

  // Half a unit of the last decimal: 0.005′ is 8.4e-5°; 0.000005° in decimal degrees.
  test("what is written is read back to the last decimal", () => {
    fc.assert(
      fc.property(
        fc.double({ min: -90, max: 90, noNaN: true }),
        fc.double({ min: -180, max: 180, noNaN: true }),
        fc.constantFrom("minutes", "decimal"),
        (lat, lon, style) => {
          const half = style === "minutes" ? 8.34e-5 : 5.01e-6;
          const latText = formatCoordinate(lat, "lat", style);
          const lonText = formatCoordinate(lon, "lon", style);
          expect(`${latText} ${lonText}`).not.toMatch(/°60/);
          expect(Math.abs(parseCoordinate(latText, "lat") - lat)).toBeLessThanOrEqual(half);
          expect(Math.abs(parseCoordinate(lonText, "lon") - lon)).toBeLessThanOrEqual(half);
        },
      ),
      { numRuns: 1000 },
    );
  });
});

describe("a position in one text", () => {
  test.each([
    "50°30'N 4°15'W",
    "50°30'N, 4°15'W",
    "50°30'N4°15'W",
    "50 30 N / 4 15 W",
    "N50°30' W4°15'",
    "N50°30'W004°15'",
    "n 50 30, w 4 15",
    "50.5, -4.25",
    "50.5;-4.25",
    "50.5 -4.25",
    "50.5N 4.25W",
    "+50.5-004.25/",
    "+50.5-004.25",
    " 50°30'00\"N  004°15'00\"W ",
  ])("%j is 50.5 north, 4.25 west", (text) => {
    expect(parsePosition(text)).toEqual({ lat: 50.5, lon: -4.25 });
  });

  test.each([
    ["", "a position takes latitude and longitude"],
    ["50.5", "a position takes latitude and longitude"],
    ["50°30'N", "a position takes latitude and longitude"],
    ["50 30", "a position takes latitude and longitude"],
    ["4°15'W 50°30'N", "a position takes latitude and longitude"],
    ["+5030-00415/", "a position takes latitude and longitude"],
    ["50.5, -4.25, 10", "a position takes latitude and longitude"],
    ["50,5 4,25", "a position takes latitude and longitude"],
    ["95.5, -4.25", "latitude is in -90..90"],
    ["50°30'N 4°75'W", "longitude takes minutes below 60"],
  ])("%j is refused: %s", (text, rule) => {
    expect(() => parsePosition(text)).toThrow(InputError);
    expect(() => parsePosition(text)).toThrow(rule);
  });

  test("what formatPosition writes is read back, to half a unit of the last decimal", () => {
    fc.assert(
      fc.property(
        fc.double({ min: -90, max: 90, noNaN: true }),
        fc.double({ min: -180, max: 180, noNaN: true }),
        fc.constantFrom("minutes", "decimal"),
        (lat, lon, style) => {
          const back = parsePosition(formatPosition(lat, lon, style));
          const half = style === "minutes" ? 8.34e-5 : 5.01e-6;
          expect(Math.abs(back.lat - lat)).toBeLessThanOrEqual(half);
          expect(Math.abs(back.lon - lon)).toBeLessThanOrEqual(half);
        },
      ),
      { numRuns: 500 },
    );
  });
});
