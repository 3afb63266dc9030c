import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { sinDegrees } from "../../src/craft/direction.ts";
import { madeGood } from "../../src/craft/made-good.ts";
import { componentsFromCurrent, solveTriangle } from "../../src/craft/triangle.ts";
import { InputError } from "../../src/errors.ts";

describe("madeGood", () => {
  test("undoes solveTriangle: the heading that holds a course makes that course good", () => {
    const component = fc.double({ min: -20, max: 20, noNaN: true });
    fc.assert(
      fc.property(
        fc.double({ min: 0, max: 359.9, noNaN: true }),
        fc.double({ min: 0.5, max: 60, noNaN: true }),
        component,
        component,
        (course_deg, throughSpeed, u, v) => {
          const held = solveTriangle({ course_deg, throughSpeed, u, v });
          if (!held.holdable) return;
          const made = madeGood({ heading_deg: held.heading_deg, throughSpeed, u, v });
          // An ulp of 360° in the heading moves the end of the vector V by 1e-15 V, and turns a short g by that over g.
          const moved = 4e-15 * (throughSpeed + Math.abs(u) + Math.abs(v));
          expect(Math.abs(made.groundSpeed - held.groundSpeed)).toBeLessThanOrEqual(moved);
          expect(Math.abs(sinDegrees(made.course_deg - course_deg)) * held.groundSpeed).toBeLessThanOrEqual(
            moved,
          );
        },
      ),
      { numRuns: 2000 },
    );
  });

  test("heading 080 at 10 kn in a current setting 140 at 2 kn makes good 089 at 11.1 kn (Bowditch, Dead Reckoning)", () => {
    const made = madeGood({ heading_deg: 80, throughSpeed: 10, ...componentsFromCurrent(2, 140) });
    // Printed from a drawn diagram as 089 and 11.2: half a degree and a tenth of a knot is all that it carries.
    expect(Math.abs(made.course_deg - 89)).toBeLessThan(0.5);
    expect(Math.abs(made.groundSpeed - 11.2)).toBeLessThan(0.1);
  });

  test("stays where it is when it stems the flow exactly", () => {
    expect(madeGood({ heading_deg: 180, throughSpeed: 3, u: 0, v: 3 })).toEqual({
      course_deg: 0,
      groundSpeed: 0,
    });
  });

  test.each([
    { heading_deg: Number.NaN },
    { throughSpeed: -1 },
    { u: Number.POSITIVE_INFINITY },
    { v: Number.NaN },
  ])("refuses %j", (fault) => {
    expect(() => madeGood({ heading_deg: 0, throughSpeed: 3, u: 0, v: 0, ...fault })).toThrow(InputError);
  });
});
