import { readdirSync, readFileSync } from "node:fs";
import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { planSchema } from "../../src/plan/plan-schema.ts";
import { readCraft } from "../../src/plan/read-craft.ts";
import { readPlan } from "../../src/plan/read-plan.ts";
import { type Change, changed, SUPPLY_RUN } from "../plan/documents.ts";
import { conforms, type Schema } from "./conforms.ts";

const read = (path: string) => readFileSync(new URL(`../../data/${path}`, import.meta.url), "utf8");
const schemaOf = (name: string): Schema => JSON.parse(read(`schema/${name}.schema.json`));
const PLAN_SCHEMA = schemaOf("plan");
const CRAFT_SCHEMA = schemaOf("craft");
const DEMOS = readdirSync(new URL("../../data/demo", import.meta.url)).filter((name) =>
  name.endsWith(".json"),
);

async function* open(name: string) {
  yield new TextEncoder().encode(read(`demo/${name}`));
}

/** Whether the reader takes a plan; what is no user error fails the test. */
async function isRead(plan: unknown): Promise<boolean> {
  try {
    await readPlan(JSON.stringify(plan), { file: "a.plan.json", open });
    return true;
  } catch (fault) {
    if (fault instanceof Error && fault.name === "InputError") return false;
    throw fault;
  }
}

const ERROR = { speed: "1.5 m/s", length: "150 km", time: "6 h" };

/** A plan with every key that decides something, but an arrival asked for. */
const FULL = changed(
  SUPPLY_RUN,
  ["fields[1].error", ERROR],
  ["fields[1].member", 0],
  ["window", { from: "2027-05-04T09:00Z", to: "2027-05-04T16:00Z", every: "1 h", speeds: ["7 kn", "8 kn"] }],
  ["window.arriveBy", "2027-05-04T18:00:00.5+02:00"],
  [
    "whatIf",
    [
      {
        name: "Gale",
        wind: 1.2,
        current: 0,
        veer: "-10 deg",
        speed: "-1 kn",
        consumption: "10 %",
        late: "-1 h",
      },
    ],
  ],
  ["alternates", [{ name: "Isle", lat: "58°15.2'N", lon: 353.5, height: "0 m" }]],
) as object;
const ARRIVING: readonly Change[] = [
  ["pace", { arrive: { notBefore: "2027-05-04T09:00Z", notAfter: "2027-05-04T10:00Z" } }],
  ["whatIf[0].speed", undefined],
  ["window.speeds", undefined],
  ["routes[0].waypoints[2].speed", undefined],
];

type Case = [what: string, ...changes: Change[]];

const SOUND: readonly Case[] = [
  ["every key that decides"],
  ["an address of the schema", ["$schema", "plan.schema.json"]],
  ["an arrival between two times", ...ARRIVING],
  ["an arrival not after a time", ...ARRIVING, ["pace.arrive.notBefore", undefined]],
  ["an arrival at a time", ...ARRIVING, ["pace.arrive", "2027-05-04T10:00Z"]],
  ["a window without speeds and arrival", ["window.speeds", undefined], ["window.arriveBy", undefined]],
  ["a window of one departure", ["window.to", "2027-05-04T09:00Z"]],
  ["a window of no", ["window", undefined]],
  ["times in a zone of their own", ["window.from", " 2027-05-04t09:00:30,25-0130 "]],
  ["what-ifs without names", ["whatIf", [{ wind: 0 }, { late: "30 min" }, { consumption: "-99 %" }]]],
  ["no what-ifs", ["whatIf", []]],
  [
    "alternates without names and heights",
    [
      "alternates",
      [
        { lat: 58, lon: -6 },
        { lat: "58 15 N", lon: "6 W" },
      ],
    ],
  ],
  ["no alternates", ["alternates", []]],
  [
    "quantities with exponents, blanks and signs",
    ["fields[1].error.speed", " +.15e1m/s"],
    ["whatIf[0].veer", "+350deg"],
  ],
  ["a height that is minus nothing", ["alternates[0].height", "-0 m"]],
];

/** What a single key may hold: both refuse. */
const REFUSED: readonly Case[] = [
  ["a window that is a list", ["window", []]],
  ["a window without a step", ["window.every", undefined]],
  ["a window without an end", ["window.to", undefined]],
  ["a step without a unit", ["window.every", "30"]],
  ["a step that is a number", ["window.every", 30]],
  ["a step of nothing", ["window.every", "0.0 min"]],
  ["a step backward", ["window.every", "-1 h"]],
  ["a begin without a zone", ["window.from", "2027-05-04T09:00"]],
  ["a begin without a time", ["window.from", "2027-05-04"]],
  ["an end in the thirteenth month", ["window.to", "2027-13-04T09:00Z"]],
  ["an end at 24:00", ["window.to", "2027-05-04T24:00Z"]],
  ["an arrival in a zone of no place", ["window.arriveBy", "2027-05-04T09:00+24:00"]],
  ["no speeds", ["window.speeds", []]],
  ["speeds that are one", ["window.speeds", "8 kn"]],
  ["a speed of nothing", ["window.speeds", ["0 kn"]]],
  ["a speed in kilograms", ["window.speeds", ["8 kg"]]],
  ["an unknown key of a window", ["window.step", "1 h"]],
  ["what-ifs that are one", ["whatIf", { wind: 1.2 }]],
  ["a what-if that is a text", ["whatIf[0]", "gale"]],
  ["a factor with a unit", ["whatIf[0].wind", "1.2"]],
  ["a factor above 10", ["whatIf[0].wind", 120]],
  ["a factor below 0", ["whatIf[0].current", -0.1]],
  ["a veer without a unit", ["whatIf[0].veer", 10]],
  ["a veer in radians", ["whatIf[0].veer", "1 rad"]],
  ["a change of speed without a unit", ["whatIf[0].speed", "-1"]],
  ["a consumption as a factor", ["whatIf[0].consumption", 1.1]],
  ["a lateness in knots", ["whatIf[0].late", "1 kn"]],
  ["a what-if of two lines", ["whatIf[0].name", "a\nb"]],
  ["a what-if with a blank name", ["whatIf[0].name", " "]],
  ["an unknown key of a what-if", ["whatIf[0].gust", 1.2]],
  ["alternates that are one", ["alternates", { lat: 1, lon: 2 }]],
  ["an alternate without a longitude", ["alternates[0].lon", undefined]],
  ["an alternate north of the pole", ["alternates[0].lat", 90.5]],
  ["an alternate west of the turn", ["alternates[0].lon", -180.5]],
  ["an alternate nowhere", ["alternates[0].lat", "north"]],
  ["an alternate below the surface", ["alternates[0].height", "-1 m"]],
  ["an alternate with a height without a unit", ["alternates[0].height", 60]],
  ["an unknown key of an alternate", ["alternates[0].stay", "1 h"]],
  ["an error without its length", ["fields[1].error.length", undefined]],
  ["an error of no speed", ["fields[1].error.speed", "0 m/s"]],
  ["an error of a time in km", ["fields[1].error.time", "6 km"]],
  ["an error that is a speed", ["fields[1].error", "1.5 m/s"]],
  ["an unknown key of an error", ["fields[1].error.bias", "1 m/s"]],
  ["half a member", ["fields[1].member", 0.5]],
  ["a member below 0", ["fields[1].member", -1]],
  ["a member as text", ["fields[1].member", "3"]],
  ["an arrival that is a number", ...ARRIVING, ["pace.arrive", 18]],
  ["an arrival that is no time", ...ARRIVING, ["pace.arrive", "soon"]],
  ["an arrival that is a list", ...ARRIVING, ["pace.arrive", ["2027-05-04T10:00Z"]]],
  ["an arrival with no end", ...ARRIVING, ["pace.arrive.notAfter", undefined]],
  ["an arrival with an unknown key", ...ARRIVING, ["pace.arrive.at", "2027-05-04T10:00Z"]],
  ["an arrival beside a hold", ["pace.arrive", "2027-05-04T10:00Z"]],
  ["a file of an absolute name", ["fields[1].file", "/wind.csv"]],
  ["a file at an address", ["fields[1].file", "https://a/wind.csv"]],
];

/** What holds between keys, of a calendar, or of a size other than 0: the reader alone refuses. */
const READER_ALONE: readonly Case[] = [
  ["a window that ends before it begins", ["window.to", "2027-05-04T08:00Z"]],
  ["a step below a second", ["window.every", "0.5 s"]],
  ["a window of too many cells", ["window.every", "1 s"], ["window.to", "2027-06-04T09:00Z"]],
  ["a speed twice", ["window.speeds", ["8 kn", "8.0 kn"]]],
  [
    "speeds of a window beside a pace that chooses its own",
    ["pace", { hold: "least-energy" }],
    ["whatIf", []],
  ],
  ["a begin on no day of its month", ["window.from", "2027-02-30T09:00Z"]],
  ["a what-if that changes nothing", ["whatIf", [{ name: "As it is" }]]],
  ["what-ifs of one name", ["whatIf", [{ wind: 1.2 }, { wind: 1.2 }]]],
  ["a change of a field that the plan lacks", ["fields", [{ role: "wind", file: "w.csv" }]]],
  ["a lateness of years", ["whatIf[0].late", "1e9 h"]],
  ["a consumption of less than nothing", ["whatIf[0].consumption", "-100 %"]],
  [
    "alternates of one name",
    [
      "alternates",
      [
        { lat: 1, lon: 2, name: "A" },
        { lat: 3, lon: 4, name: "A" },
      ],
    ],
  ],
  ["an alternate at no minute", ["alternates[0].lat", "58°75'N"]],
  ["two errors of a role", ["fields[0].role", "wind"], ["fields[0].error", { ...ERROR, time: "5 h" }]],
  ["an arrival that ends before it begins", ...ARRIVING, ["pace.arrive.notAfter", "2027-05-04T08:00Z"]],
];

describe("the schemas and the reader", () => {
  test.each(DEMOS)("both take the demo %s", async (name) => {
    const document = JSON.parse(read(`demo/${name}`));
    const isPlan = name.endsWith(".plan.json");
    expect(conforms(document, isPlan ? PLAN_SCHEMA : CRAFT_SCHEMA)).toBe(true);
    if (isPlan) expect(await isRead(document)).toBe(true);
    else expect(readCraft(JSON.stringify(document), name).name).toBe(document.name);
  });

  test.each<Case>(SOUND)("both take %s", async (_, ...changes) => {
    const plan = changed(FULL, ...changes);
    expect(await isRead(plan)).toBe(true);
    expect(conforms(plan, PLAN_SCHEMA)).toBe(true);
  });

  test.each<Case>(REFUSED)("both refuse %s", async (_, ...changes) => {
    const plan = changed(FULL, ...changes);
    expect(await isRead(plan)).toBe(false);
    expect(conforms(plan, PLAN_SCHEMA)).toBe(false);
  });

  test.each<Case>(READER_ALONE)("the reader alone refuses %s", async (_, ...changes) => {
    const plan = changed(FULL, ...changes);
    expect(await isRead(plan)).toBe(false);
    expect(conforms(plan, PLAN_SCHEMA)).toBe(true);
  });

  const figure = fc
    .tuple(
      fc.constantFrom("", " ", "+", "-", " -", "--"),
      fc.constantFrom("0", "00", "1", "07", "12", "", "x"),
      fc.constantFrom("", ".0", ".5", ".", ",5", ".05"),
      fc.constantFrom("", "e2", "E-2", "e+1", "e", "e0.5"),
      fc.constantFrom("", " ", "  "),
      fc.constantFrom("s", "min", "h", "m", "km", "deg", "%", "kn", "", "M", "h ", "hours"),
    )
    .map((each) => each.join(""));
  const moment = fc
    .tuple(
      fc.constantFrom("2027-05-04", "2027-5-04", "2027-00-04", "2027-12-28", "20270504", "2027-05-00"),
      fc.constantFrom("T", "t", " ", ""),
      fc.constantFrom("09:00", "23:59", "24:00", "09:60", "0900", "9:00"),
      fc.constantFrom("", ":00", ":59.999", ":60", ":30,5", ":30."),
      fc.constantFrom("Z", "z", "", "+02:00", "-0130", "+02", "+24:00", "+01:60", " Z"),
    )
    .map((each) => each.join(""));

  test.each([
    ["window.every", figure],
    ["whatIf[0].late", figure],
    // More than a turn is the reader's alone to refuse.
    ["whatIf[0].veer", figure.filter((text) => !(Math.abs(Number.parseFloat(text)) > 360))],
    ["alternates[0].height", figure],
    ["fields[1].error.length", figure],
    ["window.from", moment],
    ["window.arriveBy", moment],
  ])("agree on any text at %s", (key, texts) => {
    fc.assert(
      fc.property(texts, (text) => {
        const plan = changed(FULL, [key, text]);
        expect(conforms(plan, PLAN_SCHEMA)).toBe(planSchema.safeParse(plan).success);
      }),
      { numRuns: 400, endOnFailure: true },
    );
  });
});
