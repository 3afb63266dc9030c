import { STANDARD_AIR_DENSITY } from "../../../src/constants.ts";
import { magneticVariation } from "../../../src/estimate/magnetic.ts";
import type { FieldRole } from "../../../src/field/field.ts";
import { type StandardAir, standardAir } from "../../../src/field/standard-atmosphere.ts";
import { cutAtAntimeridian, densify } from "../../../src/geodesy/drawn-line.ts";
import { meridianArc, WGS84 } from "../../../src/geodesy/ellipsoid.ts";
import { makeTrack } from "../../../src/geodesy/make-track.ts";
import { writeCsv } from "../../../src/report/csv.ts";
import { writeGpx } from "../../../src/report/gpx.ts";
import type { ReportInput } from "../../../src/report/input.ts";
import { fromUnit, toUnit } from "../../../src/units.ts";
import { feathersOf } from "../../../web/chart/wind-barb.ts";
import { craftOf, estimateOf, routeOf, waypoint } from "../../estimate/fixtures.ts";
import { readText } from "../../field/read-text.ts";
import { type Answers, caseOf, type Figure, given, listOf } from "./catalogue.ts";
import { rootBetween } from "./search.ts";

const atmosphere = (of: (air: StandardAir) => number) => () =>
  listOf("ATM-01", "H_m").map((height) => of(standardAir(height)));

/** The standard altitude of the density that air of a temperature has at a pressure altitude, ft. */
function densityAltitude(): number {
  const { pressure_altitude_ft, oat_C } = given("ATM-03");
  const standard = standardAir(fromUnit(pressure_altitude_ft as number, "ft"));
  const density = (standard.density * standard.temperature) / fromUnit(oat_C as number, "degC");
  return toUnit(
    rootBetween(0, 11_000, (height) => standardAir(height).density - density),
    "ft",
  );
}

/** Air at the case's geopotential altitude: the change from a geometric one is not ours. */
const at10km = () => standardAir(caseOf("ATM-05").expected.geopotential_m?.value as number);

type MagneticRow = readonly [year: number, height_km: number, lat: number, lon: number, ...rest: number[]];
const magneticRows = (value: Figure) => value as unknown as readonly MagneticRow[];
const declinations = () =>
  magneticRows(caseOf("MAG-01").expected.rows?.value as Figure).map(([year, height, lat, lon]) => {
    const variation = magneticVariation({ lat, lon }, 1000 * height, Date.UTC(year, 0, 1));
    if (variation === null) throw new Error(`the model has no date ${year}`);
    return variation;
  });

/** What a speed is drawn with, in the case's words. */
function featherName(speed_kn: number): string {
  const { pennants, full, half } = feathersOf(speed_kn);
  const names = new Map([
    ["0 0 0", "calm"],
    ["0 0 1", "half barb"],
    ["0 1 0", "full barb"],
    ["0 1 1", "full + half"],
    ["0 2 0", "two full"],
    ["1 0 0", "pennant"],
  ]);
  return names.get(`${pennants} ${full} ${half}`) ?? "other";
}
function featherBins(): Figure {
  const bins: [string, number, number][] = [];
  for (let speed = 0; speed <= 22; speed += 1) {
    const name = featherName(speed);
    const last = bins.at(-1);
    if (last !== undefined && last[0] === name) last[2] = speed;
    else bins.push([name, speed, speed]);
  }
  return bins;
}
function loneSpeedOf(name: string): number {
  const speeds = [5, 10, 15, 20, 25, 30, 35, 40, 45, 50, 55, 60];
  const found = speeds.filter((speed) => featherName(speed) === name);
  if (found.length !== 1) throw new Error(`${found.length} speeds are drawn as ${name}`);
  return found[0] as number;
}

/** Reads a two-by-two file of a role in which the medium moves due east at 2 m/s, told with one standard name and what goes with it. */
async function movesEast(name: string): Promise<boolean> {
  const role: FieldRole = name.includes("sea_water") ? "current" : "wind";
  const speed = role === "wind" ? "wind_speed" : "sea_water_speed";
  const vectors: Record<string, readonly [header: string, cells: string]> = {
    eastward_wind: ["eastward_wind,northward_wind", "2,0"],
    northward_wind: ["northward_wind,eastward_wind", "0,2"],
    eastward_sea_water_velocity: ["eastward_sea_water_velocity,northward_sea_water_velocity", "2,0"],
    northward_sea_water_velocity: ["northward_sea_water_velocity,eastward_sea_water_velocity", "0,2"],
    wind_from_direction: [`wind_from_direction,${speed}`, "270,2"],
    sea_water_velocity_to_direction: [`sea_water_velocity_to_direction,${speed}`, "90,2"],
  };
  const [header, cells] = vectors[name] as readonly [string, string];
  const nodes = ["1,1", "1,2", "2,1", "2,2"].map((place) => `${place},${cells}`);
  const grid = await readText([`latitude,longitude,${header}`, ...nodes].join("\n"), { role });
  const [u, v] = grid.slices[0] as Float64Array;
  return Math.abs((u as number) - 2) < 1e-12 && Math.abs(v as number) < 1e-12;
}
const NO_HEADER_OF_OURS = "wind_to_direction";
const ourNames = (value: Figure): Figure =>
  (value as readonly string[]).filter((name) => name !== NO_HEADER_OF_OURS);
async function namesReadRight(): Promise<Figure> {
  const names = ourNames(caseOf("UNIT-05").expected.names?.value as Figure) as readonly string[];
  const right = await Promise.all(names.map(movesEast));
  return names.filter((_, n) => right[n]);
}

function reported(): ReportInput {
  const route = routeOf(
    waypoint('North "Head", east', 10, 179, { height_m: 50 }),
    waypoint("Date line", 10, 180, { height_m: 60 }),
  );
  const { estimate } = estimateOf(route);
  return {
    estimate: {
      format: "legwork-estimate/1",
      advisory: "Advisory.",
      plan: { title: "Plan" },
      fields: [],
      routes: [estimate],
    },
    routes: [route],
    craft: craftOf(),
    pace: { hold: "through-speed", speed_m_s: 10 },
  };
}

/** The facts of UNIT-07 that what we write obeys, in their order. */
function factsObeyed(): Figure {
  const gpx = writeGpx(reported());
  const csv = writeCsv(reported());
  const { routes } = reported().estimate;
  const times = [routes[0]?.departure, routes[0]?.arrival];
  const obeyed = [
    gpx.includes('lon="179"') && gpx.includes('lon="-180"') && !gpx.includes('lon="180"'),
    gpx.includes("<ele>60</ele>") &&
      times.every((time) => /^\d{4}-\d\d-\d\dT\d\d:\d\d:\d\d\.\d{3}Z$/.test(`${time}`)),
    !/<(?:course|speed)\b/.test(gpx) && gpx.includes('version="1.1"'),
    /^[^\n]*\r\n[^\n]*\r\n$/.test(csv) &&
      csv.includes(',"North ""Head"", east",') &&
      csv.startsWith("route,"),
  ];
  const facts = caseOf("UNIT-07").expected.facts?.value as readonly string[];
  return facts.map((fact, n) => (obeyed[n] ? fact : "not obeyed"));
}

const knot = () => fromUnit(1, "kn");

export const standards: Answers = {
  "ATM-01": {
    T_K: {
      words: "temperatures of the standard atmosphere",
      ours: atmosphere(({ temperature }) => temperature),
      printed: [288.15, 281.65, 216.65, 216.65],
    },
    p_Pa: {
      words: "pressures of the standard atmosphere",
      ours: atmosphere(({ pressure }) => pressure),
      printed: [101_325, 89_875, 22_632, 5475],
    },
    rho: {
      words: "densities of the standard atmosphere",
      ours: atmosphere(({ density }) => density),
      printed: [STANDARD_AIR_DENSITY, 1.1116, 0.3639, 0.088],
    },
    a_ms: {
      words: "speeds of sound of the standard atmosphere",
      ours: atmosphere(({ speedOfSound }) => speedOfSound),
      printed: [340.294, 336.4341, 295.0696, 295.0696],
    },
  },
  "ATM-03": {
    density_altitude_ft: {
      words: "density altitude, by the inverse of our standard density",
      ours: densityAltitude,
    },
  },
  "ATM-05": {
    T_K: { words: "temperature at 10 km geometric", ours: () => at10km().temperature },
    p_Pa: { words: "pressure at 10 km geometric", ours: () => at10km().pressure },
    rho: { words: "density at 10 km geometric", ours: () => at10km().density },
  },
  "MAG-01": {
    rows: {
      words: "declinations of the World Magnetic Model 2025",
      ours: declinations,
      part: (value) => magneticRows(value).map((row) => row[7] as number),
      printed: null,
    },
  },
  "UNIT-01": {
    knot_ms: { words: "knot in metres a second", ours: knot },
    knot_mph: {
      words: "knot in statute miles an hour (1609.344 m, not a unit of ours)",
      ours: () => (knot() * 3600) / 1609.344,
    },
    nm_ft: { words: "nautical mile in feet", ours: () => toUnit(fromUnit(1, "NM"), "ft") },
    knot_ft_s: { words: "knot in feet a second", ours: () => toUnit(knot(), "ft/min") / 60 },
  },
  "UNIT-02": {
    b_m: { words: "polar radius of WGS84", ours: () => WGS84.b },
    R1_m: { words: "mean radius (2a + b)/3 of our radii", ours: () => (2 * WGS84.a + WGS84.b) / 3 },
    quarter_meridian_m: { words: "quarter meridian", ours: () => meridianArc(WGS84, 0, 90) },
  },
  "UNIT-04": {
    bins_kn: { words: "whole knots that are drawn alike", ours: featherBins },
    pennant_kn: { words: "speed of a lone pennant", ours: () => loneSpeedOf("pennant") },
  },
  "UNIT-05": {
    names: {
      words: "standard names that are read with the right direction",
      ours: namesReadRight,
      part: ourNames,
    },
  },
  "UNIT-06": {
    multilinestring: {
      words: "parts of a line cut at the antimeridian",
      ours: () =>
        cutAtAntimeridian(densify(makeTrack({ lat: 45, lon: 170 }, { lat: 45, lon: -170 }, "rhumb"))),
    },
  },
  "UNIT-07": { facts: { words: "rules of GPX 1.1 and RFC 4180 that our files obey", ours: factsObeyed } },
};
