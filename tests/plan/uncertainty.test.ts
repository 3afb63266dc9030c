import { describe, expect, test } from "vitest";
import { estimatePlan, type PlanAnswer } from "../../src/plan/estimate-plan.ts";
import { readPlan } from "../../src/plan/read-plan.ts";

const LATS = [49, 50, 51];
const LONS = [-6, -5, -4, -3];

/** Rows of a steady field with one vector everywhere, `before` at the start of each. */
function rows(before: string, u: number, v: number): string {
  return LATS.flatMap((lat) => LONS.map((lon) => `${before}${lat},${lon},${u},${v}`)).join("\n");
}
const alone = (u: number, v: number) => `lat,lon,u,v\n${rows("", u, v)}`;
const ensemble = (members: readonly (readonly [number, number])[]) =>
  `member,lat,lon,u,v\n${members.map(([member, u]) => rows(`${member},`, u, 0)).join("\n")}`;

const CRAFT = {
  name: "Boat",
  moves: "water",
  speed: "10 kn",
  power: { model: "cube", reference: { speed: "10 kn", power: "50 kW" } },
  windage: { frontalArea: "10 m2", dragCoefficient: 0.9, efficiency: "60 %" },
  store: { capacity: "2000 kWh" },
};

function planOf(changes: Record<string, unknown>): string {
  return JSON.stringify({
    format: "legwork-plan/1",
    departure: "2027-05-04T06:00:00Z",
    craft: CRAFT,
    reserve: "10 %",
    fields: [
      { role: "current", file: "current.csv" },
      { role: "wind", file: "wind.csv" },
    ],
    routes: [
      {
        name: "Direct",
        waypoints: [
          { lat: 49.5, lon: -5.5 },
          { lat: 50.5, lon: -3.5 },
        ],
      },
    ],
    ...changes,
  });
}

const FILES: Record<string, string> = {
  "current.csv": alone(0.5, 0.2),
  "wind.csv": alone(-6, 2),
  "three.csv": ensemble([
    [0, -0.5],
    [4, 0.1],
    [9, 0.6],
  ]),
  "three-winds.csv": ensemble([
    [9, -8],
    [4, 3],
    [0, 5],
  ]),
  "other-winds.csv": ensemble([
    [0, 3],
    [4, 3],
    [5, 3],
  ]),
  "one.csv": ensemble([[3, 0.5]]),
};

function open(name: string): AsyncIterable<Uint8Array> {
  return (async function* () {
    yield new TextEncoder().encode(FILES[name] ?? "");
  })();
}

const answer = (changes: Record<string, unknown>): Promise<PlanAnswer> =>
  estimatePlan(planOf(changes), { file: "a.plan.json", open });

async function faultOf(changes: Record<string, unknown>): Promise<string> {
  const outcome = await answer(changes).then(
    () => "no error",
    (error: unknown) =>
      error instanceof Error && error.name === "InputError" ? error.message : String(error),
  );
  return outcome;
}

const CURRENT = { role: "current", file: "current.csv" };
const WIND = { role: "wind", file: "wind.csv" };

describe("the what-ifs of a plan", () => {
  test("are read into SI units and called by their changes where they have no name", async () => {
    const whatIf = [
      { name: "Gale", wind: 1.5, veer: "-20 deg" },
      { current: 0.5, speed: "-1 kn", consumption: "10 %", late: "90 min" },
    ];
    const { whatIfs } = await readPlan(planOf({ whatIf }), { open });
    expect(whatIfs?.[0]).toEqual({
      name: "Gale",
      wind: 1.5,
      current: 1,
      veer_deg: -20,
      speed_m_s: 0,
      consumption: 0,
      late_s: 0,
    });
    expect(whatIfs?.[1]).toMatchObject({ speed_m_s: -1852 / 3600, consumption: 0.1, late_s: 5400 });
    expect(whatIfs?.[1]?.name).toBe(
      "current × 0.5, 0.5 m/s (1.0 kn) slower, consumption +10 %, 1 h 30 min late",
    );
  });

  test("stand beside the route's figures, which stay as they were", async () => {
    const bare = await answer({});
    const given = await answer({ whatIf: [{ consumption: "25 %" }] });
    const [route] = given.estimate.routes;
    expect(route?.totals).toEqual(bare.estimate.routes[0]?.totals);
    const use = route?.totals.use as number;
    expect((route?.whatIf?.[0]?.use as number) / use).toBeCloseTo(1.25, 12);
  });

  test.each([
    ["that change nothing", [{ name: "None" }], "whatIf[0]: a what-if changes something"],
    [
      "of one name",
      [{ wind: 1.2 }, { wind: 1.2 }],
      'whatIf[1]: what-ifs have different names; found "wind × 1.2"',
    ],
    ["with a factor below 0", [{ wind: -1 }], "whatIf[0].wind is not below 0; found -1"],
    ["with a factor that has a unit", [{ wind: "120 %" }], "whatIf[0].wind takes a number without a unit"],
    ["with an angle without its unit", [{ veer: 20 }], "whatIf[0].veer takes a number with the unit deg"],
    ["with a factor meant as a percentage", [{ wind: 120 }], "whatIf[0].wind is at most 10; found 120"],
    ["with a current beyond the bound", [{ current: 10.5 }], "whatIf[0].current is at most 10; found 10.5"],
    [
      "with more than a turn",
      [{ veer: "-361 deg" }],
      'whatIf[0].veer is not below -360 deg; found "-361 deg"',
    ],
    [
      "with a speed of another craft",
      [{ speed: "200 kn" }],
      'whatIf[0].speed is at most 100 m/s; found "200 kn"',
    ],
    [
      "that spend ten times more",
      [{ consumption: "1000 %" }],
      'whatIf[0].consumption is at most 900 %; found "1000 %"',
    ],
    ["of another age", [{ late: "1e9 h" }], 'whatIf[0].late is at most 8760 h; found "1e9 h"'],
    ["of the year before", [{ late: "-8761 h" }], 'whatIf[0].late is not below -8760 h; found "-8761 h"'],
    ["that spend nothing", [{ consumption: "-100 %" }], "whatIf[0].consumption is above -100 %"],
    [
      "with an unknown key",
      [{ winds: 1.2 }],
      'whatIf[0].winds: a what-if has no key "winds"; the nearest that it has is "wind"',
    ],
    ["with a lateness in knots", [{ late: "3 kn" }], "whatIf[0].late takes a number with one of s, min, h"],
    ["that are no list", { wind: 1.2 }, "whatIf takes a list of what-ifs"],
  ])("%s are one sentence", async (_, whatIf, message) => {
    expect(await faultOf({ whatIf })).toContain(message);
  });

  test("may go as far as the bounds", async () => {
    const far = [
      { wind: 10, current: 0, veer: "360 deg", speed: "-100 m/s", consumption: "900 %", late: "8760 h" },
      { veer: "-360 deg", speed: "100 m/s", consumption: "-99 %", late: "-8760 h" },
    ];
    const { whatIfs } = await readPlan(planOf({ whatIf: far }), { open });
    expect(whatIfs?.map(({ late_s }) => late_s)).toEqual([31536000, -31536000]);
  });

  test("that change a field which the plan has not, or a speed which the pace chooses, are one sentence", async () => {
    expect(await faultOf({ fields: [WIND], whatIf: [{ current: 2 }] })).toBe(
      "a.plan.json, whatIf[0].current: a change of the current needs a field of it in the plan; found none",
    );
    const craft = { ...CRAFT, speeds: { min: "3 kn", max: "12 kn" } };
    expect(await faultOf({ craft, pace: { hold: "least-energy" }, whatIf: [{ speed: "1 kn" }] })).toBe(
      'a.plan.json, whatIf[0].speed: the pace "least-energy" chooses the speed itself, so a what-if names none; found "1 kn"',
    );
  });
});

const ERROR = { speed: "1.5 m/s", length: "150 km", time: "6 h" };

describe("the stated error of a plan's fields", () => {
  test("is read, and its spread stands beside the route's figures", async () => {
    const given = await answer({ fields: [CURRENT, { ...WIND, error: ERROR }] });
    expect(given.plan.errors).toEqual([{ role: "wind", speed_m_s: 1.5, length_m: 150_000, time_s: 21_600 }]);
    const spread = given.estimate.routes[0]?.spread;
    expect(spread?.time_s).toBe(0);
    expect(spread?.use).toBeGreaterThan(0);
    expect(given.sensitivities?.[0]?.leg.length).toBeGreaterThan(10);
  });

  test.each([
    [
      "without its length",
      { speed: "1 m/s", time: "6 h" },
      "fields[1].error.length takes a number with one of",
    ],
    ["of no speed", { ...ERROR, speed: "0 m/s" }, 'fields[1].error.speed is above 0; found "0 m/s"'],
    [
      "of a time in km",
      { ...ERROR, time: "6 km" },
      "fields[1].error.time takes a number with one of s, min, h",
    ],
    ["with an unknown key", { ...ERROR, tiem: "6 h" }, 'fields[1].error.tiem: an error has no key "tiem"'],
    ["that is a number", 1.5, "fields[1].error: an error is an object; found 1.5"],
  ])("%s is one sentence", async (_, error, message) => {
    expect(await faultOf({ fields: [CURRENT, { ...WIND, error }] })).toContain(message);
  });

  test("and a confidence held against it, decide the status of a route that does not keep its reserve with it", async () => {
    const fields = [{ ...CURRENT, error: { ...ERROR, speed: "0.2 m/s" } }, WIND];
    const plain = await answer({ fields });
    const [own] = plain.estimate.routes;
    expect(plain.plan).not.toHaveProperty("confidence");
    expect(own?.status).not.toBe("stop");
    const far = (own?.spread?.margin as number) * 2;
    const capacity = (own?.totals.use as number) + far;
    const craft = { ...CRAFT, store: { capacity: `${capacity} J` } };
    const sure = await answer({ fields, craft, reserve: "0 %", confidence: "97 %" });
    expect(sure.plan.confidence).toBe(0.97);
    // Two standard deviations above nothing: 97.7 %.
    expect(sure.estimate.routes[0]?.spread?.reserveHolds).toBeCloseTo(0.97725, 5);
    expect(sure.estimate.routes[0]?.status).not.toBe("stop");
    const unsure = await answer({ fields, craft, reserve: "0 %", confidence: "98 %" });
    expect(unsure.estimate.routes[0]).toMatchObject({
      status: "stop",
      findings: expect.arrayContaining([expect.objectContaining({ code: "reserve-unsure" })]),
    });
  });

  test.each([
    ["100 %", 'confidence is above 0 % and below 100 %; found "100 %"'],
    ["120 %", 'confidence is above 0 % and below 100 %; found "120 %"'],
    ["0 %", 'confidence is above 0 % and below 100 %; found "0 %"'],
    ["-5 %", 'confidence is above 0 % and below 100 %; found "-5 %"'],
    ["0.9", "confidence takes a number with the unit %"],
    ["3 h", "confidence takes a number with the unit %"],
    [0.9, "confidence takes a number with the unit %"],
    [null, "confidence takes a number with the unit %"],
  ])("held against it to %j is one sentence", async (confidence, message) => {
    expect(await faultOf({ fields: [CURRENT, { ...WIND, error: ERROR }], confidence })).toContain(message);
  });

  test("is what a confidence needs", async () => {
    expect(await faultOf({ confidence: "90 %" })).toBe(
      'a.plan.json, confidence: a confidence is held against the error of a field, as { "speed": "1.5 m/s", "length": "150 km", "time": "6 h" }; found no field with one',
    );
  });

  test("is the same in all files of a role", async () => {
    const fields = [
      { ...CURRENT, error: ERROR },
      { ...CURRENT, error: { ...ERROR, time: "5 h" } },
    ];
    expect(await faultOf({ fields })).toContain(
      "fields[1].error: the current files are one field with one error",
    );
  });
});

describe("an ensemble in a plan", () => {
  test("gives the control's figures, the member of the lowest number, and the spread beside them", async () => {
    FILES["control.csv"] = alone(-0.5, 0);
    const control = await answer({ fields: [{ role: "current", file: "control.csv" }, WIND] });
    const given = await answer({ fields: [{ role: "current", file: "three.csv" }, WIND] });
    const [route] = given.estimate.routes;
    expect(route?.totals).toEqual(control.estimate.routes[0]?.totals);
    expect(route?.ensemble?.members).toEqual([0, 4, 9]);
    expect(route?.ensemble?.time_s?.max).toBe(route?.totals.time_s);
  });

  test("is matched by number across wind and current", async () => {
    const fields = [
      { role: "current", file: "three.csv" },
      { role: "wind", file: "three-winds.csv" },
    ];
    const { estimate } = await answer({ fields });
    FILES["current-9.csv"] = alone(0.6, 0);
    FILES["wind-9.csv"] = alone(-8, 0);
    const nine = await answer({
      fields: [
        { role: "current", file: "current-9.csv" },
        { role: "wind", file: "wind-9.csv" },
      ],
    });
    expect(estimate.routes[0]?.ensemble?.time_s?.min).toBe(nine.estimate.routes[0]?.totals.time_s);
  });

  test("may come as a file a member", async () => {
    Object.assign(FILES, { "a.csv": alone(-0.5, 0), "b.csv": alone(0.1, 0), "c.csv": alone(0.6, 0) });
    const files = await answer({
      fields: [
        { role: "current", file: "c.csv", member: 9 },
        { role: "current", file: "a.csv", member: 0 },
        { role: "current", file: "b.csv", member: 4 },
        WIND,
      ],
    });
    const column = await answer({ fields: [{ role: "current", file: "three.csv" }, WIND] });
    expect(files.estimate.routes[0]?.ensemble).toEqual(column.estimate.routes[0]?.ensemble);
    expect(files.estimate.routes[0]?.totals).toEqual(column.estimate.routes[0]?.totals);
  });

  test("is none where the file's column holds one member", async () => {
    const { estimate } = await answer({ fields: [{ role: "current", file: "one.csv" }, WIND] });
    expect(estimate.routes[0]?.ensemble).toBeUndefined();
  });

  test("whose wind and current have other members is one sentence", async () => {
    const fields = [
      { role: "current", file: "three.csv" },
      { role: "wind", file: "other-winds.csv" },
    ];
    expect(await faultOf({ fields })).toBe(
      "wind and current files of an ensemble have the same members; found member 9 in three.csv and not in other-winds.csv",
    );
  });

  test("tells the files of every member, and the control's as the field's own", async () => {
    Object.assign(FILES, { "a.csv": alone(-0.5, 0), "b.csv": alone(0.1, 0) });
    const fields = [
      { role: "current", file: "b.csv", member: 4 },
      { role: "current", file: "a.csv", member: 0 },
      WIND,
    ];
    const { estimate } = await answer({ fields });
    const [current, wind] = estimate.fields;
    expect(current).toMatchObject({ files: ["a.csv"], validFrom: null });
    expect(current?.members).toEqual([
      { member: 0, files: ["a.csv"] },
      { member: 4, files: ["b.csv"] },
    ]);
    expect([wind?.members, wind?.unused, current?.unused]).toEqual([undefined, undefined, undefined]);
    const column = await answer({ fields: [{ role: "current", file: "three.csv" }, WIND] });
    expect(column.estimate.fields[0]?.members?.map(({ files }) => files.join("+"))).toEqual(
      Array.from({ length: 3 }, () => "three.csv"),
    );
  });

  test("whose member is named twice for the same area leaves the second file out, and says so", async () => {
    Object.assign(FILES, { "a.csv": alone(-0.5, 0), "b.csv": alone(0.1, 0), "c.csv": alone(0.6, 0) });
    const named = (file: string, member: number) => ({ role: "current", file, member });
    const two = [named("a.csv", 0), named("b.csv", 4)];
    const twice = await answer({ fields: [...two, named("c.csv", 4), WIND] });
    const once = await answer({ fields: [...two, WIND] });
    const [route] = twice.estimate.routes;
    expect(route?.findings.filter(({ code }) => code === "field-unused")).toMatchObject([
      {
        severity: "note",
        message: "c.csv is left out: b.csv, named before it, covers all of its area and times",
      },
    ]);
    expect(route?.ensemble).toEqual(once.estimate.routes[0]?.ensemble);
    expect(twice.estimate.fields[0]).toEqual({ ...once.estimate.fields[0], unused: ["c.csv"] });
  });

  test("takes a file without a member for every member's where it adds to theirs, and says so", async () => {
    Object.assign(FILES, {
      "a.csv": alone(-0.5, 0),
      "b.csv": alone(0.1, 0),
      "wide.csv": "lat,lon,u,v\n48,-8,9,9\n48,-2,9,9\n52,-8,9,9\n52,-2,9,9\n",
    });
    const two = [
      { role: "current", file: "a.csv", member: 0 },
      { role: "current", file: "b.csv", member: 1 },
    ];
    const { estimate } = await answer({ fields: [...two, { role: "current", file: "wide.csv" }, WIND] });
    const bare = await answer({ fields: [...two, WIND] });
    expect(estimate.routes[0]?.findings.filter(({ code }) => code === "field-shared")).toMatchObject([
      { severity: "note", message: "wide.csv names no member, so it serves all 2 members" },
    ]);
    expect(estimate.fields[0]?.members?.map(({ files }) => files)).toEqual([
      ["a.csv", "wide.csv"],
      ["b.csv", "wide.csv"],
    ]);
    expect(bare.estimate.routes[0]?.findings.map(({ code }) => code)).not.toContain("field-shared");
  });

  test("with a file whose member is forgotten is one sentence", async () => {
    Object.assign(FILES, { "a.csv": alone(-0.5, 0), "b.csv": alone(0.1, 0), "c.csv": alone(0.6, 0) });
    const a = { role: "current", file: "a.csv", member: 0 };
    const b = { role: "current", file: "b.csv", member: 1 };
    const rule =
      'a current file without its "member", beside others that name theirs, adds area or times to them';
    expect(await faultOf({ fields: [a, b, { role: "current", file: "c.csv" }, WIND] })).toBe(
      `c.csv: ${rule}; found that c.csv lies within a.csv`,
    );
    expect(await faultOf({ fields: [{ role: "current", file: "c.csv" }, a, b, WIND] })).toBe(
      `c.csv: ${rule}; found that a.csv lies within c.csv`,
    );
    expect(
      await faultOf({ fields: [{ role: "current", file: "three.csv" }, { ...a, member: undefined }, WIND] }),
    ).toBe(`a.csv: ${rule}; found that a.csv lies within three.csv`);
  });

  test("named by a column and by the plan is one sentence, in either order", async () => {
    FILES["a.csv"] = alone(-0.5, 0);
    const a = { role: "current", file: "a.csv", member: 4 };
    const rule =
      'the members of a role are named by its files\' own columns or by the plan; found both, a column here and "member": 4 of a.csv in the plan';
    for (const file of ["three.csv", "one.csv"]) {
      expect(await faultOf({ fields: [{ role: "current", file }, a, WIND] })).toBe(`${file}: ${rule}`);
      expect(await faultOf({ fields: [a, { role: "current", file }, WIND] })).toBe(`${file}: ${rule}`);
    }
  });

  test("that names members twice over, or by half a number, is one sentence", async () => {
    expect(await faultOf({ fields: [{ role: "current", file: "three.csv", member: 1 }, WIND] })).toBe(
      'three.csv: members are named by the file\'s own column or by the plan; found both, "member": 1 in the plan',
    );
    expect(await faultOf({ fields: [{ ...CURRENT, member: 1.5 }, WIND] })).toBe(
      "a.plan.json: fields[0].member takes a whole number, not below 0; found 1.5",
    );
  });
});
