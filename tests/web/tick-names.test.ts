import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { shownNames, type TickName } from "../../web/ribbon/tick-names.ts";

function named(text: string, x: number, anchor: TickName["anchor"] = "middle"): TickName {
  return { text, x, anchor };
}

function texts(names: readonly TickName[]): string[] {
  return [...shownNames(names)].map(({ text }) => text);
}

describe("the names below a ribbon", () => {
  test("all stand where there is room", () => {
    const names = [named("Quay", 0, "start"), named("Head", 200), named("Skerrin", 400, "end")];
    expect(new Set(texts(names))).toEqual(new Set(["Quay", "Head", "Skerrin"]));
  });

  test("give way to the first and the last where they would overlap", () => {
    const names = [
      named("Sound south", 0, "start"),
      named("Sound north", 90),
      named("North light", 180, "end"),
    ];
    expect(texts(names)).toEqual(["Sound south", "North light"]);
  });

  test("are the first alone on a ribbon shorter than two names", () => {
    expect(texts([named("Departure", 0, "start"), named("Arrival", 60, "end")])).toEqual(["Departure"]);
    expect(texts([])).toEqual([]);
  });

  test("never overlap, and always show the first", () => {
    const tick = fc.record({
      text: fc.string({ minLength: 1, maxLength: 12 }),
      x: fc.integer({ min: 0, max: 600 }),
    });
    fc.assert(
      fc.property(fc.array(tick, { minLength: 1, maxLength: 12 }), (ticks) => {
        const names = ticks.map(({ text, x }) => named(text, x));
        const shown = [...shownNames(names)];
        expect(shown[0]).toBe(names[0]);
        const half = ({ text }: TickName): number => (6.3 * text.length) / 2;
        for (const [at, one] of shown.entries()) {
          for (const other of shown.slice(at + 1)) {
            expect(Math.abs(one.x - other.x)).toBeGreaterThanOrEqual(half(one) + half(other));
          }
        }
      }),
      { numRuns: 200 },
    );
  });
});
