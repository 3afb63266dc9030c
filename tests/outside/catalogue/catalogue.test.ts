import { describe, expect, it } from "vitest";
import { angleDifference } from "../../../src/geodesy/angle.ts";
import { type Answer, type Answers, CASES, type Expected, type Figure } from "./catalogue.ts";
import { energy } from "./energy.ts";
import { geodesics } from "./geodesics.ts";
import { griddedWinds } from "./gridded-winds.ts";
import { lines } from "./lines.ts";
import { LEFT_OUT, NOT_YET_COVERED } from "./not-covered.ts";
import { sailings } from "./sailings.ts";
import { standards } from "./standards.ts";
import { straightZermeloGroundSpeed, triangles } from "./triangles.ts";
import { turningBack } from "./turning-back.ts";

/*
 * Every case of checks.json against our figures: one test a quantity (more where it is reached in several ways), its tolerances
 * those of the catalogue.
 */

const ANSWERS: Answers = {
  ...sailings,
  ...triangles,
  ...geodesics,
  ...lines,
  ...griddedWinds,
  ...energy,
  ...standards,
  ...turningBack,
};

const answersTo = (id: string, quantity: string): readonly Answer[] => {
  const found = ANSWERS[id]?.[quantity];
  if (found === undefined) return [];
  return Array.isArray(found) ? (found as readonly Answer[]) : [found as Answer];
};

/** Our figure agrees with another of the same shape, number by number within a tolerance. */
function expectNear(ours: Figure, other: Figure, tolerance: number, direction: boolean): void {
  if (typeof other === "string") {
    expect(ours).toBe(other);
  } else if (typeof other === "number") {
    const difference = direction ? angleDifference(other, ours as number) : (ours as number) - other;
    expect(Math.abs(difference), `ours ${ours}, theirs ${other}, tolerance ${tolerance}`).toBeLessThanOrEqual(
      tolerance,
    );
  } else {
    const list = ours as readonly Figure[];
    expect(list).toHaveLength(other.length);
    other.forEach((each, n) => {
      expectNear(list[n] as Figure, each, tolerance, direction);
    });
  }
}

function toleranceOf(answer: Answer, expected: Expected): number {
  if (answer.toleranceInUnit === undefined) return expected.tol;
  expect(expected.unit).toContain(answer.toleranceInUnit);
  return Number.parseFloat(answer.toleranceInUnit);
}

const PLAIN_NUMBER = /^[+-]?\d+(?:\.(\d+))?$/;

/** The printed figure and how near ours has to come; `null` where there is none to compare with. */
function printedFigure(answer: Answer, expected: Expected): { figure: Figure; within: number } | null {
  const { published = "", tol_vs_published: within } = expected;
  if (within === undefined || answer.printed === null) return null;
  const plain = PLAIN_NUMBER.exec(published);
  const figure = answer.printed ?? (plain === null ? undefined : Number(published));
  if (figure === undefined) throw new Error(`"${published}" is no plain number: say what it is`);
  if (within > 0) return { figure, within };
  const lastPlace = plain === null ? answer.printedWithin : 0.5 * 10 ** -(plain[1]?.length ?? 0);
  if (lastPlace === undefined) throw new Error(`"${published}" is no plain number: say its last place`);
  return { figure, within: lastPlace };
}

async function check(answer: Answer, expected: Expected): Promise<void> {
  const ours = await answer.ours();
  const value = answer.part === undefined ? expected.value : answer.part(expected.value);
  const direction = answer.direction === true;
  expectNear(ours, value, toleranceOf(answer, expected), direction);
  const printed = printedFigure(answer, expected);
  if (printed === null) return;
  const { figure, within } = printed;
  // Several prints of one figure: ours agrees with each.
  const prints = typeof ours === "number" && Array.isArray(figure) ? figure : [figure];
  for (const print of prints) expectNear(ours, print as Figure, within, direction);
}

for (const { id, title, source, expected } of CASES) {
  if (ANSWERS[id] === undefined) continue;
  describe(`${id} ${title} [${source}]`, () => {
    for (const [quantity, what] of Object.entries(expected)) {
      for (const answer of answersTo(id, quantity)) {
        it(`${quantity}: ${answer.words}`, { timeout: 120_000 }, () => check(answer, what));
      }
    }
  });
}

describe("what the catalogue demands beside its figures", () => {
  it("the straight way from the textbook's start of Zermelo's problem cannot be sailed: ground speed -1.12 (WIND-06, notes)", () => {
    expect(straightZermeloGroundSpeed()).toBeCloseTo(-1.12, 2);
  });
});

describe("the coverage of the catalogue", () => {
  const ids = CASES.map(({ id }) => id);

  it("covers or names as not yet covered each of the 70 cases", () => {
    expect(ids).toHaveLength(70);
    const listed = [...Object.keys(ANSWERS), ...Object.keys(NOT_YET_COVERED)];
    expect(listed.sort()).toEqual([...ids].sort());
  });

  it("checks no case that it names as not yet covered", () => {
    expect(Object.keys(NOT_YET_COVERED).filter((id) => ANSWERS[id] !== undefined)).toEqual([]);
  });

  it("checks every quantity of a covered case, or names it as left out with a reason", () => {
    const quantities = CASES.filter(({ id }) => ANSWERS[id] !== undefined).flatMap(({ id, expected }) =>
      Object.keys(expected).map((quantity) => [id, quantity] as const),
    );
    const unchecked = quantities.filter(([id, quantity]) => answersTo(id, quantity).length === 0);
    expect(unchecked.map(([id, quantity]) => `${id}.${quantity}`).sort()).toEqual(
      Object.keys(LEFT_OUT).sort(),
    );
  });

  it("answers to no quantity that the catalogue does not have", () => {
    const known = new Set(
      CASES.flatMap(({ id, expected }) => Object.keys(expected).map((q) => `${id}.${q}`)),
    );
    const answered = Object.entries(ANSWERS).flatMap(([id, of]) => Object.keys(of).map((q) => `${id}.${q}`));
    expect(answered.filter((each) => !known.has(each))).toEqual([]);
  });
});
