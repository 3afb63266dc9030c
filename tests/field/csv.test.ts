import { describe, expect, test } from "vitest";
import { NODE_GIVEN, NODE_MISSING } from "../../src/field/field.ts";
import { messageOf, nodesOf, readText } from "./read-text.ts";

const M = NODE_MISSING;
const G = NODE_GIVEN;

/** A two by two grid: latitudes 50 and 51, longitudes 3 and 5, u and v from 1 to 8 in the order of nodes. */
const SQUARE = ["lat,lon,u,v", "50,3,1,2", "50,5,3,4", "51,3,5,6", "51,5,7,8"];
const SQUARE_VALUES = [1, 2, 3, 4, 5, 6, 7, 8];

const text = (lines: readonly string[]) => `${lines.join("\n")}\n`;

describe("a steady field of components", () => {
  test("is read into ascending axes and interleaved components", async () => {
    const grid = await readText(text(SQUARE));
    expect([...grid.lat]).toEqual([50, 51]);
    expect([...grid.lon]).toEqual([3, 5]);
    expect(grid.times).toBeNull();
    expect(grid.height).toBeNull();
    expect(grid.gusts).toBeNull();
    expect(grid.global).toBe(false);
    expect(grid.slices.map((slice) => [...slice])).toEqual([SQUARE_VALUES]);
    expect(grid.masks).toEqual([null]);
    expect(grid.bytes).toBe(text(SQUARE).length);
  });

  test("is the same whatever the order of its columns", async () => {
    const turned = ["v,lon,u,lat", "2,3,1,50", "4,5,3,50", "6,3,5,51", "8,5,7,51"];
    expect(nodesOf(await readText(text(turned)))).toEqual(nodesOf(await readText(text(SQUARE))));
  });

  test("is the same with latitudes from north to south", async () => {
    const turned = [SQUARE[0], ...SQUARE.slice(1).reverse()] as string[];
    expect(nodesOf(await readText(text(turned)))).toEqual(nodesOf(await readText(text(SQUARE))));
  });

  test("may space its axes irregularly", async () => {
    const grid = await readText("lat,lon,u,v\n0,0,1,1\n0,1,1,1\n0,7.5,1,1\n");
    expect([...grid.lon]).toEqual([0, 1, 7.5]);
  });

  test("may hold one node", async () => {
    const grid = await readText("lat,lon,u,v\n0,0,1,2\n");
    expect(grid.slices).toEqual([Float64Array.of(1, 2)]);
  });
});

describe("the text of a table", () => {
  test.each([
    ["a byte order mark", `\uFEFF${text(SQUARE)}`],
    ["CR LF line ends", SQUARE.join("\r\n")],
    ["CR line ends", SQUARE.join("\r")],
    ["no line end after the last row", SQUARE.join("\n")],
    ["blank lines", text(["", ...SQUARE.slice(0, 2), "", "  ", ...SQUARE.slice(2), "", ""])],
    ["tabs", text(SQUARE).replaceAll(",", "\t")],
    ["semicolons", text(SQUARE).replaceAll(",", ";")],
    ["quotes", text(SQUARE).replaceAll(/[^,\n]+/g, '"$&"')],
    ["blanks around cells", text(SQUARE).replaceAll(",", " , ")],
    ["signs and exponents", text(SQUARE).replaceAll(/\b([1-8])(?=[,\n])/g, "+$1.0e0")],
    ["upper-case headers", text(SQUARE).replace("lat,lon,u,v", " LAT , Lon,U,V")],
    ["long names", text(SQUARE).replace("lat,lon,u,v", "latitude,longitude,eastward_wind,northward_wind")],
    [
      "quoted line ends in a column that is not used",
      text(SQUARE.map((line, row) => `${line},"a${row}\n, ""b"""`)),
    ],
  ])("may have %s", async (_, variant) => {
    expect(nodesOf(await readText(variant))).toEqual(nodesOf(await readText(text(SQUARE))));
  });

  test("takes a decimal comma, and a point, where the separator is a semicolon", async () => {
    const grid = await readText("lat;lon;u;v\n50,5;3;-1,25;2.5\n");
    expect([...grid.lat]).toEqual([50.5]);
    expect([...(grid.slices[0] as Float64Array)]).toEqual([-1.25, 2.5]);
  });

  test("keeps the notes before the header and names the columns that are not used", async () => {
    const grid = await readText("# made by hand\n#source: none\n\nlat,lon,u,v,station,\n0,0,1,1,x,\n");
    expect(grid.notes).toEqual(["made by hand", "source: none"]);
    expect(grid.ignoredColumns).toEqual(["station"]);
  });

  test("reads numbers to the last bit", async () => {
    const numbers = [
      "0.1",
      "-0.30000000000000004",
      "3.0000000000000001",
      "123456789012345678",
      "1e-7",
      "17.3205080757",
    ];
    for (const number of numbers) {
      const scaled = number === "123456789012345678" ? `${number}e-16` : number;
      const grid = await readText(`lat,lon,u,v\n0,0,${scaled},0\n`);
      expect(grid.slices[0]?.[0], scaled).toBe(Number(scaled));
    }
  });

  test("tells its progress up to the file's size", async () => {
    const told: number[] = [];
    const rows = Array.from({ length: 20_000 }, (_, row) => `${row % 100},${Math.floor(row / 100) / 2},1,2`);
    const file = text(["lat,lon,u,v", ...rows.filter((row) => Number(row.split(",")[0]) <= 90)]);
    await readText(file, { onProgress: (bytes) => told.push(bytes) });
    expect(told.length).toBeGreaterThan(2);
    expect(told).toEqual([...told].sort((a, b) => a - b));
    expect(told.at(-1)).toBe(file.length);
  });
});

describe("units in brackets", () => {
  // Exact definitions: SI Brochure (2019), table 8 (km/h); 1852 m and 0.3048 m: ISO 80000-3 (2019).
  test.each([
    ["m/s", 10],
    ["km/h", 10 / 3.6],
    ["kn", 18520 / 3600],
    ["ft/min", 3.048 / 60],
    ["m s-1", 10],
  ])("turn 10 %s into m/s, each component by its own", async (unit, expected) => {
    const grid = await readText(`lat [deg],lon,u [${unit}],v\n0,0,10,-10\n`);
    // One rounding of the factor and one of the product: 2 units in the last place.
    expect(grid.slices[0]?.[0]).toBeCloseTo(expected, 14);
    expect(grid.slices[0]?.[1]).toBe(-10);
  });

  test.each([
    ["m", 100],
    ["km", 100_000],
    ["ft", 30.48],
    ["NM", 185_200],
  ])("turn a height of 100 %s into m", async (unit, expected) => {
    const lines = `lat,lon,height [${unit}],u,v\n0,0,${expected > 1e5 ? 0.1 : 100},1,1\n`;
    expect((await readText(lines)).height?.[0]).toBeCloseTo(expected > 1e5 ? expected / 1000 : expected, 10);
  });

  test("belong to gusts as well", async () => {
    const grid = await readText("lat,lon,u,v,gust [km/h]\n0,0,1,1,36\n");
    expect(grid.gusts?.[0]?.[0]).toBeCloseTo(10, 14);
  });
});

describe("speed and direction", () => {
  test.each([
    // Wind from the north moves southward: WMO Guide to Instruments (WMO-No. 8), 5.1.1.
    [0, 0, -10],
    [90, -10, 0],
    [180, 0, 10],
    [270, 10, 0],
    [360, 0, -10],
    [-90, 10, 0],
    [45, -10 * Math.SQRT1_2, -10 * Math.SQRT1_2],
  ])("turn a wind of 10 m/s from %d° into components, exact at the quarters", async (direction, u, v) => {
    const grid = await readText(`lat,lon,wind_speed,wind_from_direction\n0,0,10,${direction}\n`);
    const [east, north] = grid.slices[0] as Float64Array;
    if (direction % 90 === 0) expect([east, north]).toEqual([u, v]);
    expect(east).toBeCloseTo(u, 14);
    expect(north).toBeCloseTo(v, 14);
  });

  test.each([
    [0, 0, 2],
    [90, 2, 0],
    [180, 0, -2],
    [270, -2, 0],
  ])("turn a current of 2 m/s toward %d° into components", async (direction, u, v) => {
    const file = `lat,lon,sea_water_speed,sea_water_velocity_to_direction\n0,0,2,${direction}\n`;
    const grid = await readText(file, { role: "current" });
    expect([...(grid.slices[0] as Float64Array)]).toEqual([u, v]);
  });

  test("have short names", async () => {
    const wind = await readText("lat,lon,speed [kn],direction_from\n0,0,10,270\n");
    const current = await readText("lat,lon,speed [kn],direction_to\n0,0,10,90\n", { role: "current" });
    expect(wind.slices).toEqual(current.slices);
  });

  test("give way to components, or these to them, where the column mapping says so", async () => {
    const file = "lat,lon,u,v,speed,direction_from\n0,0,1,2,5,270\n";
    const components = await readText(file, { columns: { u: "u" } });
    expect([...(components.slices[0] as Float64Array)]).toEqual([1, 2]);
    expect(components.ignoredColumns).toEqual(["speed", "direction_from"]);
    const polar = await readText(file, { columns: { wind_from_direction: "direction_from" } });
    expect([...(polar.slices[0] as Float64Array)]).toEqual([5, 0]);
  });

  test("of which one stands alone beside components is not used", async () => {
    const grid = await readText("lat,lon,u,v,speed\n0,0,1,2,5\n");
    expect(grid.ignoredColumns).toEqual(["speed"]);
  });
});

describe("the column mapping", () => {
  test("gives any header a meaning, with its own unit, and takes it from the header of that name", async () => {
    const file = "y,x,spd [kn],dir,lat\n1,2,36,270,9\n";
    const columns = { lat: "y", longitude: "X", wind_speed: "spd", wind_from_direction: "dir" };
    const grid = await readText(file, { columns });
    expect([...grid.lat, ...grid.lon]).toEqual([1, 2]);
    expect(grid.slices[0]?.[0]).toBeCloseTo(18.52, 13);
    expect(grid.ignoredColumns).toEqual(["lat"]);
  });

  test("may name the header with its unit", async () => {
    const grid = await readText("lat,lon,east [km/h],v\n0,0,36,1\n", { columns: { u: "east [km/h]" } });
    expect(grid.slices[0]?.[0]).toBeCloseTo(10, 14);
  });
});

describe("valid times", () => {
  test("are instants of ISO 8601 in any zone, in any order of rows", async () => {
    const rows = [
      "2027-05-04T09:00:00+02:00,0,0,3,0",
      "2027-05-04T06:00:00Z,0,0,1,0",
      "20270504T063000Z,0,0,2,0",
    ];
    const grid = await readText(text(["time,lat,lon,u,v", ...rows]));
    const start = Date.UTC(2027, 4, 4, 6);
    expect([...(grid.times as Float64Array)]).toEqual([start, start + 1_800_000, start + 3_600_000]);
    expect(grid.slices.map((slice) => slice[0])).toEqual([1, 2, 3]);
  });

  test("that are one instant in two spellings are one time", async () => {
    expect(
      await messageOf("time,lat,lon,u,v\n2027-05-04T06:00:00Z,0,0,1,0\n2027-05-04T08:00+02:00,0,0,1,0\n"),
    ).toContain("a node is given once");
  });
});

describe("levels", () => {
  test("in m are ordered upward", async () => {
    const rows = ["0,0,80,8,0", "0,0,10,1,0"];
    const grid = await readText(text(["lat,lon,height,u,v", ...rows]));
    expect([...(grid.height as Float64Array)]).toEqual([10, 80]);
    expect([...(grid.slices[0] as Float64Array)]).toEqual([1, 0, 8, 0]);
  });

  test("of pressure become pressure altitudes, the greatest pressure lowest", async () => {
    const rows = ["0,0,850,8,0", "0,0,1013.25,1,0", "0,0,226.32064,2,0"];
    const grid = await readText(text(["lat,lon,air_pressure [hPa],u,v", ...rows]));
    const [sea, middle, high] = grid.height as Float64Array;
    expect(sea).toBeCloseTo(0, 9);
    // ICAO Doc 7488/3, table 3: 850 hPa at 1,457 m geopotential; printed to the metre.
    expect(middle).toBeCloseTo(1457.3, 0);
    expect(high).toBeCloseTo(11_000, 1);
    expect([...(grid.slices[0] as Float64Array)]).toEqual([1, 0, 8, 0, 2, 0]);
  });

  test("of pressure in Pa are the same", async () => {
    const inPascal = await readText("lat,lon,air_pressure [Pa],u,v\n0,0,85000,8,0\n");
    const inHectopascal = await readText("lat,lon,air_pressure,u,v\n0,0,850,8,0\n");
    expect(inPascal.height?.[0]).toBeCloseTo(inHectopascal.height?.[0] as number, 8);
  });
});

describe("missing values", () => {
  test.each([
    ["an empty cell", ""],
    ["NaN", "NaN"],
    ["nan in blanks", " nan "],
    ["empty quotes", '""'],
  ])("may be %s, and one component missing takes the node", async (_, cell) => {
    const grid = await readText(`lat,lon,u,v\n0,0,1,1\n0,1,2,${cell}\n`);
    expect([...(grid.masks[0] as Uint8Array)]).toEqual([G, M]);
    expect([...(grid.slices[0] as Float64Array)]).toEqual([1, 1, 0, 0]);
  });

  test("are nodes that no row gives", async () => {
    const grid = await readText(text(SQUARE.slice(0, 4)));
    expect([...(grid.masks[0] as Uint8Array)]).toEqual([G, G, G, M]);
  });

  test("of a direction or a speed take the node", async () => {
    const grid = await readText("lat,lon,speed,direction_from\n0,0,,90\n0,1,5,\n0,2,5,90\n");
    expect([...(grid.masks[0] as Uint8Array)]).toEqual([M, M, G]);
  });

  test("of gusts stay NaN and leave the node", async () => {
    const grid = await readText("lat,lon,u,v,gust\n0,0,1,1,\n0,1,1,1,7\n");
    expect(grid.masks).toEqual([null]);
    expect(grid.gusts).toEqual([Float64Array.of(Number.NaN, 7)]);
  });

  test("that repeat from time to time share one mask", async () => {
    const rows = [6, 9, 12].flatMap((hour) =>
      [0, 1].map((lon) => `2027-05-04T${hour + 10}:00Z,0,${lon},${lon || ""},1`),
    );
    const grid = await readText(text(["time,lat,lon,u,v", ...rows]));
    expect(grid.masks[0]).toBe(grid.masks[2]);
    expect([...(grid.masks[0] as Uint8Array)]).toEqual([M, G]);
  });

  test("may be nineteen in twenty, but no more", async () => {
    const diagonal = (count: number) => Array.from({ length: count }, (_, index) => `${index},${index},1,1`);
    expect((await readText(text(["lat,lon,u,v", ...diagonal(20)]))).lat.length).toBe(20);
    expect(await messageOf(text(["lat,lon,u,v", ...diagonal(21)]))).toBe(
      "winds.csv: the rows are not a grid: at least one node in 20 is given; found one in 21 of 21 × 21",
    );
  });

  test("of a file of scattered places are told without room for the grid that they would span", async () => {
    // 20,000 places would span 400 million nodes, 6.4 GB.
    const rows = Array.from({ length: 20_000 }, (_, row) => `${(row % 8999) / 100},${(row * 7) / 1000},1,1`);
    expect(await messageOf(text(["lat,lon,u,v", ...rows]))).toContain("the rows are not a grid");
  });
});

describe("longitudes of any turn", () => {
  const row = (lon: number, value: number) => `0,${lon},${value},0`;
  const read = (lons: readonly number[], values: readonly number[] = lons.map((_, index) => index % 400)) =>
    readText(text(["lat,lon,u,v", ...lons.map((lon, index) => row(lon, values[index] as number))]));

  test("run across the antimeridian", async () => {
    const grid = await read([175, 178, -179, -176]);
    expect([...grid.lon]).toEqual([175, 178, 181, 184]);
    expect([...(grid.slices[0] as Float64Array)].filter((_, index) => index % 2 === 0)).toEqual([0, 1, 2, 3]);
    expect(grid.global).toBe(false);
  });

  test("close around the globe, the first meridian again at the end", async () => {
    const grid = await read([0, 90, 180, 270]);
    expect([...grid.lon]).toEqual([-180, -90, 0, 90, 180]);
    expect([...(grid.slices[0] as Float64Array)].filter((_, index) => index % 2 === 0)).toEqual([
      2, 3, 0, 1, 2,
    ]);
    expect(grid.global).toBe(true);
  });

  test("that begin at 20 and end at 377.5 are a global grid", async () => {
    const lons = Array.from({ length: 144 }, (_, index) => 20 + 2.5 * index);
    const grid = await read(lons);
    expect(grid.global).toBe(true);
    expect(grid.lon.length).toBe(145);
    expect(grid.lon[0]).toBe(-180);
    expect(grid.lon[144]).toBe(180);
  });

  test("with an opening wider than every other step do not close", async () => {
    const grid = await read([0, 60, 120, 180, 240]);
    expect(grid.global).toBe(false);
    expect([...grid.lon]).toEqual([0, 60, 120, 180, 240]);
  });

  test("may be 150,000 on one parallel", async () => {
    const grid = await read(Array.from({ length: 150_000 }, (_, index) => index / 1000));
    expect(grid.lon.length).toBe(150_000);
    expect(grid.slices[0]?.[2 * 149_999]).toBe(149_999 % 400);
  });

  test("that meet at 0 and 360 must agree, and are one meridian", async () => {
    const grid = await read([0, 120, 240, 360], [5, 6, 7, 5]);
    expect([...grid.lon]).toEqual([-120, 0, 120, 240]);
    await expect(read([0, 120, 240, 360], [5, 6, 7, 4])).rejects.toThrow(
      "winds.csv: longitudes 0 and 360 are one meridian and give the same values; found different ones at latitude 0",
    );
  });

  test("of which one of two that meet has no value take the other's", async () => {
    const grid = await readText("lat,lon,u,v,gust\n0,0,,1,\n0,120,6,1,1\n0,240,7,1,1\n0,360,5,1,9\n");
    expect(grid.masks).toEqual([null]);
    expect(grid.gusts?.[0]?.[1]).toBe(9);
  });

  test("turned by 360° keep their decimals", async () => {
    expect([...(await read([200.1, 200.2])).lon]).toEqual([-159.9, -159.8]);
  });
});

describe("members of an ensemble", () => {
  test("are taken where the file holds one", async () => {
    expect((await readText("member,lat,lon,u,v\n3,0,0,1,1\n3,0,1,1,1\n")).lon.length).toBe(2);
  });
});
