import { createReadStream, readdirSync, readFileSync } from "node:fs";
import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { InputError } from "../../src/errors.ts";
import { readCraft } from "../../src/plan/read-craft.ts";
import { readPlan, readPlanDocument } from "../../src/plan/read-plan.ts";
import { parseTime } from "../../src/plan/time.ts";
import { changed, faultOf, opener, ROTOR, read, SUPPLY_RUN, TENDER, WING } from "./documents.ts";

const knots = (number: number) => (number * 1852) / 3600;

describe("a sound plan", () => {
  test("is read into SI units", async () => {
    const plan = await read(SUPPLY_RUN);
    expect(plan.title).toBe("Supply run to Skerrin");
    expect(plan.departure).toBe(parseTime("2027-05-04T06:00:00Z"));
    expect(plan.pace).toEqual({ hold: "through-speed", speed_m_s: knots(12) });
    expect(plan.reserve).toEqual({ kind: "share", share: 0.2 });
    expect(plan.fields).toEqual([
      {
        role: "current",
        file: "sound-current.csv",
        columns: {},
        gaps: "nearest",
        beyond: "stop",
        outside: "stop",
      },
      {
        role: "wind",
        file: "sound-wind.csv",
        columns: { lon: "longitude" },
        gaps: "nearest",
        beyond: "stop",
        outside: "zero",
      },
    ]);
    expect(plan.routes).toEqual([
      {
        name: "Outer",
        waypoints: [
          {
            name: "Quay",
            lat: 58.1032,
            lon: -6.3871,
            path: "geodesic",
            speed_m_s: null,
            height_m: null,
            stay_s: 0,
          },
          {
            name: "Head",
            lat: 58 + 15.2 / 60,
            lon: -(6 + 41 / 60),
            path: "geodesic",
            speed_m_s: null,
            height_m: null,
            stay_s: 300,
          },
          {
            name: "Skerrin",
            lat: 58.402,
            lon: -7.05,
            path: "rhumb",
            speed_m_s: knots(8),
            height_m: 60,
            stay_s: 0,
          },
        ],
      },
    ]);
    const { power, ...craft } = plan.craft;
    expect(craft).toEqual({
      name: "Nine-metre tender",
      moves: "water",
      speed_m_s: knots(12),
      windage: { frontalArea_m2: 7, dragCoefficient: 0.9, efficiency: 0.6, airDensity_kg_m3: 1.225 },
      speeds: { min: knots(3), max: knots(14) },
      hotelPerSecond: 800,
      storePerRate: 1,
      storePerJoule: 1,
      store: { unit: "J", usable: 240 * 3.6e6 * 0.9 },
      limits: {
        wind_m_s: 13,
        gust_m_s: 18,
        groundSpeed_m_s: knots(3),
        opposedWind_m_s: 8,
        opposedCurrent_m_s: 0.5,
      },
    });
    expect([power.model, power.unit, power.min, power.max]).toEqual(["table", "W", 0, knots(12)]);
    expect(power.perSecond(knots(6))).toBe(9000);
  });

  test("needs no more than format, departure, craft and routes; what is left out has its default", async () => {
    const { name, moves, power, store, speed } = TENDER;
    const plan = await read({
      format: "legwork-plan/1",
      departure: "2027-05-04T06:00Z",
      craft: { name, moves, power, store: { capacity: store.capacity }, speed },
      routes: [
        {
          waypoints: [
            { lat: 1, lon: 2 },
            { lat: 2, lon: 2 },
          ],
        },
        {
          path: "rhumb",
          waypoints: [
            { lat: 1, lon: 2 },
            { lat: 2, lon: 2 },
            { lat: 3, lon: 2, path: "geodesic" },
          ],
        },
      ],
    });
    expect(plan.title).toBe("");
    expect(plan.pace).toEqual({ hold: "through-speed", speed_m_s: knots(12) });
    expect(plan.reserve).toBeNull();
    expect(plan.fields).toEqual([]);
    expect(plan.routes.map((route) => route.name)).toEqual(["Route 1", "Route 2"]);
    expect(plan.routes[1]?.waypoints.map((waypoint) => waypoint.name)).toEqual([
      "Waypoint 1",
      "Waypoint 2",
      "Waypoint 3",
    ]);
    expect(plan.routes[1]?.waypoints.map((waypoint) => waypoint.path)).toEqual([
      "rhumb",
      "rhumb",
      "geodesic",
    ]);
    expect(plan.craft.windage).toBeNull();
    expect(plan.craft.hotelPerSecond).toBe(0);
    expect(plan.craft.store.usable).toBe(240 * 3.6e6);
    expect(plan.craft.speeds).toEqual({ min: 0, max: knots(12) });
    expect(plan.craft.limits).toEqual({
      wind_m_s: null,
      gust_m_s: null,
      groundSpeed_m_s: null,
      opposedWind_m_s: 8,
      opposedCurrent_m_s: 0.5,
    });
  });

  test("holds a height until the next, and none before the first", async () => {
    const heights = [undefined, "30 m", undefined, "0 m", undefined];
    const waypoints = heights.map((height, k) => ({
      lat: k,
      lon: 0,
      ...(height === undefined ? {} : { height }),
    }));
    const plan = await read(changed(SUPPLY_RUN, ["routes", [{ waypoints }]]));
    expect(plan.routes[0]?.waypoints.map((waypoint) => waypoint.height_m)).toEqual([null, 30, 30, 0, 0]);
  });

  test.each([
    ["20 %", { kind: "share", share: 0.2 }],
    ["0 %", { kind: "share", share: 0 }],
    ["100 %", { kind: "share", share: 1 }],
    ["15 kWh", { kind: "amount", amount: 54e6 }],
    ["30 min", { kind: "time", time_s: 1800 }],
  ])("takes the reserve %s", async (reserve, expected) => {
    expect((await read(changed(SUPPLY_RUN, ["reserve", reserve]))).reserve).toEqual(expected);
  });

  test.each([
    [
      { hold: "ground-speed", speed: "20 kn" },
      { hold: "ground-speed", speed_m_s: knots(20) },
    ],
    [{ hold: "ground-speed" }, { hold: "ground-speed", speed_m_s: knots(12) }],
    [{ hold: "through-speed" }, { hold: "through-speed", speed_m_s: knots(12) }],
    [
      { hold: "power", power: "9 kW" },
      { hold: "power", power_W: 9000 },
    ],
    [{ hold: "least-energy" }, { hold: "least-energy" }],
  ])("takes the pace %j", async (pace, expected) => {
    const plan = await read(changed(SUPPLY_RUN, ["pace", pace], ["routes[0].waypoints[2].speed", undefined]));
    expect(plan.pace).toEqual(expected);
  });

  test("may name its craft's file, which is opened by that name", async () => {
    const files = { "crafts/tender.craft.json": `\ufeff${JSON.stringify(TENDER)}` };
    const plan = await read(changed(SUPPLY_RUN, ["craft", { file: "crafts/tender.craft.json" }]), files);
    expect(plan.craft.name).toBe("Nine-metre tender");
  });

  test("is the same read from its text and from its document, which is left as it was", async () => {
    const document = structuredClone(SUPPLY_RUN);
    const plan = await readPlanDocument(document, { open: opener() });
    expect(JSON.stringify(plan)).toBe(JSON.stringify(await read(SUPPLY_RUN)));
    expect(document).toEqual(SUPPLY_RUN);
  });

  test("may name the schema it is written to", async () => {
    const plan = await read(
      changed(SUPPLY_RUN, ["$schema", "plan.schema.json"], ["craft.$schema", "craft.schema.json"]),
    );
    expect(plan.routes.length).toBe(1);
  });

  test.each(readdirSync("data/demo").filter((name) => name.endsWith(".plan.json")))(
    "of the demo, %s, is read",
    async (name) => {
      const open = (file: string) => createReadStream(`data/demo/${file}`);
      const plan = await readPlan(readFileSync(`data/demo/${name}`, "utf8"), { file: name, open });
      expect(plan.routes.length).toBeGreaterThan(1);
    },
  );
});

describe("a craft that burns fuel", () => {
  const rows = (unit: string) => [
    { speed: "0 kn", rate: `2 ${unit}` },
    { speed: "12 kn", rate: `30 ${unit}` },
  ];
  const craft = (rowUnit: string, store: object, hotel?: string) =>
    readCraft(
      JSON.stringify(
        changed(
          TENDER,
          ["power.rows", rows(rowUnit)],
          ["store", store],
          ["hotel", hotel],
          ["windage", undefined],
        ),
      ),
    );
  // 210 g/kWh is 210e-3 kg over 3.6e6 J; at 0.84 kg/L, 0.25 L/kWh.
  const consumption = { specificConsumption: "210 g/kWh" };
  const density = { density: "0.84 kg/L" };
  const kgPerJoule = 0.21 / 3.6e6;
  const litresPerJoule = 0.25 / 3.6e6;

  // Three roundings of the conversions: 3.4e-16 relative each way, so 1e-15.
  const close = (value: number | null, expected: number) =>
    expect(Math.abs((value ?? Number.NaN) - expected)).toBeLessThanOrEqual(1e-15 * Math.abs(expected));

  test("by mass, from power", () => {
    const it = craft("kW", { capacity: "2 t", ...consumption }, "10 kW");
    expect(it.store).toEqual({ unit: "kg", usable: 2000 });
    close(it.storePerRate, kgPerJoule);
    close(it.storePerJoule, kgPerJoule);
    close(it.hotelPerSecond, 2.1 / 3600);
  });

  test("by volume, from power", () => {
    const it = craft("kW", { capacity: "0.2 m3", ...consumption, ...density }, "10 kW");
    expect(it.store).toEqual({ unit: "L", usable: 200 });
    close(it.storePerRate, litresPerJoule);
    close(it.storePerJoule, litresPerJoule);
    close(it.hotelPerSecond, 2.5 / 3600);
  });

  test("by mass, from kilograms an hour", () => {
    const it = craft("kg/h", { capacity: "2 t" });
    expect([it.power.unit, it.storePerRate, it.storePerJoule, it.hotelPerSecond]).toEqual([
      "kg/s",
      1,
      null,
      0,
    ]);
    close(craft("kg/h", { capacity: "2 t", ...consumption }, "10 kW").hotelPerSecond, 2.1 / 3600);
    close(craft("t/d", { capacity: "2 t" }, "3.6 kg/h").hotelPerSecond, 1e-3);
  });

  test("by volume, from kilograms an hour, and by mass, from litres an hour", () => {
    close(craft("kg/h", { capacity: "200 L", ...density }).storePerRate, 1 / 0.84);
    close(craft("L/h", { capacity: "200 kg", ...density }).storePerRate, 0.84);
    expect(craft("L/h", { capacity: "200 L" }).storePerRate).toBe(1);
    expect(craft("L/h", { capacity: "200 L", ...consumption }).storePerJoule).toBeNull();
    close(craft("L/h", { capacity: "200 L", ...consumption, ...density }).storePerJoule, litresPerJoule);
    close(craft("L/h", { capacity: "200 L", ...density }, "0.84 kg/h").hotelPerSecond, 1 / 3600);
  });

  test("takes a reserve of its own kind only", async () => {
    const plan = (reserve: string) =>
      changed(SUPPLY_RUN, ["craft.store", { capacity: "2 t", ...consumption }], ["reserve", reserve]);
    expect((await read(plan("100 lb"))).reserve).toEqual({ kind: "amount", amount: 45.359237 });
    expect(await faultOf(() => read(plan("15 kWh")))).toContain("an amount of the store's kind, mass");
  });
});

describe("a craft in the air", () => {
  const flying = (power: object) =>
    readCraft(JSON.stringify(changed(TENDER, ["moves", "air"], ["windage", undefined], ["power", power])));

  test("has the air of the standard atmosphere at sea level unless it names another", () => {
    expect(flying(ROTOR).power.perSecond(10)).toBe(
      flying({ ...ROTOR, airDensity: "1.225 kg/m3" }).power.perSecond(10),
    );
    expect(flying(ROTOR).power.perSecond(10)).not.toBe(
      flying({ ...ROTOR, airDensity: "1 kg/m3" }).power.perSecond(10),
    );
    expect(flying(WING).power.perSecond(20)).toBe(
      flying({ ...WING, airDensity: "1.225 kg/m3" }).power.perSecond(20),
    );
  });

  test("has no range of speeds unless it names one or has a table", () => {
    const craft = changed(
      TENDER,
      ["moves", "air"],
      ["windage", undefined],
      ["power", WING],
      ["speeds", undefined],
    );
    expect(readCraft(JSON.stringify(craft)).speeds).toBeNull();
  });

  test("may be a rotor without mass where no route climbs", async () => {
    const level = changed(
      SUPPLY_RUN,
      ["craft.moves", "air"],
      ["craft.windage", undefined],
      ["craft.power", { ...ROTOR, mass: undefined }],
    );
    expect((await read(level)).craft.power.climbForce).toBe(0);
  });
});

describe("whatever a plan's text or document holds", () => {
  const isAnswer = async (reading: Promise<unknown>) => {
    try {
      // JSON writes NaN and infinities as null, where a plan has null in places of its own: look at each number.
      const plan = await reading;
      JSON.stringify(plan, (key, value) => {
        if (typeof value === "number" && key !== "max") expect(Number.isFinite(value)).toBe(true);
        return value;
      });
    } catch (error) {
      expect(error).toBeInstanceOf(InputError);
      expect((error as Error).message).not.toMatch(/[\n\r\u2028\u2029]/);
      expect((error as Error).message.length).toBeLessThan(1500);
    }
  };

  test("a mutated text is a plan or an InputError of one line", async () => {
    const whole = JSON.stringify(SUPPLY_RUN);
    const piece = fc.oneof(
      fc.constantFrom(...'{}[]:,"\\-+.eE019 %kn'),
      fc.string({ unit: "binary", maxLength: 2 }),
    );
    await fc.assert(
      fc.asyncProperty(
        fc.nat(whole.length),
        fc.nat(12),
        fc.array(piece, { maxLength: 3 }),
        (at, cut, added) =>
          isAnswer(
            readPlan(whole.slice(0, at) + added.join("") + whole.slice(at + cut), {
              file: "x",
              open: opener(),
            }),
          ),
      ),
      { numRuns: 1500 },
    );
  });

  test("a document with any value at any key is a plan or an InputError of one line", async () => {
    const paths: string[] = [];
    const walk = (value: unknown, path: string) => {
      if (path !== "") paths.push(path);
      if (typeof value !== "object" || value === null) return;
      for (const [key, item] of Object.entries(value))
        walk(item, Array.isArray(value) ? `${path}[${key}]` : path === "" ? key : `${path}.${key}`);
    };
    walk(SUPPLY_RUN, "");
    const numbers = fc.oneof(
      fc.double(),
      fc.constantFrom(0, -0, 1e308, -1e308, 5e-324, Number.NaN, 360, -180),
    );
    const units = fc.constantFrom(
      "kn",
      "m/s",
      "kWh",
      "kg",
      "t",
      "L",
      "%",
      "min",
      "h",
      "W",
      "kg/h",
      "L/h",
      "m2",
      "m",
      "",
    );
    const values = fc.oneof(
      fc.anything({
        withBigInt: true,
        withDate: true,
        withMap: true,
        withNullPrototype: true,
        withSparseArray: true,
      }),
      numbers,
      fc.tuple(numbers, units).map(([number, unit]) => `${number} ${unit}`),
    );
    await fc.assert(
      fc.asyncProperty(
        fc.array(fc.tuple(fc.constantFrom(...paths), values), { minLength: 1, maxLength: 3 }),
        (changes) => {
          let document: unknown;
          try {
            document = changed(SUPPLY_RUN, ...changes);
          } catch {
            return Promise.resolve();
          }
          return isAnswer(readPlanDocument(document, { file: "x", open: opener() }));
        },
      ),
      { numRuns: 2500 },
    );
  });

  test("any JSON value is a plan or an InputError of one line", async () => {
    await fc.assert(
      fc.asyncProperty(fc.anything({ withNullPrototype: true }), (value) =>
        isAnswer(readPlanDocument(value, { file: "x", open: opener() })),
      ),
      { numRuns: 1000 },
    );
  });

  test("bytes that are not UTF-8 are told with the file", async () => {
    const open = async function* () {
      yield new Uint8Array([0x7b, 0xff, 0xfe]);
    };
    const plan = JSON.stringify(changed(SUPPLY_RUN, ["craft", { file: "tender.craft.json" }]));
    expect(await faultOf(() => readPlan(plan, { open }))).toBe(
      "tender.craft.json: the text is UTF-8; found bytes that are not",
    );
  });

  test("an error of open that is no InputError stays what it is", async () => {
    // biome-ignore lint/correctness/useYield: it fails before its first piece.
    const open = async function* (): AsyncGenerator<Uint8Array> {
      throw new TypeError("a defect");
    };
    const plan = JSON.stringify(changed(SUPPLY_RUN, ["craft", { file: "tender.craft.json" }]));
    await expect(readPlan(plan, { open })).rejects.toThrow(TypeError);
  });
});
