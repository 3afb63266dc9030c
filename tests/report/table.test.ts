import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { ADVISORY } from "../../src/constants.ts";
import type { Units } from "../../src/report/input.ts";
import { displayWidth } from "../../src/report/plain-text.ts";
import { writeTable } from "../../src/report/table.ts";
import {
  drone,
  droneSketch,
  finding,
  ocean,
  oceanSketch,
  reportOf,
  tender,
  tenderSketch,
} from "./fixtures.ts";

const UNITS: readonly Units[] = ["sea", "air", "metric"];
const ALL = { tender, drone, ocean };

/** Figures of the leg rows under a route's banner, split at spaces; the totals row last. */
function legRows(table: string, route: number): string[][] {
  const block = table.split(/^== .* ==$/m)[route + 1] ?? "";
  const legs = block.slice(0, block.indexOf("Ledger"));
  return legs
    .split("\n")
    .filter((line) => /^ {3}\d{3} |^All/.test(line))
    .map((line) => line.trim().split(/ {1,}/));
}

function ledgerRows(table: string, route: number): string[][] {
  const block = table.split(/^== .* ==$/m)[route + 1] ?? "";
  const ledger = block.slice(block.indexOf("Ledger"), block.indexOf("Within the legs"));
  return ledger
    .split("\n")
    .filter((line) => /^ *\d+ |^All/.test(line))
    .map((line) => line.trim().split(/ +/));
}

/** h:mm or h:mm:ss as whole minutes or seconds. */
function clock(text: string): number {
  const sign = text.startsWith("-") ? -1 : 1;
  return (
    sign *
    text
      .replace(/^[+-]/, "")
      .split(":")
      .reduce((sum, part) => sum * 60 + Number(part), 0)
  );
}

const minutesOfDay = (text: string) => clock(text);
const tenths = (text: string) => Math.round(Number(text) * 10);

describe("the leg table", () => {
  for (const [name, input] of Object.entries(ALL)) {
    for (const units of UNITS) {
      it(`of the ${name} in ${units} units is at most 80 columns wide, and its rules are 80`, () => {
        const lines = writeTable(input, units).split("\n");
        expect(Math.max(...lines.map(displayWidth))).toBe(80);
        for (const line of lines.filter((each) => /^(-+|=+)$|^== /.test(each)))
          expect(displayWidth(line)).toBe(80);
        expect(lines.every((line) => line === line.trimEnd())).toBe(true);
        expect(lines.join("\n")).not.toMatch(/NaN|undefined|null|Infinity|:60\b|\b360\b/);
      });
    }
  }

  it("prints rows that add up to the printed totals", () => {
    const rows = legRows(writeTable(tender, "sea"), 0);
    const legs = rows.slice(0, -1);
    const total = rows.at(-1) ?? [];
    expect(legs).toHaveLength(2);
    const sum = (values: number[]) => values.reduce((a, b) => a + b, 0);
    // Columns: course, magnetic, distance, along, cross, STW, SOG, heading, time, day, ETA, use, left; totals lack courses and heading.
    expect(sum(legs.map((row) => Math.round(Number(row[2]) * 100)))).toBe(Math.round(Number(total[1]) * 100));
    expect(sum(legs.map((row) => clock(row[8] ?? "")))).toBe(clock(total[6] ?? ""));
    expect(sum(legs.map((row) => tenths(row[11] ?? "")))).toBe(tenths(total[9] ?? ""));
  });

  it("takes each leg's use from what was left before it", () => {
    const rows = legRows(writeTable(ocean, "sea"), 0);
    let left = 6200;
    for (const row of rows.slice(0, -1)) {
      left -= tenths(row.at(-2) ?? "");
      expect(tenths(row.at(-1) ?? "")).toBe(left);
    }
    expect(rows).toHaveLength(10);
  });

  it("prints times that lead from one ETA to the next, stays included", () => {
    const rows = legRows(writeTable(tender, "sea"), 0);
    const first = minutesOfDay(rows[0]?.[10] ?? "");
    expect(first).toBe(6 * 60 + clock(rows[0]?.[8] ?? ""));
    expect(minutesOfDay(rows[1]?.[10] ?? "")).toBe(first + 5 + clock(rows[1]?.[8] ?? ""));
  });

  it("prints a ledger in which still, along and cross are the time, and still and penalty the use, in every row", () => {
    for (const [input, routes] of [
      [tender, 2],
      [drone, 1],
      [ocean, 2],
    ] as const) {
      const table = writeTable(input, "sea");
      for (let route = 0; route < routes; route += 1) {
        const rows = ledgerRows(table, route);
        expect(rows.length).toBeGreaterThan(2);
        for (const [
          ,
          still = "",
          along = "",
          cross = "",
          time = "",
          ,
          calm = "",
          penalty = "",
          use = "",
        ] of rows) {
          expect(clock(still) + clock(along) + clock(cross)).toBe(clock(time));
          expect(tenths(calm) + tenths(penalty)).toBe(tenths(use));
        }
        for (const column of [1, 2, 3, 4]) {
          const figures = rows.map((row) => clock(row[column] ?? ""));
          expect(figures.slice(0, -1).reduce((a, b) => a + b, 0)).toBe(figures.at(-1));
        }
      }
    }
  });

  it("prints the figures of a hand-worked leg", () => {
    // 24185.4 m at 12 kn (6.17333 m/s), 0.31 m/s against, 0.44 m/s to starboard: g = sqrt(6.17333² - 0.44²) - 0.31 = 5.84763 m/s,
    // 4135.9 s = 1:08:56, 11.37 kn over the ground, heading 313.6 - asin(0.44/6.17333) = 309.5; 61.8 kW for it is 71.0 kWh,
    // and 6.18 kW for five minutes 0.5 kWh.
    const [row] = legRows(writeTable(tender, "sea"), 0);
    expect(row).toEqual([
      "314",
      "317",
      "13.06",
      "-0.6",
      "+0.9",
      "12.0",
      "11.4",
      "310",
      "1:09",
      "04",
      "07:09",
      "71.5",
      "144.5",
    ]);
  });

  it("shows no figures from the leg on where a route stops, but how far it came", () => {
    const table = writeTable(tender, "sea");
    const rows = legRows(table, 2);
    expect(rows[1]?.slice(2)).toEqual(["8.69", "–", "–", "–", "–", "–", "–", "–", "–", "–"]);
    expect(rows[2]?.slice(3).every((cell) => cell === "–")).toBe(true);
    expect(table.replace(/\n/g, " ")).toContain(
      "Ends on leg 2 to Race, 2.33 NM along it, 0:36:46 after departure: 37.9 kWh used, 178.1 kWh left.",
    );
  });

  it("prints the still time under way in the ledger of a leg on which a route stops, its stay apart", () => {
    const still = (input: typeof tender) => ledgerRows(writeTable(input, "sea"), 2)[1]?.[1];
    const route = tender.estimate.routes[2];
    const stopped = route?.legs[1];
    if (route === undefined || stopped === undefined) throw new Error("the fixture has a third route");
    const stays = { ...stopped, stay_s: 1200 };
    const routes = tender.estimate.routes.with(2, { ...route, legs: route.legs.with(1, stays) });
    expect(stopped.time_s).toBeNull();
    expect(still({ ...tender, estimate: { ...tender.estimate, routes } })).toBe(still(tender));
  });

  it("marks the best of the routes that do not stop, and only those", () => {
    const table = writeTable(tender, "sea");
    const rows = table.slice(table.indexOf("Routes compared")).split("\n");
    expect(rows.find((line) => line.startsWith("Outer"))).toMatch(
      /27\.70\* .*2:16\* .*04 08:21\* .*141\.1\* .*74\.9\*$/,
    );
    expect(rows.find((line) => line.startsWith("Inner"))).not.toContain("*");
    expect(writeTable(drone, "air")).not.toContain("Routes compared");
  });

  it("says by how much the reserve is kept or broken", () => {
    const text = writeTable(tender, "sea").replace(/\n/g, " ");
    expect(text).toContain("Reserve 43.2 kWh: 31.7 kWh above it on arrival.");
    expect(text).toContain("Reserve 43.2 kWh: 44.7 kWh SHORT of it on arrival.");
  });

  it("heads with title, craft, pace, departure, store, and every field with its validity", () => {
    const head = writeTable(tender, "sea").split("\n== ")[0];
    expect(head).toBe(
      [
        "Supply run to Skerrin",
        "Craft:     Nine-metre tender, holds 12.0 kn through the water",
        "Departure: 2027-05-04 06:00 UTC",
        "Store:     216.0 kWh usable",
        "Current:   sound-current.csv; valid 2027-05-04 00:00 to 2027-05-05 00:00 UTC",
        "Wind:      sound-wind.csv; steady",
        "",
      ].join("\n"),
    );
  });

  it("puts the gravest finding first", () => {
    const mixed = reportOf({
      ...droneSketch,
      routes: droneSketch.routes.map((route) => ({
        ...route,
        findings: [
          finding({ code: "no-field", severity: "note", message: "third" }),
          finding({ code: "gap-filled", severity: "caution", leg: 1, message: "second" }),
          finding({
            code: "store-empty",
            severity: "stop",
            leg: 2,
            at_m: 1852,
            to_m: 1852,
            message: "first",
          }),
        ],
      })),
    });
    const table = writeTable(mixed, "sea");
    expect(table).toContain("STOP    first\ncaution second\nnote    third\n");
  });

  it("ends with the advisory, whole", () => {
    expect(writeTable(drone, "metric").replace(/\n/g, " ").trimEnd().endsWith(ADVISORY)).toBe(true);
  });

  it("gives seconds, feet and a third decimal of the minute to a short flight", () => {
    const table = writeTable(drone, "air");
    expect(table).toContain("h:mm:ss");
    expect(table).toContain("197 ft  46°30.900'N 007°58.200'E");
  });

  it("gives tonnes to a large fuel store and decimal degrees under metric units", () => {
    const table = writeTable(ocean, "metric");
    expect(table).toContain("Store:     620.0 t usable");
    expect(table).toContain("42.0000 -177.0000");
  });

  it("keeps its width and its lines whatever the names hold", () => {
    const piece = fc.constantFrom(
      "\u001b[31m",
      "\u202e",
      "مرسى",
      "港",
      "👩‍🚀",
      "🇮🇸",
      "é́́",
      "<b>",
      "\n",
      "\r",
      "\u0000",
      "\ud800",
      "1️⃣",
      "ａ",
      " ",
      "= ",
    );
    const name = fc.oneof(
      fc.string({ unit: "binary", maxLength: 60 }),
      fc.array(piece, { maxLength: 60 }).map((parts) => parts.join("")),
    );
    const plain = writeTable(tender, "sea").split("\n").length;
    fc.assert(
      fc.property(name, name, name, (title, route, waypoint) => {
        const input = reportOf({
          ...tenderSketch,
          title: title.slice(0, 40),
          routes: tenderSketch.routes.map((each) => ({
            ...each,
            name: route,
            legs: each.legs.map((leg) => ({ ...leg, to: waypoint })),
          })),
        });
        const table = writeTable(input, "sea");
        const lines = table.split("\n");
        for (const line of lines) expect(displayWidth(line)).toBeLessThanOrEqual(80);
        expect(table.replaceAll("\n", "")).not.toMatch(/[\p{Cc}\p{Zl}\p{Zp}\u202a-\u202e]/u);
        // A long title or name may wrap a line or two; none can add a row.
        expect(lines.length).toBeLessThan(plain + 8);
      }),
      { numRuns: 60 },
    );
  });

  it("keeps its width whatever the figures are", () => {
    const size = fc.double({ min: 1, max: 1e12, noNaN: true });
    fc.assert(
      fc.property(
        size,
        size,
        fc.double({ min: 0.1, max: 1e5, noNaN: true }),
        fc.constantFrom(...UNITS),
        (distance, usable, speed, units) => {
          // An arrival later than the year 275760 has no date.
          fc.pre(distance / speed < 1e10);
          const input = reportOf({
            ...oceanSketch,
            speed,
            usable,
            routes: oceanSketch.routes.map((route) => ({
              ...route,
              legs: route.legs.map((leg) => ({
                ...leg,
                distance,
                along: speed / 3,
                cross: -speed / 2,
                stay: Math.min(usable, 1e9) / 7,
                height: 123,
              })),
            })),
          });
          for (const line of writeTable(input, units).split("\n"))
            expect(displayWidth(line), line).toBeLessThanOrEqual(80);
        },
      ),
      { numRuns: 150 },
    );
  });
});
