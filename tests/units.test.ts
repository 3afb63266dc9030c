import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { InputError } from "../src/errors.ts";
import {
  type Dimension,
  dimensionOf,
  fromUnit,
  INNER_UNITS,
  parseQuantity,
  quantityPattern,
  readQuantity,
  symbolsOf,
  toUnit,
} from "../src/units.ts";

const SI = "SI Brochure, 9th edition (2019)";
const MONACO =
  "International Extraordinary Hydrographic Conference, Monaco 1929; SI Brochure, 8th edition, table 8";
const POUND = "international yard and pound agreement, 1959";

/** One of each unit in the inner unit, as a quotient of whole numbers, with the source of the definition. */
const DEFINITIONS: readonly (readonly [string, Dimension, number, number, string])[] = [
  ["m", "length", 1, 1, SI],
  ["km", "length", 1000, 1, `${SI}, table 7`],
  ["NM", "length", 1852, 1, MONACO],
  ["ft", "length", 3048, 10000, POUND],
  ["m2", "area", 1, 1, SI],
  ["m/s", "speed", 1, 1, SI],
  ["km/h", "speed", 1000, 3600, SI],
  ["kn", "speed", 1852, 3600, MONACO],
  ["ft/min", "speed", 3048, 600000, POUND],
  ["s", "time", 1, 1, SI],
  ["min", "time", 60, 1, `${SI}, table 8`],
  ["h", "time", 3600, 1, `${SI}, table 8`],
  ["kg", "mass", 1, 1, SI],
  ["t", "mass", 1000, 1, `${SI}, table 8`],
  ["lb", "mass", 45359237, 100000000, POUND],
  ["L", "volume", 1, 1, `${SI}, table 8: 1 L = 1 dm³`],
  ["m3", "volume", 1000, 1, `${SI}, table 8`],
  ["N", "force", 1, 1, SI],
  ["kN", "force", 1000, 1, SI],
  ["J", "energy", 1, 1, SI],
  ["kJ", "energy", 1000, 1, SI],
  ["MJ", "energy", 1000000, 1, SI],
  ["Wh", "energy", 3600, 1, `${SI}: 1 W for 3600 s`],
  ["kWh", "energy", 3600000, 1, SI],
  ["W", "power", 1, 1, SI],
  ["kW", "power", 1000, 1, SI],
  ["kg/h", "fuel rate by mass", 1, 3600, SI],
  ["t/d", "fuel rate by mass", 1000, 86400, `${SI}, table 8: 1 d = 86400 s`],
  ["L/h", "fuel rate by volume", 1, 3600, SI],
  ["g/kWh", "specific consumption", 1, 3600000000, SI],
  ["kg/m3", "density", 1, 1, SI],
  ["kg/L", "density", 1000, 1, SI],
  ["deg", "angle", 1, 1, "angles stay in degrees"],
  ["K", "temperature", 1, 1, SI],
  ["%", "share", 1, 100, `${SI}, section 5.4.7: % = 0.01`],
];

describe("units", () => {
  test.each(DEFINITIONS)(
    "one %s of %s is exactly %d/%d of the inner unit (%s)",
    (symbol, dimension, times, over) => {
      expect(parseQuantity(`1 ${symbol}`, dimension)).toBe(times / over);
      expect(dimensionOf(symbol)).toBe(dimension);
    },
  );

  test("degrees Celsius are offset by 273.15 (SI Brochure, section 2.3.1)", () => {
    expect(parseQuantity("0 degC", "temperature")).toBe(273.15);
    expect(parseQuantity("-40 degC", "temperature")).toBeCloseTo(233.15, 12);
    expect(toUnit(273.15, "degC")).toBe(0);
  });

  test("every unit of the table has its definition checked here", () => {
    const all = (Object.keys(INNER_UNITS) as Dimension[]).flatMap(symbolsOf);
    expect(all.filter((symbol) => symbol !== "degC").sort()).toEqual(
      DEFINITIONS.map(([symbol]) => symbol).sort(),
    );
    expect(new Set(all).size).toBe(all.length);
  });

  // Knot and nautical mile against feet and statute miles (1609.344 m): printed 1.150779 mph, 6076.1 ft, 1.687810 ft/s
  // (E. Williams, Aviation Formulary, units).
  test("a knot and a nautical mile agree with the printed conversions", () => {
    expect(fromUnit(1, "kn")).toBeCloseTo(0.5144444444444445, 15);
    expect((fromUnit(1, "kn") * 3600) / 1609.344).toBeCloseTo(1.150779448, 9);
    expect(toUnit(fromUnit(1, "NM"), "ft")).toBeCloseTo(6076.1154856, 6);
    expect(toUnit(fromUnit(1, "kn"), "ft/min") / 60).toBeCloseTo(1.6878098571, 9);
  });

  test("whole numbers of a unit round once: 12 kn is the double nearest to 6.17333…", () => {
    expect(parseQuantity("12 kn", "speed")).toBe(22224 / 3600);
    expect(parseQuantity("1.8 kWh", "energy")).toBe(6480000);
    expect(parseQuantity("20 %", "share")).toBe(0.2);
    expect(parseQuantity("90 s", "time")).toBe(90);
  });

  test.each([
    ["12 kn", 12],
    ["12.5 kn", 12.5],
    ["-3 kn", -3],
    ["+3 kn", 3],
    ["1e3 kn", 1000],
    ["2.5E-1 kn", 0.25],
    [".5 kn", 0.5],
    ["12kn", 12],
    ["  12   kn ", 12],
    ["12\u00a0kn", 12],
  ])("%j is read as a number of knots", (text, knots) => {
    expect(parseQuantity(text, "speed")).toBe((knots * 1852) / 3600);
  });

  test.each([
    [12, "found 12"],
    [null, "found null"],
    [undefined, "found nothing"],
    [["12 kn"], "found a list"],
    [{ kn: 12 }, "found an object"],
    ["", 'found ""'],
    ["kn", 'found "kn"'],
    ["12", 'found "12" (without a unit)'],
    ["Infinity kn", 'found "Infinity kn"'],
    ["NaN kn", 'found "NaN kn"'],
    ["0x10 kn", 'found "0x10 kn"'],
    ["1,5 kn", 'found "1,5 kn" (the decimal sign is a point)'],
    ["1e400 kn", 'found "1e400 kn" (too large a number)'],
    ["12. kn", 'found "12. kn"'],
    ["1 2 kn", 'found "1 2 kn"'],
    ["12 KN", "(did you mean kn?)"],
    ["12 Kn", "(did you mean kn?)"],
    ["12 kts", "(did you mean kn?)"],
    ["12 M/S", "(did you mean m/s?)"],
    ["12 kmh", "(did you mean km/h?)"],
    ["12 kg", "(kg is a unit of mass)"],
    ["12 furlong", 'found "12 furlong"'],
    ["12 kn kn", 'found "12 kn kn"'],
    ["12 kn\u2028x", "\\u2028"],
  ])("%j as a speed tells what was found and the units accepted", (text, found) => {
    const reading = () => parseQuantity(text, "speed");
    expect(reading).toThrow(InputError);
    expect(reading).toThrow('speed takes a number with one of m/s, km/h, kn, ft/min, as "12 kn"; found ');
    expect(reading).toThrow(found);
  });

  test.each([
    ["3 nm", "length", "NM"],
    ["3 nmi", "length", "NM"],
    ["3 l", "volume", "L"],
    ["3 kw", "power", "kW"],
    ["3 KWH", "energy", "kWh"],
    ["3 mj", "energy", "MJ"],
    ["3 l/h", "fuel rate by volume", "L/h"],
    ["3 m²", "area", "m2"],
    ["3 °C", "temperature", "degC"],
    ["3 hrs", "time", "h"],
    ["3 lbs", "mass", "lb"],
    ["3 percent", "share", "%"],
  ] as const)("%j as a %s suggests %s", (text, dimension, symbol) => {
    expect(() => parseQuantity(text, dimension)).toThrow(`(did you mean ${symbol}?)`);
  });

  test("a quantity of several dimensions says which it was, and keeps its text", () => {
    const rate = readQuantity("6 t/d", ["power", "fuel rate by mass"]);
    expect(rate).toEqual({
      value: 6000 / 86400,
      dimension: "fuel rate by mass",
      symbol: "t/d",
      text: "6 t/d",
    });
  });

  test("a place stands before the sentence", () => {
    expect(() => parseQuantity(12, "speed", "speed", { file: "a.craft.json", key: "speed" })).toThrow(
      /^a\.craft\.json: speed takes/,
    );
    expect(() =>
      parseQuantity(12, "speed", "the least speed", { file: "a.json", key: "speeds.min" }),
    ).toThrow(/^a\.json, speeds\.min: the least speed takes/);
  });

  test("an unknown symbol asked for by a program is a defect, not a user's fault", () => {
    expect(() => toUnit(1, "furlong")).toThrow(RangeError);
    expect(() => fromUnit(1, "furlong")).toThrow(RangeError);
    expect(dimensionOf("furlong")).toBeUndefined();
  });

  // One multiplication and one division each way, each within half an ulp: four half-ulps, 4.5e-16. The offset of degC adds
  // half an ulp of 1e9. Below 1e-200 figures come near the smallest normal double, 2.2e-308, and keep fewer digits.
  test("from a unit and back gives the number again", () => {
    const symbols = (Object.keys(INNER_UNITS) as Dimension[]).flatMap(symbolsOf);
    fc.assert(
      fc.property(
        fc.constantFrom(...symbols),
        fc.double({ min: -1e9, max: 1e9, noNaN: true }),
        (symbol, value) => {
          fc.pre(value === 0 || Math.abs(value) > 1e-200);
          const back = toUnit(fromUnit(value, symbol), symbol);
          expect(Math.abs(back - value)).toBeLessThanOrEqual(
            symbol === "degC" ? 2e-7 : 4.5e-16 * Math.abs(value),
          );
        },
      ),
      { numRuns: 2000 },
    );
  });

  test("a number written in a unit is read as fromUnit has it, and matches the schema's pattern", () => {
    fc.assert(
      fc.property(
        fc.constantFrom(...DEFINITIONS),
        fc.double({ min: -1e12, max: 1e12, noNaN: true }),
        ([symbol, dimension], value) => {
          const text = `${value} ${symbol}`;
          expect(parseQuantity(text, dimension)).toBe(fromUnit(value, symbol));
          expect(text).toMatch(new RegExp(quantityPattern([dimension]), "u"));
        },
      ),
      { numRuns: 1000 },
    );
  });

  test("any text is a finite quantity or an InputError of one line", () => {
    fc.assert(
      fc.property(fc.oneof(fc.string({ unit: "binary" }), fc.anything()), (text) => {
        try {
          expect(Number.isFinite(parseQuantity(text, "energy"))).toBe(true);
        } catch (error) {
          expect(error).toBeInstanceOf(InputError);
          expect((error as Error).message).not.toMatch(/[\n\r\u2028\u2029]/);
        }
      }),
      { numRuns: 2000 },
    );
  });
});
