import { describe, expect, test } from "vitest";
import { estimatePlan, type PlanAnswer } from "../../src/plan/estimate-plan.ts";
import { windowPlan } from "../../src/plan/window-plan.ts";
import { writeCsv } from "../../src/report/csv.ts";
import { writeJson } from "../../src/report/json.ts";
import { displayWidth } from "../../src/report/plain-text.ts";
import { writeTable } from "../../src/report/table.ts";
import { writeWindowTable } from "../../src/report/window-table.ts";
import { readCsv } from "./rfc4180.ts";

const MEMBERS = [
  [0, 0],
  [4, 0.2],
  [9, -0.2],
] as const;
const ROWS = MEMBERS.flatMap(([member, u]) =>
  [-1, 0, 1].flatMap((lat) => [-1, 0, 1, 2].map((lon) => `${member},${lat},${lon},${u},0`)),
);

function open(): AsyncIterable<Uint8Array> {
  return (async function* () {
    yield new TextEncoder().encode(`member,lat,lon,u,v\n${ROWS.join("\n")}`);
  })();
}

function planOf(arrive: unknown, more: object = {}): string {
  return JSON.stringify({
    format: "legwork-plan/1",
    departure: "2027-05-04T06:00:00Z",
    craft: {
      name: "Boat",
      moves: "water",
      power: { model: "cube", reference: { speed: "6 m/s", power: "60 kW" } },
      speeds: { min: "2 m/s", max: "8 m/s" },
      store: { capacity: "2000 kWh" },
    },
    pace: { arrive },
    confidence: "60 %",
    fields: [
      {
        role: "current",
        file: "three.csv",
        error: { speed: "0.2 m/s", length: "60 km", time: "3 h" },
      },
    ],
    whatIf: [
      { name: "Early", late: "-5 min" },
      { name: "An engine that will not start for a good while", late: "25 min" },
    ],
    routes: [
      {
        name: "East",
        waypoints: [
          { name: "A", lat: 0, lon: 0 },
          { name: "B", lat: 0, lon: 1 },
        ],
      },
    ],
    ...more,
  });
}

const MOMENT = "2027-05-04T13:00Z";
/** So narrow that no speed arrives in it in everything. */
const SPAN = { notBefore: "2027-05-04T12:30Z", notAfter: MOMENT };
const WIDE = { notBefore: "2027-05-04T11:30Z", notAfter: MOMENT };
const request = { file: "a.plan.json", open };
const answerOf = (arrive: unknown): Promise<PlanAnswer> => estimatePlan(planOf(arrive), request);

const reportOf = ({ estimate, plan }: PlanAnswer) => ({
  estimate,
  routes: plan.routes,
  craft: plan.craft,
  pace: plan.pace,
});

async function tableOf(arrive: unknown): Promise<string> {
  const lines = writeTable(reportOf(await answerOf(arrive)), "sea").split("\n");
  for (const line of lines) expect(displayWidth(line)).toBeLessThanOrEqual(80);
  return lines.join(" ").replace(/\s+/g, " ");
}

describe("an arrival asked for, in the table", () => {
  test("as a span has its shares, its misses and what decides", async () => {
    const text = await tableOf(SPAN);
    const span = "between 2027-05-04 12:30 UTC and 2027-05-04 13:00 UTC";
    expect(text).toContain(`It arrives ${span} in 2 of 3 members (67 %). Too late in member 9.`);
    expect(text).toMatch(
      /It arrives by 2027-05-04 13:00 UTC with a probability of 50 %; the plan asks for 60 %\./,
    );
    expect(text).toMatch(
      new RegExp(`It arrives ${span} in 1 of 2 what-ifs; 25 min too late in An engine that will.*…\\.`),
    );
    expect(text).toMatch(/STOP member 9 \(and 1 more\): it arrives 2027-05-04 13:20 UTC, 20 min too late;/);
    expect(text).toMatch(/STOP under the stated forecast error it arrives by 2027-05-04 13:00 UTC with/);
  });

  test("as a span wide enough has the speed that holds, and what stops the cheapest", async () => {
    const text = await tableOf(WIDE);
    const lost =
      /the cheapest by the plain estimate, 4\.4 m\/s \(8\.6 kn\), does not: member 9 \(and 1 more\): it/;
    expect(text).toMatch(/, the cheapest found that holds in all that the plan names; the cheapest by/);
    expect(text).toMatch(lost);
    expect(text).toContain(
      "It arrives between 2027-05-04 11:30 UTC and 2027-05-04 13:00 UTC in 3 of 3 members",
    );
    expect(text).not.toContain("STOP");
  });

  test("as one moment has its shares alone, of being there by then", async () => {
    const text = await tableOf(MOMENT);
    expect(text).toContain("It arrives by 2027-05-04 13:00 UTC in 2 of 3 members (67 %). Too late in");
    expect(text).toContain("It arrives by 2027-05-04 13:00 UTC in 1 of 2 what-ifs; 25 min too late in");
    expect(text).toMatch(/It arrives by 2027-05-04 13:00 UTC with a probability of 50 %\. A wrong/);
    expect(text).not.toContain("STOP");
  });
});

describe("an arrival asked for, in files", () => {
  test("is in JSON as it was found, and only there where the pace asks for one", async () => {
    const { estimate } = await answerOf(SPAN);
    const [written] = JSON.parse(writeJson(estimate)).routes;
    expect(written.ensemble).toMatchObject({ arrivesEarly: [], arrivesLate: [9] });
    expect(written.ensemble).toEqual(estimate.routes[0]?.ensemble);
    expect(written.whatIf).toEqual(estimate.routes[0]?.whatIf);
    expect(written.whatIf.map((each: { arrivalMiss_s: number }) => each.arrivalMiss_s)).toEqual([0, 1500]);
    expect(written.spread).toEqual(estimate.routes[0]?.spread);
    const fast = await estimatePlan(
      planOf(MOMENT, { pace: { hold: "through-speed", speed: "5 m/s" } }),
      request,
    );
    expect(writeJson(fast.estimate)).not.toMatch(/arrivalHolds|arrives|arrivalMiss/);
    expect(writeCsv(reportOf(fast))).not.toMatch(/asked for|too late|missed by/);
  });

  test("is in JSON with the cheapest solution and whether the chosen one holds, where something decides", async () => {
    const arriveOf = async (arrive: unknown, more: object = {}) => {
      const { estimate } = await estimatePlan(planOf(arrive, more), request);
      const [{ arrive: written }] = JSON.parse(writeJson(estimate)).routes;
      expect(written).toEqual(estimate.routes[0]?.arrive);
      return written;
    };
    expect(await arriveOf(WIDE)).toMatchObject({ chosen: 1, cheapest: 0, holds: true });
    expect(await arriveOf(SPAN)).toMatchObject({ chosen: 0, cheapest: 0, holds: false });
    const keys = ["notBefore", "notAfter", "solutions", "chosen", "nearest", "reason"];
    expect(Object.keys(await arriveOf(MOMENT))).toEqual(keys);
    const alone = { whatIf: undefined, confidence: undefined, fields: [] };
    expect(Object.keys(await arriveOf(WIDE, alone))).toEqual(keys);
  });

  test("is in CSV in columns of its own", async () => {
    const [head, row] = readCsv(writeCsv(reportOf(await answerOf(SPAN)))) as [string[], string[]];
    const cell = (header: string) => row[head.indexOf(header)];
    expect(cell("ensemble members that arrive too late")).toBe("9");
    expect(cell("ensemble members that arrive too early")).toBe("");
    expect(Number(cell("ensemble share that arrives as asked for [1]"))).toBeCloseTo(2 / 3, 12);
    expect(Number(cell("probability of arriving by the latest time asked for [1]"))).toBeCloseTo(0.5, 4);
    expect(cell("what if Early: arrival missed by [s]")).toBe("0");
  });
});

const window = { from: "2027-05-04T05:00Z", to: "2027-05-04T07:00Z", every: "1 h" };

test("a window found for a span of arrivals has the figures of an estimate at each departure, and its bests hold", async () => {
  const { cells, sure } = await windowPlan(planOf(WIDE, { window }), request);
  for (const { departure, ...cell } of cells) {
    const { estimate } = await estimatePlan(planOf(WIDE), { ...request, departure });
    const [route] = estimate.routes;
    const taken = route?.arrive?.solutions[route.arrive.chosen ?? -1];
    expect([cell.speed_m_s, cell.arrival, cell.use]).toEqual([
      taken?.speed_m_s,
      route?.arrival,
      route?.totals.use,
    ]);
  }
  expect(sure?.best.sure.use?.departure).toBe(sure?.best.plain.use?.departure);
  expect(sure?.best.sure.use?.sure.status).toBe("clear");
});

test("a window found for a span of arrivals says that no departure holds, and in what", async () => {
  const narrow = { ...SPAN, notBefore: "2027-05-04T12:50Z" };
  const answer = await windowPlan(planOf(narrow, { window, whatIf: [], confidence: undefined }), request);
  expect(answer.sure?.best.sure.time).toBeNull();
  expect(answer.sure?.best.plain.time?.sure).toMatchObject({
    status: "stop",
    decidedBy: { member: 9, whatIf: null },
    worst: { code: "arrival-missed" },
  });
  const { plan, input, ...found } = answer;
  const { title, craft, pace, arrive = null } = plan;
  const report = { ...found, title, fields: [], craft, pace, arrive };
  expect(input.routes).toHaveLength(1);
  const lines = writeWindowTable(report, "sea").split("\n");
  for (const line of lines) expect(displayWidth(line)).toBeLessThanOrEqual(80);
  expect(lines.join(" ").replace(/\s+/g, " ")).toMatch(/arrives too late in member 9/);
});
