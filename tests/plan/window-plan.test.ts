import { describe, expect, test } from "vitest";
import { windowCell } from "../../src/choose/window-cell.ts";
import { prepareRoutes } from "../../src/estimate/estimate.ts";
import { estimatePlan } from "../../src/plan/estimate-plan.ts";
import type { PlanDocument } from "../../src/plan/plan-schema.ts";
import { parseTime } from "../../src/plan/time.ts";
import { windowPlan } from "../../src/plan/window-plan.ts";
import { serializePlan } from "../../src/plan/write-plan.ts";
import { type Change, changed, faultOf, opener, read, SUPPLY_RUN } from "./documents.ts";

const knots = (number: number) => (number * 1852) / 3600;
const WINDOW = { from: "2027-05-04T06:00Z", to: "2027-05-04T12:00Z", every: "30 min" };
/** The supply run in still water: a window asks for no field. */
const CALM: readonly Change[] = [
  ["fields", undefined],
  ["routes[0].waypoints[2].speed", undefined],
];
const request = { file: "run.plan.json", open: opener() };
const textOf = (...changes: readonly Change[]) => JSON.stringify(changed(SUPPLY_RUN, ...CALM, ...changes));

/** A current around the supply run that turns in 2 days, every 12 hours. */
function turningStream(): string {
  const rows = [0, 12, 24, 36, 48].flatMap((hour) =>
    [57, 58, 59].flatMap((lat) =>
      [-8, -7, -6].map((lon) => {
        const time = new Date(parseTime("2027-05-04T00:00Z") + hour * 3600_000).toISOString();
        const turn = (Math.PI * hour) / 24 + lat + lon;
        return `${time},${lat},${lon},${Math.sin(turn).toFixed(3)},${Math.cos(turn).toFixed(3)}`;
      }),
    ),
  );
  return ["time,lat,lon,u,v", ...rows].join("\n");
}

describe("the key window of a plan", () => {
  test("is read into SI units", async () => {
    const plan = await read(changed(SUPPLY_RUN, ["window", { ...WINDOW, speeds: ["8 kn", "10kn"] }]));
    expect(plan.window).toEqual({
      from: parseTime(WINDOW.from),
      to: parseTime(WINDOW.to),
      every_s: 1800,
      speeds_m_s: [knots(8), knots(10)],
    });
    expect((await read(SUPPLY_RUN)).window).toBeUndefined();
  });

  test.each<[string, readonly Change[], string]>([
    [
      "without a step",
      [["window", { from: WINDOW.from, to: WINDOW.to }]],
      'run.plan.json: window.every takes a number with one of s, min, h, as "12 h"; found nothing',
    ],
    [
      "of a step without a unit",
      [["window", { ...WINDOW, every: 30 }]],
      "window.every takes a number with one of",
    ],
    ["of no step", [["window", { ...WINDOW, every: "0 min" }]], "window.every is above 0"],
    [
      "of half a second's steps",
      [["window", { ...WINDOW, every: "0.5 s" }]],
      "run.plan.json, window.every: the step of a window of departures is at least 1 s; found 0.5 s",
    ],
    [
      "that ends before it begins",
      [["window", { ...WINDOW, to: "2027-05-04T05:00Z" }]],
      "run.plan.json, window: a window of departures does not end before it begins",
    ],
    [
      "without a zone",
      [["window", { ...WINDOW, from: "2027-05-04T06:00" }]],
      "window.from takes an explicit zone",
    ],
    [
      "of a misspelt key",
      [["window", { ...WINDOW, step: "30 min" }]],
      'window.step: a window has no key "step"; the nearest that it has is',
    ],
    [
      "of no speeds",
      [["window", { ...WINDOW, speeds: [] }]],
      "window.speeds takes a list of at least 1 speed; found 0",
    ],
    [
      "of a speed outside the table",
      [["window", { ...WINDOW, speeds: ["8 kn", "13 kn"] }]],
      "window.speeds[1]: a speed ordered lies within the rows of the power table, 0 to 12 kn",
    ],
    [
      "of too many cells",
      [["window", { ...WINDOW, to: "2027-08-04T05:00Z", every: "1 min" }]],
      "window: a window has at most 100000 cells",
    ],
    ["that is a text", [["window", "all day"]], 'window: a window is an object; found "all day"'],
    [
      "of speeds beside a pace that chooses its own",
      [
        ["pace", { hold: "least-energy" }],
        ["routes[0].waypoints[2].speed", undefined],
        ["window", { ...WINDOW, speeds: ["8 kn"] }],
      ],
      'window.speeds[0]: the pace "least-energy" chooses the speed itself, so a window names none; found "8 kn"',
    ],
  ])("%s is refused in one sentence with its place", async (_, changes, message) => {
    expect(await faultOf(() => read(changed(SUPPLY_RUN, ...changes)))).toContain(message);
  });

  test("is written in the schema's order and read back the same", async () => {
    const plan = changed(SUPPLY_RUN, [
      "window",
      { every: "1 h", to: WINDOW.to, from: WINDOW.from },
    ]) as PlanDocument;
    expect(serializePlan(plan)).toContain(
      `"window": { "from": "${WINDOW.from}", "to": "${WINDOW.to}", "every": "1 h" }`,
    );
    const again = await read(JSON.parse(serializePlan(plan)));
    expect(again.window).toEqual((await read(plan)).window);
  });
});

describe("a pace that asks for an arrival", () => {
  const noSpeed: Change = ["routes[0].waypoints[2].speed", undefined];

  test("is read as one time or as two", async () => {
    const once = await read(changed(SUPPLY_RUN, noSpeed, ["pace", { arrive: "2027-05-04T18:00Z" }]));
    const time = parseTime("2027-05-04T18:00Z");
    expect(once.arrive).toEqual({ notBefore: time, notAfter: time });
    expect(once.pace).toEqual({ hold: "through-speed", speed_m_s: knots(12) });
    const window = { notBefore: "2027-05-04T16:00Z", notAfter: "2027-05-04T18:00Z" };
    const between = await read(changed(SUPPLY_RUN, ["pace", { arrive: window }]));
    expect(between.arrive).toEqual({ notBefore: time - 7_200_000, notAfter: time });
    const by = await read(changed(SUPPLY_RUN, ["pace", { arrive: { notAfter: "2027-05-04T18:00Z" } }]));
    expect(by.arrive).toEqual({ notBefore: null, notAfter: time });
  });

  test.each<[string, unknown, string]>([
    [
      "of no time",
      { arrive: "soon" },
      'pace.arrive takes an ISO 8601 date and time with its zone, or { "notBefore", "notAfter" } of two; found "soon"',
    ],
    ["of a number", { arrive: 18 }, "pace.arrive takes an ISO 8601 date and time with its zone, or"],
    ["of nothing", { arrive: {} }, "pace.arrive.notAfter takes an ISO 8601 date and time with its zone"],
    [
      "of a misspelt key",
      { arrive: { notLater: "2027-05-04T18:00Z" } },
      'pace.arrive.notLater: an arrival has no key "notLater"; the nearest that it has is "notAfter"',
    ],
    [
      "beside a hold",
      { arrive: "2027-05-04T18:00Z", hold: "power" },
      'pace.hold: a pace holds something or asks for an arrival, not both; found "hold" beside "arrive"',
    ],
    [
      "beside a speed held",
      { hold: "through-speed", arrive: "2027-05-04T18:00Z" },
      'pace.arrive: a pace holds something or asks for an arrival, not both; found "hold" beside "arrive"',
    ],
    [
      "beside a speed",
      { arrive: "2027-05-04T18:00Z", speed: "8 kn" },
      'pace.speed: a pace that asks for an arrival finds its speed itself; found "speed" beside "arrive"',
    ],
    [
      "as a key unknown",
      { arrives: "2027-05-04T18:00Z" },
      'pace.hold takes one of "through-speed", "ground-speed", "power", "least-energy", or "arrive" stands in its place; found nothing',
    ],
    [
      "that ends before it begins",
      { arrive: { notBefore: "2027-05-04T18:00Z", notAfter: "2027-05-04T17:00Z" } },
      "pace.arrive: an arrival's notBefore is not after its notAfter; found 2027-05-04T18:00Z and 2027-05-04T17:00Z",
    ],
    ["misspelt itself", { arive: "2027-05-04T18:00Z" }, "pace"],
  ])("%s is refused in one sentence with its place", async (_, pace, message) => {
    const fault = await faultOf(() => read(changed(SUPPLY_RUN, ["pace", pace])));
    expect(fault.startsWith("run.plan.json")).toBe(true);
    expect(fault).toContain(message);
  });

  test("needs a bound on the craft's speeds", async () => {
    const changes: readonly Change[] = [
      ["pace", { arrive: "2027-05-04T18:00Z" }],
      ["craft.speeds", undefined],
      ["craft.power", { model: "cube", reference: { speed: "10 kn", power: "40 kW" } }],
    ];
    for (const speed of [undefined, "10 kn"])
      expect(await faultOf(() => read(changed(SUPPLY_RUN, ...changes, ["craft.speed", speed])))).toMatch(
        /^run.plan.json, pace.arrive: a choice of speed needs the craft's speeds/,
      );
  });

  test("is written and read back the same", () => {
    const arrive = { notBefore: "2027-05-04T16:00Z", notAfter: "2027-05-04T18:00Z" };
    const plan = changed(SUPPLY_RUN, [
      "pace",
      { arrive: { notAfter: arrive.notAfter, notBefore: arrive.notBefore } },
    ]);
    expect(JSON.stringify(JSON.parse(serializePlan(plan as PlanDocument)).pace)).toBe(
      JSON.stringify({ arrive }),
    );
  });

  test("estimates the plan at the speed that makes it", async () => {
    const text = textOf(["pace", { arrive: "2027-05-04T10:00Z" }]);
    const { estimate } = await estimatePlan(text, request);
    expect(estimate.routes[0]?.arrival).toBe("2027-05-04T10:00:00.000Z");
    expect(estimate.routes[0]?.arrive?.chosen).toBe(0);
  });
});

describe("a plan's window worked out", () => {
  test("has the cells of its window, those of lone estimates", async () => {
    const { cells, input, summary, refined } = await windowPlan(textOf(["window", WINDOW]), request);
    expect(cells).toHaveLength(13);
    expect(refined).toBeNull();
    expect(summary.possible).toBe(13);
    const [prepared] = prepareRoutes(input);
    if (prepared === undefined) throw new Error("a route is missing");
    const { craft, pace, reserve, fields } = input;
    const conditions = { departure: 0, craft, pace, reserve, fields };
    for (const cell of cells)
      expect(windowCell(prepared, conditions, Date.parse(cell.departure), null)).toEqual(cell);
  });

  test.each([
    ["of the plan", { ...WINDOW, every: "1 min" }, {}],
    ["beside the plan", undefined, { ...WINDOW, every: "1 min" }],
    ["with a step in place of the plan's", { ...WINDOW, every: "2 h" }, { every: "1 min" }],
  ])(
    "has the cells of the plan's own estimates where many departures lie between valid times: %s",
    async (_, window, beside) => {
      const text = textOf(
        ["craft.windage", undefined],
        ["fields", [{ role: "current", file: "sound-current.csv" }]],
        ["window", window],
      );
      const open = opener({ "sound-current.csv": turningStream() });
      const { cells, summary } = await windowPlan(text, { file: "run.plan.json", open, ...beside });
      expect([cells.length, summary.possible]).toEqual([361, 361]);
      for (const cell of cells.filter((_cell, n) => n % 30 === 7)) {
        const asked = { file: "run.plan.json", open, departure: cell.departure };
        const route = (await estimatePlan(text, asked)).estimate.routes[0];
        expect([cell.time_s, cell.use]).toEqual([route?.totals.time_s, route?.totals.use]);
      }
    },
  );

  test("has its departures go side by side but where each has a speed of its own to find", async () => {
    const step = async (...changes: readonly Change[]) =>
      (await estimatePlan(textOf(...changes), request)).input.every_s;
    expect(await step(["window", WINDOW])).toBe(1800);
    expect(await step(["window", WINDOW], ["pace", { arrive: "2027-05-04T10:00Z" }])).toBeUndefined();
    expect(await step()).toBeUndefined();
  });

  test("takes the parts given beside the plan in place of the plan's", async () => {
    const asked = { ...request, to: "2027-05-04T07:00Z", every: "20min", speeds: ["6kn", "8 kn"] };
    const { window, cells } = await windowPlan(textOf(["window", WINDOW]), asked);
    expect(window).toEqual({
      from: parseTime(WINDOW.from),
      to: parseTime("2027-05-04T07:00Z"),
      every_s: 1200,
      speeds_m_s: [knots(6), knots(8)],
    });
    expect(cells).toHaveLength(8);
  });

  test("finds the latest departure that arrives in time, whatever the end of the window", async () => {
    const window = {
      ...WINDOW,
      to: "2027-05-04T07:00Z",
      speeds: ["6 kn", "8 kn"],
      arriveBy: "2027-05-04T18:00Z",
    };
    const { inTime, input } = await windowPlan(textOf(["window", window]), request);
    expect(inTime?.notAfter).toBe("2027-05-04T18:00:00.000Z");
    expect(inTime?.routes.map(({ speed_m_s }) => speed_m_s)).toEqual([knots(6), knots(8)]);
    const [prepared] = prepareRoutes(input);
    for (const { speed_m_s, latest } of inTime?.routes ?? []) {
      if (prepared === undefined || latest === null) throw new Error("no departure in time");
      const { craft, pace, reserve, fields } = input;
      const given = { departure: 0, craft, pace, reserve, fields };
      const departure = Date.parse(latest.departure);
      expect(windowCell(prepared, given, departure, speed_m_s)).toEqual(latest);
      expect(Date.parse(latest.arrival ?? "")).toBeLessThanOrEqual(parseTime("2027-05-04T18:00Z"));
      const later = windowCell(prepared, given, departure + 60_000, speed_m_s);
      expect(Date.parse(later.arrival ?? "")).toBeGreaterThan(parseTime("2027-05-04T18:00Z"));
    }
    const early = await windowPlan(textOf(["window", WINDOW]), { ...request, arriveBy: "2027-05-04T06:30Z" });
    expect(early.inTime?.routes[0]?.latest).toBeNull();
    expect(early.inTime?.routes[0]?.earliest.departure).toBe("2027-05-04T06:00:00.000Z");
    expect(
      await faultOf(() => windowPlan(textOf(["window", WINDOW]), { ...request, arriveBy: WINDOW.from })),
    ).toContain("an arrival is after the earliest departure considered");
    const asked = textOf(["window", WINDOW], ["pace", { arrive: "2027-05-04T12:00Z" }]);
    expect(await faultOf(() => windowPlan(asked, { ...request, arriveBy: "2027-05-04T12:00Z" }))).toMatch(
      /^arriveBy: an arriveBy of a window belongs to a pace that says how fast/,
    );
  });

  test.each([
    [
      "a step of nothing",
      { every: "0 min" },
      'every: the step of a window of departures is at least 1 s; found "0 min"',
    ],
    [
      "a first departure after the last",
      { from: "2027-06-04T06:00Z" },
      "from: a window of departures does not end",
    ],
    [
      "more cells than are worked out",
      { every: "1 s", to: "2027-06-04T06:00Z" },
      "to, every: a window has at most 100000 cells",
    ],
    ["a route that the plan lacks", { routes: ["Nowhere"] }, 'routes: a route is one of "Outer"'],
    [
      "a route twice",
      { routes: ["Outer", "Outer"] },
      'routes: a route is asked for once; found "Outer" twice',
    ],
  ])("told by the request of %s, names its part and not the plan's file", async (_, asked, message) => {
    const fault = await faultOf(() => windowPlan(textOf(["window", WINDOW]), { ...request, ...asked }));
    expect(fault.startsWith(message), fault).toBe(true);
  });

  test("refined over speeds, tells the least use and the fastest of all speeds of the range", async () => {
    const window = { ...WINDOW, speeds: ["6 kn", "9 kn", "12 kn"] };
    const text = textOf(["window", window], ["reserve", "70 %"]);
    const { paces, refined, cells } = await windowPlan(text, { ...request, refine: true });
    const [own] = paces ?? [];
    const best = refined?.routes[0]?.best.use;
    expect(own?.departure).toBe(best?.departure);
    expect(own?.leastUse?.use ?? Infinity).toBeLessThanOrEqual(best?.use ?? 0);
    // In still water the use rises with the speed here: the reserve shuts the range from above.
    expect(own?.fastest?.status).not.toBe("stop");
    // To a billionth of the store, the accuracy of the search.
    expect((own?.fastest?.remaining ?? 0) / (own?.fastest?.reserve ?? 1)).toBeCloseTo(1, 8);
    const at = (speed: number) =>
      cells.find(({ speed_m_s }) => Math.abs((speed_m_s ?? 0) - knots(speed)) < 1e-9);
    expect(at(6)?.status).not.toBe("stop");
    expect(at(12)?.status).toBe("stop");
    expect((await windowPlan(text, request)).paces).toBeNull();
  });

  test("asks for what neither names", async () => {
    expect(await faultOf(() => windowPlan(textOf(), { ...request, from: WINDOW.from, every: "1 h" }))).toBe(
      "run.plan.json, window: a window of departures needs from, to and every, in the plan or beside it; found no to in either",
    );
  });

  test("with an arrival asked for finds the speed of each departure", async () => {
    const text = textOf(["pace", { arrive: "2027-05-04T13:00Z" }], ["window", WINDOW]);
    const { cells, summary } = await windowPlan(text, { ...request, refine: true });
    for (const { status, arrival } of cells)
      if (status !== "stop") expect(arrival).toBe("2027-05-04T13:00:00.000Z");
    const speeds = cells.flatMap(({ speed_m_s }) => speed_m_s ?? []);
    expect(speeds).toEqual([...speeds].sort((a, b) => a - b));
    const late = cells.find(({ worst }) => worst?.code === "arrival-missed");
    expect(late?.worst?.message).toMatch(
      /^no through-speed arrives at 2027-05-04 13:00 UTC: the highest speed/,
    );
    expect(summary.best.closedBy).toEqual(late?.worst);
  });
});
