import { describe, expect, test } from "vitest";
import type { DecidedRoute, EnsembleResult, ErrorSpread } from "../../web/core.ts";
import { ensembleWords, missWords, spreadWords } from "../../web/spread/spread-words.ts";
import { createPageView } from "../../web/state/page-view.ts";

const view = createPageView();
view.zone.value = "UTC";
const notAfter = "2027-05-04T13:00:00.000Z";
const arrive = { notBefore: null, notAfter, solutions: [], chosen: 0, nearest: null, reason: null };
const route = (asked: object) =>
  ({
    storeUnit: "J",
    usable: 1e9,
    reserve: 0,
    departure: "2027-05-04T06:00:00.000Z",
    legs: [],
    ...asked,
  }) as unknown as DecidedRoute;
const ensemble = {
  members: [0, 4, 9, 11],
  reserveHolds: 1,
  breaksReserve: [],
  doesNotArrive: [],
  arrival: null,
  remaining: null,
} as unknown as EnsembleResult;
const spread = {
  reserveHolds: 1,
  arrival_s: 60,
  use: 1,
  remaining: 1,
  weakest: { use: null, time: null },
} as unknown as ErrorSpread;

describe("the words on an arrival asked for", () => {
  const told = { ...ensemble, arrivalHolds: 0.5, arrivesEarly: [4], arrivesLate: [11] };

  test("count the members that keep it, and name those that do not", () => {
    const words = ensembleWords(
      route({ arrive: { ...arrive, notBefore: "2027-05-04T12:30:00.000Z" } }),
      told,
      view,
    );
    expect(words.slice(1)).toEqual([
      "Arrives between 12:30 and 13:00 in 2 of 4 members (50 %).",
      "Too early in member 4.",
      "Too late in member 11.",
    ]);
    const [, at] = ensembleWords(route({ arrive: { ...arrive, notBefore: notAfter } }), told, view);
    expect(at).toBe("Arrives by 13:00 in 2 of 4 members (50 %).");
  });

  test("give its probability under the stated error", () => {
    const words = spreadWords(route({ arrive }), { ...spread, arrivalHolds: 0.715 }, view);
    expect(words[1]).toBe("Arrives by 13:00 with a probability of 72 %.");
  });

  test("are none where the pace says how fast", () => {
    expect(ensembleWords(route({}), ensemble, view)).toHaveLength(1);
    expect(spreadWords(route({}), spread, view).join(" ")).not.toContain("Arrives");
  });

  test("say by how much a what-if misses it, and nothing where it keeps it", () => {
    expect(missWords(1500)).toBe(" (25 min late)");
    expect(missWords(-5400)).toBe(" (1 h 30 early)");
    expect([missWords(0), missWords(null), missWords(undefined)]).toEqual(["", "", ""]);
  });
});
