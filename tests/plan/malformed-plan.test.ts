import { describe, expect, test } from "vitest";
import {
  type Change,
  CUBE,
  changed,
  expectPlace,
  faultOf,
  ROTOR,
  read,
  SUPPLY_RUN,
  TENDER,
  WING,
} from "./documents.ts";

type Case = readonly [what: string, changes: readonly Change[], key: string, accepted: string, found: string];

const SPEED = 'a number with one of m/s, km/h, kn, ft/min, as "12 kn"';
const AIR: readonly Change[] = [
  ["craft.moves", "air"],
  ["craft.windage", undefined],
];
const head = "routes[0].waypoints[1]";

const TOP: readonly Case[] = [
  ["no format", [["format", undefined]], "format", 'takes "legwork-plan/1"', "nothing"],
  ["another format", [["format", "legwork-plan/2"]], "format", 'takes "legwork-plan/1"', '"legwork-plan/2"'],
  ["a format that is a number", [["format", 1]], "format", 'takes "legwork-plan/1"', "1"],
  ["a title that is a number", [["title", 3]], "title", "takes a text of one line", "3"],
  ["a title of two lines", [["title", "a\nb"]], "title", "takes a text of one line", '"a\\nb"'],
  ["no departure", [["departure", undefined]], "departure", "takes an ISO 8601 date and time", "nothing"],
  [
    "a departure without a zone",
    [["departure", "2027-05-04T06:00:00"]],
    "departure",
    "add Z for UTC, or +hh:mm",
    '"2027-05-04T06:00:00"',
  ],
  [
    "a departure on no day",
    [["departure", "2027-02-30T06:00:00Z"]],
    "departure",
    "takes a date of the calendar",
    '"2027-02-30T06:00:00Z"',
  ],
  [
    "a departure that is a number",
    [["departure", 1809410400]],
    "departure",
    "takes an ISO 8601 date and time",
    "1809410400",
  ],
  [
    "a misspelt departure",
    [["depature", "x"]],
    "depature",
    'the nearest that it has is "departure"',
    '"depature"',
  ],
  [
    "a misspelt key in place of a needed one",
    [
      ["departure", undefined],
      ["departs", "x"],
    ],
    "departs",
    'the nearest that it has is "departure"',
    '"departs"',
  ],
  ["a key in capitals", [["Fields", []]], "Fields", 'the nearest that it has is "fields"', '"Fields"'],
  ["a key that is no word", [["two words", 1]], '["two words"]', "a plan has no key", '"two words"'],
  ["a key of two lines", [["x\ny", 1]], '["x\\ny"]', "a plan has no key", '"x\\ny"'],
  ["no craft", [["craft", undefined]], "craft", "is an object: { file } or the craft itself", "nothing"],
  [
    "a craft that is a text",
    [["craft", "tender"]],
    "craft",
    "is an object: { file } or the craft itself",
    '"tender"',
  ],
  ["an empty craft", [["craft", {}]], "craft.file", "takes a text of one line, not empty", "nothing"],
  [
    "a misspelt file of the craft",
    [["craft", { fil: "x" }]],
    "craft.fil",
    'the nearest that it has is "file"',
    '"fil"',
  ],
  [
    "a craft's file beside its name",
    [["craft", { file: "a", name: "b" }]],
    "craft.name",
    "a craft reference has no key",
    '"name"',
  ],
  [
    "an absolute craft file",
    [["craft", { file: "/a.json" }]],
    "craft.file",
    "takes a name relative to the plan",
    '"/a.json"',
  ],
  [
    "a craft file on a drive",
    [["craft", { file: "C:\\a.json" }]],
    "craft.file",
    "takes a name relative to the plan",
    '"C:\\\\a.json"',
  ],
  [
    "a craft file without a name",
    [["craft", { file: "" }]],
    "craft.file",
    "takes a text of one line, not empty",
    '""',
  ],
  [
    "a craft file that is a number",
    [["craft", { file: 5 }]],
    "craft.file",
    "takes a text of one line, not empty",
    "5",
  ],
];

const PACE: readonly Case[] = [
  ["a pace that is a text", [["pace", "fast"]], "pace", "is an object with the key hold or arrive", '"fast"'],
  [
    "a pace that holds nothing",
    [["pace", {}]],
    "pace.hold",
    'takes one of "through-speed", "ground-speed", "power", "least-energy"',
    "nothing",
  ],
  ["a pace unknown", [["pace.hold", "fast"]], "pace.hold", 'takes one of "through-speed"', '"fast"'],
  ["a pace's bare number", [["pace.speed", 12]], "pace.speed", `speed takes ${SPEED}`, "12"],
  ["a pace of speed 0", [["pace.speed", "0 kn"]], "pace.speed", "speed is above 0", '"0 kn"'],
  ["a pace backward", [["pace.speed", "-3 kn"]], "pace.speed", "speed is above 0", '"-3 kn"'],
  [
    "a pace beyond any craft",
    [["pace.speed", "1e9 kn"]],
    "pace.speed",
    "speed is at most 100000 m/s",
    '"1e9 kn"',
  ],
  [
    "a pace of a snail's least",
    [["pace.speed", "1e-9 kn"]],
    "pace.speed",
    "speed is 0 or at least 0.001 m/s",
    '"1e-9 kn"',
  ],
  [
    "a pace outside the table",
    [["pace.speed", "13 kn"]],
    "pace.speed",
    "lies within the rows of the power table, 0 to 12 kn",
    '"13 kn"',
  ],
  [
    "no speed anywhere",
    [
      ["pace.speed", undefined],
      ["craft.speed", undefined],
    ],
    "pace.speed",
    "a speed is given in the pace or in the craft",
    "nothing in either",
  ],
  [
    "no speed and no pace",
    [
      ["pace", undefined],
      ["craft.speed", undefined],
    ],
    "pace.speed",
    "a speed is given in the pace or in the craft",
    "nothing in either",
  ],
  [
    "a speed beside the pace power",
    [["pace", { hold: "power", power: "9 kW", speed: "3 kn" }]],
    "pace.speed",
    "a pace that holds the power has no key",
    '"speed"',
  ],
  [
    "the pace power without one",
    [["pace", { hold: "power" }]],
    "pace.power",
    "power takes a number with one of W, kW",
    "nothing",
  ],
  [
    "the pace power in knots",
    [["pace", { hold: "power", power: "3 kn" }]],
    "pace.power",
    "power takes a number with one of W, kW",
    '"3 kn" (kn is a unit of speed)',
  ],
  [
    "a speed beside the pace least-energy",
    [["pace", { hold: "least-energy", speed: "3 kn" }]],
    "pace.speed",
    "a pace of least energy has no key",
    '"speed"',
  ],
  [
    "least-energy without speeds",
    [
      ["pace", { hold: "least-energy" }],
      ["craft.power", CUBE],
      ["craft.speeds", undefined],
      ["routes[0].waypoints[2].speed", undefined],
    ],
    "pace.hold",
    'the pace "least-energy" needs the craft\'s speeds',
    "none",
  ],
  [
    "power without speeds",
    [
      ["pace", { hold: "power", power: "9 kW" }],
      ["craft.power", CUBE],
      ["craft.speeds", undefined],
      ["routes[0].waypoints[2].speed", undefined],
    ],
    "pace.hold",
    'the pace "power" needs the craft\'s speeds',
    "none",
  ],
  [
    "power with the constant model",
    [
      ["pace", { hold: "power", power: "9 kW" }],
      ["craft.power", { model: "constant", rate: "9 kW" }],
    ],
    "pace.hold",
    "no speed follows from a power that is the same at every speed",
    'the constant model beside "power"',
  ],
  [
    "power where fuel is burnt at unknown power",
    [
      ["pace", { hold: "power", power: "9 kW" }],
      [
        "craft.power.rows",
        [
          { speed: "0 kn", rate: "1 kg/h" },
          { speed: "12 kn", rate: "9 kg/h" },
        ],
      ],
      ["craft.store", { capacity: "1 t" }],
      ["craft.hotel", undefined],
      ["craft.windage", undefined],
    ],
    "pace.hold",
    'the pace "power" needs a specificConsumption',
    "none",
  ],
  ["a reserve without a unit", [["reserve", 20]], "reserve", "reserve takes a number with one of %, J", "20"],
  [
    "a reserve above all",
    [["reserve", "120 %"]],
    "reserve",
    "is at most 100 % of the usable store",
    '"120 %"',
  ],
  ["a reserve below nothing", [["reserve", "-1 %"]], "reserve", "reserve is not below 0", '"-1 %"'],
  [
    "a reserve of another kind of store",
    [["reserve", "15 kg"]],
    "reserve",
    'an amount of the store\'s kind, energy, as "15 kWh"',
    '"15 kg"',
  ],
  [
    "a reserve of volume for a store of energy",
    [["reserve", "15 L"]],
    "reserve",
    'an amount of the store\'s kind, energy, as "15 kWh"',
    '"15 L"',
  ],
  [
    "a reserve in knots",
    [["reserve", "3 kn"]],
    "reserve",
    "reserve takes a number with one of",
    '"3 kn" (kn is a unit of speed)',
  ],
];

const FIELDS: readonly Case[] = [
  ["fields that are no list", [["fields", {}]], "fields", "takes a list of fields", "an object"],
  ["a field that is a text", [["fields", ["a.csv"]]], "fields[0]", "a field is an object", '"a.csv"'],
  [
    "a field without a role",
    [["fields[0].role", undefined]],
    "fields[0].role",
    'takes one of "wind", "current"',
    "nothing",
  ],
  [
    "a field of another role",
    [["fields[0].role", "tide"]],
    "fields[0].role",
    'takes one of "wind", "current"',
    '"tide"',
  ],
  [
    "a field without a file",
    [["fields[0].file", undefined]],
    "fields[0].file",
    "takes a text of one line, not empty",
    "nothing",
  ],
  [
    "a field at an address",
    [["fields[0].file", "http://x/y.csv"]],
    "fields[0].file",
    "takes a name relative to the plan",
    '"http://x/y.csv"',
  ],
  [
    "a field in a home folder",
    [["fields[0].file", "~/y.csv"]],
    "fields[0].file",
    "takes a name relative to the plan",
    '"~/y.csv"',
  ],
  [
    "a field with a misspelt key",
    [["fields[0].gap", "stop"]],
    "fields[0].gap",
    'the nearest that it has is "gaps"',
    '"gap"',
  ],
  [
    "gaps unknown",
    [["fields[0].gaps", "fill"]],
    "fields[0].gaps",
    'takes one of "nearest", "zero", "stop"',
    '"fill"',
  ],
  [
    "beyond unknown",
    [["fields[0].beyond", "zero"]],
    "fields[0].beyond",
    'takes one of "stop", "hold"',
    '"zero"',
  ],
  [
    "outside unknown",
    [["fields[0].outside", "hold"]],
    "fields[0].outside",
    'takes one of "stop", "zero"',
    '"hold"',
  ],
  [
    "columns that are a list",
    [["fields[1].columns", ["lon"]]],
    "fields[1].columns",
    "a column mapping is an object",
    "a list",
  ],
  [
    "a column unknown",
    [["fields[1].columns", { longitud: "x" }]],
    "fields[1].columns.longitud",
    'the nearest that it has is "longitude"',
    '"longitud"',
  ],
  [
    "a header that is a number",
    [["fields[1].columns", { lat: 3 }]],
    "fields[1].columns.lat",
    "a header takes a text of one line, not empty",
    "3",
  ],
  [
    "a header that is empty",
    [["fields[1].columns", { lat: " " }]],
    "fields[1].columns.lat",
    "a header takes a text of one line, not empty",
    '" "',
  ],
];

const ROUTES: readonly Case[] = [
  ["no routes", [["routes", undefined]], "routes", "takes a list of at least 1 route", "nothing"],
  ["empty routes", [["routes", []]], "routes", "takes a list of at least 1 route", "0"],
  ["a route that is a list", [["routes", [[]]]], "routes[0]", "a route is an object", "an empty list"],
  [
    "a route without waypoints",
    [["routes[0].waypoints", undefined]],
    "routes[0].waypoints",
    "takes a list of at least 2 waypoints",
    "nothing",
  ],
  [
    "a route of one waypoint",
    [["routes[0].waypoints", [{ lat: 1, lon: 1 }]]],
    "routes[0].waypoints",
    "takes a list of at least 2 waypoints",
    "1",
  ],
  [
    "a route without a name's text",
    [["routes[0].name", ""]],
    "routes[0].name",
    "name takes a text of one line, not empty",
    '""',
  ],
  [
    "a path unknown",
    [["routes[0].path", "straight"]],
    "routes[0].path",
    'takes one of "geodesic", "rhumb"',
    '"straight"',
  ],
  [
    "two routes of one name",
    [["routes", [SUPPLY_RUN.routes[0], SUPPLY_RUN.routes[0]]]],
    "routes[1].name",
    "routes have different names",
    '"Outer", the name of routes[0]',
  ],
  ["a waypoint that is null", [[head, null]], head, "a waypoint is an object", "null"],
  [
    "a waypoint without latitude",
    [[`${head}.lat`, undefined]],
    `${head}.lat`,
    "latitude takes degrees",
    "nothing",
  ],
  [
    "a waypoint without longitude",
    [[`${head}.lon`, undefined]],
    `${head}.lon`,
    "longitude takes degrees",
    "nothing",
  ],
  ["a latitude beyond the pole", [[`${head}.lat`, 91]], `${head}.lat`, "latitude is in -90..90", "91"],
  [
    "a longitude beyond its turn",
    [[`${head}.lon`, -180.5]],
    `${head}.lon`,
    "longitude is in -180..180 or 0..360",
    "-180.5",
  ],
  [
    "a latitude that is an object",
    [[`${head}.lat`, {}]],
    `${head}.lat`,
    "latitude takes degrees",
    "an object",
  ],
  [
    "a latitude with a longitude's letter",
    [[`${head}.lat`, "58°15.2'E"]],
    `${head}.lat`,
    "takes the hemisphere N or S",
    `"58°15.2'E"`,
  ],
  ["sixty minutes", [[`${head}.lat`, "58°60.0'N"]], `${head}.lat`, "takes minutes below 60", `"58°60.0'N"`],
  [
    "a misspelt key of a waypoint",
    [[`${head}.sped`, "8 kn"]],
    `${head}.sped`,
    'the nearest that it has is "speed"',
    '"sped"',
  ],
  [
    "a waypoint's empty name",
    [[`${head}.name`, ""]],
    `${head}.name`,
    "name takes a text of one line, not empty",
    '""',
  ],
  ["a stay of nothing", [[`${head}.stay`, "0 min"]], `${head}.stay`, "stay is above 0", '"0 min"'],
  [
    "a stay without a unit",
    [[`${head}.stay`, 5]],
    `${head}.stay`,
    "stay takes a number with one of s, min, h",
    "5",
  ],
  [
    "a stay of an age",
    [[`${head}.stay`, "1e9 h"]],
    `${head}.stay`,
    "stay is at most 1000000000 s",
    '"1e9 h"',
  ],
  [
    "a height below the surface",
    [[`${head}.height`, "-1 m"]],
    `${head}.height`,
    "height is not below 0",
    '"-1 m"',
  ],
  [
    "a height without a unit",
    [[`${head}.height`, 60]],
    `${head}.height`,
    "height takes a number with one of m, km, NM, ft",
    "60",
  ],
  [
    "a waypoint twice",
    [[head, { lat: 58.1032, lon: -6.3871 }]],
    head,
    "a waypoint differs from the one before it",
    "58.1032, -6.3871 again",
  ],
  [
    "a waypoint twice, a turn apart",
    [
      ["routes[0].waypoints[0]", { lat: 10, lon: 0 }],
      [head, { lat: 10, lon: 360 }],
    ],
    head,
    "a waypoint differs from the one before it",
    "10, 360 again",
  ],
  [
    "a waypoint twice on the antimeridian",
    [
      ["routes[0].waypoints[0]", { lat: 10, lon: -180 }],
      [head, { lat: 10, lon: 180 }],
    ],
    head,
    "a waypoint differs from the one before it",
    "10, 180 again",
  ],
  [
    "two meridians at a pole",
    [
      ["routes[0].waypoints[0]", { lat: 90, lon: 10 }],
      [head, { lat: 90, lon: 20 }],
    ],
    head,
    "a waypoint differs from the one before it",
    "90, 20 again",
  ],
  [
    "a waypoint's speed outside the table",
    [[`${head}.speed`, "12.5 kn"]],
    `${head}.speed`,
    "lies within the rows of the power table, 0 to 12 kn",
    '"12.5 kn"',
  ],
  [
    "a waypoint's speed under power",
    [["pace", { hold: "power", power: "9 kW" }]],
    "routes[0].waypoints[2].speed",
    'the pace "power" chooses the speed itself',
    '"8 kn"',
  ],
  [
    "a waypoint's speed under least-energy",
    [["pace", { hold: "least-energy" }]],
    "routes[0].waypoints[2].speed",
    'the pace "least-energy" chooses the speed itself',
    '"8 kn"',
  ],
  [
    "a wing that stays",
    [...AIR, ["craft.power", WING]],
    `${head}.stay`,
    "a wing cannot stay at a place",
    '"5 min"',
  ],
  [
    "a stay before the first leg",
    [["routes[0].waypoints[0].stay", "5 min"]],
    "routes[0].waypoints[0].stay",
    "a route's first waypoint takes no stay",
    '"5 min"',
  ],
  [
    "a rotor without mass that climbs",
    [...AIR, ["craft.power", { ...ROTOR, mass: undefined }], [`${head}.height`, "20 m"]],
    "routes[0].waypoints[2].height",
    "a climb needs the mass of the craft's rotor model",
    "a climb from 20 m and no mass",
  ],
];

const ALTERNATES: readonly Case[] = [
  [
    "alternates that are none",
    [["alternates", "Isle"]],
    "alternates",
    "takes a list of alternates",
    '"Isle"',
  ],
  [
    "an alternate that is a text",
    [["alternates", ["Isle"]]],
    "alternates[0]",
    "an alternate is an object",
    '"Isle"',
  ],
  [
    "an alternate without a latitude",
    [["alternates", [{ lon: 1 }]]],
    "alternates[0].lat",
    "latitude takes degrees",
    "nothing",
  ],
  [
    "an alternate beyond the pole",
    [["alternates", [{ lat: 91, lon: 1 }]]],
    "alternates[0].lat",
    "latitude is in",
    "91",
  ],
  [
    "an alternate with an unknown key",
    [["alternates", [{ lat: 1, lon: 1, path: "rhumb" }]]],
    "alternates[0].path",
    "the nearest that it has is",
    '"path"',
  ],
  [
    "an alternate's height without a unit",
    [["alternates", [{ lat: 1, lon: 1, height: 30 }]]],
    "alternates[0].height",
    "height takes a number with one of",
    "30",
  ],
  [
    "an alternate below the surface",
    [["alternates", [{ lat: 1, lon: 1, height: "-3 m" }]]],
    "alternates[0].height",
    "height is not below 0",
    '"-3 m"',
  ],
  [
    "two alternates of one name",
    [
      [
        "alternates",
        [
          { name: "Isle", lat: 1, lon: 1 },
          { name: "Isle", lat: 2, lon: 1 },
        ],
      ],
    ],
    "alternates[1].name",
    'alternates have different names; found "Isle", the name of',
    '"Isle", the name of alternates[0]',
  ],
];

describe("a malformed plan", () => {
  test.each([...TOP, ...PACE, ...FIELDS, ...ROUTES, ...ALTERNATES])(
    "with %s is refused",
    async (_, changes, key, accepted, found) => {
      const message = await faultOf(() => read(changed(SUPPLY_RUN, ...changes)));
      expectPlace(message, "run.plan.json", key);
      expect(message).toContain(accepted);
      // An unknown key is named in the sentence itself; everything else says at its end what was found.
      expect(message.endsWith(`found ${found}`) || message.includes(`has no key ${found};`)).toBe(true);
      expect(message).not.toMatch(/[\n\r]/);
      expect(message.length).toBeLessThan(400);
    },
  );

  test("that is no object is refused at its top", async () => {
    expect(await faultOf(() => read([]))).toBe("run.plan.json: a plan is an object; found an empty list");
    expect(await faultOf(() => read(null))).toBe("run.plan.json: a plan is an object; found null");
  });

  test("with several faults reports an unknown key first, else the first in the schema's order", async () => {
    const two = changed(SUPPLY_RUN, ["routes[0].waypoints[0].lat", 91], ["departure", "x"]);
    expect(await faultOf(() => read(two))).toContain("run.plan.json: departure takes");
    const three = changed(two as object, ["routes[0].waypoints[2].sped", "x"]);
    expect(await faultOf(() => read(three))).toContain("routes[0].waypoints[2].sped");
    expect(await faultOf(() => read(three))).toBe(await faultOf(() => read(three)));
  });

  test("whose craft file has a fault names that file", async () => {
    const plan = changed(SUPPLY_RUN, ["craft", { file: "tender.craft.json" }]);
    const craft = JSON.stringify(changed(TENDER, ["power.rows[2].speed", 12]));
    expect(await faultOf(() => read(plan, { "tender.craft.json": craft }))).toBe(
      `tender.craft.json: power.rows[2].speed takes ${SPEED}; found 12`,
    );
    expect(await faultOf(() => read(plan, { "tender.craft.json": '{\n"name": }' }))).toBe(
      'tender.craft.json, line 2: the text is not JSON: a value stands here; found "}" at column 9',
    );
    expect(await faultOf(() => read(plan))).toBe("tender.craft.json: there is no such file");
  });
});
