import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { AxisLearner } from "../../src/field/axis-learner.ts";
import { longitudeAxis } from "../../src/field/longitude-axis.ts";
import { CellFault, numberCell } from "../../src/field/number-cell.ts";
import { timeCell } from "../../src/field/time-cell.ts";

describe("a number in a cell", () => {
  test("is the nearest float64, as the language itself reads it", () => {
    const digits = fc.stringMatching(/^-?\d{1,17}(\.\d{0,24})?$/);
    const numbers = fc.oneof(
      fc.double({ noDefaultInfinity: true, noNaN: true }).map(String),
      digits,
      fc.float().map((one) => one.toFixed(3)),
    );
    fc.assert(
      fc.property(numbers, (text) => {
        fc.pre(Number.isFinite(Number(text)));
        expect(numberCell(text, false)).toBe(Number(text));
        expect(numberCell(` ${text}\r`, false)).toBe(Number(text));
        expect(numberCell(text.replace(".", ","), true)).toBe(Number(text));
      }),
      { numRuns: 5000 },
    );
  });

  test("is never anything that is not a decimal number", () => {
    fc.assert(
      fc.property(
        fc.oneof(fc.string(), fc.stringMatching(/^[-+.,eE0-9 ]{0,8}$/)),
        fc.boolean(),
        (text, decimalComma) => {
          const trimmed = decimalComma ? text.trim().replace(",", ".") : text.trim();
          const isNumber =
            /^[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d+)?$/.test(trimmed) && Number.isFinite(Number(trimmed));
          const isMissing = trimmed === "" || trimmed.toLowerCase() === "nan";
          if (isNumber) expect(numberCell(text, decimalComma)).toBe(Number(trimmed));
          else if (isMissing) expect(numberCell(text, decimalComma)).toBeNaN();
          else expect(() => numberCell(text, decimalComma)).toThrow(CellFault);
        },
      ),
      { numRuns: 3000 },
    );
  });
});

describe("a time in a cell", () => {
  test("is the instant that the language's own calendar has", () => {
    const instants = fc.date({
      min: new Date("0001-01-02T00:00Z"),
      max: new Date("9998-12-30T00:00Z"),
      noInvalidDate: true,
    });
    fc.assert(
      fc.property(instants, fc.integer({ min: -1439, max: 1439 }), (instant, lead) => {
        const local = new Date(instant.getTime() + lead * 60_000).toISOString().slice(0, -1);
        const size = Math.abs(lead);
        const [hours, minutes] = [Math.floor(size / 60), size % 60].map((part) =>
          String(part).padStart(2, "0"),
        );
        expect(timeCell(instant.toISOString())).toBe(instant.getTime());
        expect(timeCell(`${local}${lead < 0 ? "-" : "+"}${hours}:${minutes}`)).toBe(instant.getTime());
      }),
      { numRuns: 1000 },
    );
  });

  test.each([
    ["2027-05-04T06:00Z", "2027-05-04T06:00:00Z"],
    ["2027-05-04 06:00:00+00:00", "2027-05-04T06:00:00Z"],
    ["2027-05-04t06:00:00.25z", "2027-05-04T06:00:00.250Z"],
    ["2027-05-04T06:00:00,5-0330", "2027-05-04T09:30:00.500Z"],
    ["20270504T0600+02", "2027-05-04T04:00:00Z"],
    [" 2028-02-29T23:59:59Z\r", "2028-02-29T23:59:59Z"],
  ])("may be written %s", (written, plain) => {
    expect(timeCell(written)).toBe(Date.parse(plain));
  });
});

describe("an axis that is being learned", () => {
  test("gives every value the index of its first appearance, whatever came before", () => {
    const cells = fc.array(fc.constantFrom("1", "2", "3", "1.0", "-0", "0", "2.50", "2.5", " 3"), {
      maxLength: 200,
    });
    fc.assert(
      fc.property(cells, (texts) => {
        const learner = new AxisLearner(Number);
        const values: number[] = [];
        for (const text of texts) {
          const value = Number(text) + 0;
          if (!values.includes(value)) values.push(value);
          expect(learner.indexOf(text)).toBe(values.indexOf(value));
        }
        expect(learner.values).toEqual(values);
      }),
      { numRuns: 300 },
    );
  });

  test("keeps its values apart however many spellings they have", () => {
    const learner = new AxisLearner(Number);
    for (let zeros = 0; zeros < 3000; zeros++) {
      expect(
        learner.indexOf(
          `1.${"0".repeat(zeros % 100)}${zeros % 3 === 0 ? "" : `e${"0".repeat(zeros % 40)}0`}`,
        ),
      ).toBe(0);
      expect(learner.indexOf(`${zeros % 5}2`)).toBeGreaterThan(0);
    }
    expect(learner.values.length).toBe(6);
  });
});

describe("an axis of longitudes", () => {
  const longitudes = fc
    .uniqueArray(fc.integer({ min: 0, max: 719 }), { minLength: 1, maxLength: 30 })
    .map((halves) => halves.map((half) => half / 2));
  const turns = fc.array(fc.integer({ min: -2, max: 2 }), { minLength: 30, maxLength: 30 });

  test("holds every longitude once, ascending, and no step but the seam is wider than the opening left out", () => {
    fc.assert(
      fc.property(longitudes, turns, (lons, turned) => {
        const found = lons.map((lon, index) => lon + 360 * (turned[index] as number));
        const { lon, sources, global } = longitudeAxis(found);
        expect(lon.length).toBe(lons.length + (global ? 1 : 0));
        expect([...sources.slice(0, lons.length).flat()].sort((a, b) => a - b)).toEqual([...lons.keys()]);
        const steps = [...lon.slice(1)].map((one, index) => one - (lon[index] as number));
        expect(steps.every((step) => step > 0)).toBe(true);
        for (const [index, [source]] of sources.entries() as Iterable<[number, number[]]>) {
          // Half degrees are exact in binary.
          expect((((lon[index] as number) - (found[source as number] as number)) % 360) + 0).toBe(0);
        }
        const last = lon[lon.length - 1] as number;
        const opening = 360 - (last - (lon[0] as number));
        if (global) expect(opening).toBe(0);
        else if (lons.length > 1) expect(opening).toBeGreaterThan(Math.max(...steps));
        expect(lon[0]).toBeGreaterThanOrEqual(-180);
        expect(lon[0]).toBeLessThan(180);
      }),
      { numRuns: 500 },
    );
  });

  test("of one meridian under several turns is one", () => {
    const { lon, sources, global } = longitudeAxis([359.9, -0.1, 719.9]);
    expect([...lon]).toEqual([-0.1]);
    expect(sources).toEqual([[0, 1, 2]]);
    expect(global).toBe(false);
  });

  test("does not part meridians that meet at 180 by their rounding", () => {
    expect(longitudeAxis([-180, 179.9999999999, 0]).lon.length).toBe(3);
    expect(longitudeAxis([180, 0]).lon.length).toBe(3);
  });
});
