import { describe, expect, test } from "vitest";
import type { GridFileOptions } from "../../src/field/csv.ts";
import { readGridFile } from "../../src/field/csv.ts";
import { messageOf, opened } from "./read-text.ts";

const HEAD = "lat,lon,u,v\n";
const TIMED = "time,lat,lon,u,v\n";

type Case = [what: string, text: string, message: string, options?: Partial<GridFileOptions>];

describe("a file that is not a table is told so", () => {
  test.each<Case>([
    ["nothing at all", "", "winds.csv: the file has a header; found none"],
    ["only notes", "# one\n# two\n", "winds.csv: the file has a header; found none"],
    ["only blank lines", "\n\r\n  \n", "winds.csv: the file has a header; found none"],
    ["a header alone", HEAD, "winds.csv: the file has rows below its header; found none"],
    ["a header and blank lines", `${HEAD}\n\n`, "winds.csv: the file has rows below its header; found none"],
    [
      "a row cut short",
      `${HEAD}0,0,1,1\n0,1,1`,
      "winds.csv, line 3: a row has as many cells as the header, 4; found 3",
    ],
    [
      "a row too long",
      `${HEAD}0,0,1,1,\n`,
      "winds.csv, line 2: a row has as many cells as the header, 4; found 5",
    ],
    [
      "a note among the rows",
      `${HEAD}0,0,1,1\n# end\n`,
      "winds.csv, line 3: a row has as many cells as the header, 4; found 1",
    ],
    [
      "a quote left open",
      `${HEAD}0,0,1,1\n0,1,"1,1\n`,
      "winds.csv, line 3: a quoted cell ends with a quote before a separator or a line end; found none",
    ],
    [
      "text after a quote",
      `${HEAD}0,0,"1"2,1\n`,
      "winds.csv, line 2: a quoted cell ends with a quote before a separator or a line end; found none",
    ],
    [
      "an open quote in the header",
      'lat,"lon,u,v\n0,0,1,1\n',
      "winds.csv, line 1: a quoted cell ends with a quote before a separator or a line end; found none",
    ],
    [
      "another separator",
      "lat|lon|u|v\n0|0|1|1\n",
      'winds.csv, line 1: the file has a latitude column (latitude or lat); found the headers "lat|lon|u|v"',
    ],
  ])("%s", async (_, text, message, options) => {
    expect(await messageOf(text, options)).toBe(message);
  });

  test("bytes that are not UTF-8, with their line", async () => {
    const bytes = new Uint8Array([
      ...new TextEncoder().encode(`${HEAD}0,0,1,1\n0,1,`),
      0xe9,
      ...new TextEncoder().encode(",1\n"),
    ]);
    expect(await messageOf(bytes)).toBe("winds.csv, line 3: the text is UTF-8; found bytes that are not");
  });

  test("bytes that are not UTF-8 far down, with their line", async () => {
    const rows = Array.from({ length: 20_000 }, (_, row) => `${row % 90},${Math.floor(row / 90)},1,1\n`).join(
      "",
    );
    const bytes = new Uint8Array([...new TextEncoder().encode(HEAD + rows), 0xff, 10]);
    expect(await messageOf(bytes)).toBe("winds.csv, line 20002: the text is UTF-8; found bytes that are not");
  });

  test("text in UTF-16", async () => {
    const bytes = new Uint8Array([0xff, 0xfe, ...[...HEAD].flatMap((letter) => [letter.charCodeAt(0), 0])]);
    expect(await messageOf(bytes)).toBe(
      "winds.csv: a field is a CSV file; found what looks like text in UTF-16: save it as UTF-8",
    );
  });

  test("one endless line", async () => {
    expect(await messageOf("x".repeat(100_000))).toBe(
      "winds.csv, line 1: a line is at most 65536 bytes long; found a longer one",
    );
  });

  test("a quote that is never closed in a long file, without reading on to its end", async () => {
    const rows = Array.from({ length: 300_000 }, () => "0,0,1,1").join("\n");
    expect(await messageOf(`${HEAD}0,0,"1,1\n${rows}`)).toBe(
      "winds.csv, line 2: a quoted cell ends with a quote before a separator or a line end; found none",
    );
  });
});

describe("columns that are missing or at odds are told with what was looked for and what was found", () => {
  test.each<Case>([
    [
      "a misspelt axis",
      "latt,lon,u,v\n0,0,1,1\n",
      'winds.csv, line 1: the file has a latitude column (latitude or lat); found the headers "latt", "lon", "u", "v"; "latt" is near to lat',
    ],
    [
      "a misspelt long name",
      "lat,lon,eastward_wnd,northward_wind\n",
      'found the headers "lat", "lon", "eastward_wnd", "northward_wind"; "eastward_wnd" is near to eastward_wind',
    ],
    ["no longitude", "lat,u,v\n0,1,1\n", "the file has a longitude column (longitude or lon)"],
    [
      "no wind",
      "lat,lon,pressure\n0,0,1\n",
      "the file has columns for the wind: eastward_wind or u with northward_wind or v, or wind_speed or speed with wind_from_direction or direction_from; found the headers",
    ],
    ["half a wind", "lat,lon,u\n0,0,1\n", "the file has columns for the wind"],
    ["a speed without a direction", "lat,lon,speed,dir\n0,0,1,1\n", "the file has columns for the wind"],
    [
      "a wind's direction toward",
      "lat,lon,speed,direction_to\n0,0,1,1\n",
      '"direction_to" is of the current, while the file\'s role is wind',
    ],
    [
      "a current as wind",
      "lat,lon,eastward_sea_water_velocity,northward_sea_water_velocity\n0,0,1,1\n",
      '"eastward_sea_water_velocity", "northward_sea_water_velocity" are of the current, while the file\'s role is wind',
    ],
    [
      "a wind as current",
      "lat,lon,eastward_wind,northward_wind\n0,0,1,1\n",
      '"eastward_wind", "northward_wind" are of the wind, while the file\'s role is current',
      { role: "current" },
    ],
    [
      "a header twice",
      "lat,lon,u,U,v\n0,0,1,1,1\n",
      'winds.csv, line 1: each header stands once; found "U" twice',
    ],
    [
      "two headers of a quantity",
      "lat,latitude,lon,u,v\n0,0,0,1,1\n",
      'one column gives the latitude; found "lat" and "latitude" (a column mapping settles which)',
    ],
    [
      "height beside pressure",
      "lat,lon,height,air_pressure,u,v\n0,0,1,1,1,1\n",
      "height and air_pressure exclude each other; found both",
    ],
    [
      "components beside speed and direction",
      "lat,lon,u,v,speed,direction_from\n",
      'the wind is given as components or as speed and direction, not as both; found "u", "v", "speed", "direction_from" (a column mapping settles which)',
    ],
    [
      "an unknown unit",
      "lat,lon,u [mph],v\n",
      'the column "u [mph]" has a unit of m/s, km/h, kn or ft/min; found "mph"',
    ],
    [
      "a unit of another kind",
      "lat,lon,height [hPa],u,v\n",
      'the column "height [hPa]" has a unit of m, km, NM or ft; found "hPa"',
    ],
    ["a unit of an angle", "lat [rad],lon,u,v\n", 'the column "lat [rad]" has a unit of deg; found "rad"'],
    ["a unit from the prototype", "lat,lon,u [constructor],v\n", 'found "constructor"'],
    [
      "another spelling of a unit",
      "lat,lon,u [knots],v\n",
      `has a unit of m/s, km/h, kn or ft/min; found "knots" (did you mean kn?)`,
    ],
    ["a unit of time", "time [h],lat,lon,u,v\n", 'the column "time [h]" takes no unit; found "h"'],
    ["an empty unit", "lat,lon,u [],v\n", 'the column "u []" has a unit of'],
    [
      "a mapping from an unknown name",
      HEAD,
      'a column mapping names one of time, latitude, lat, longitude, lon, height, air_pressure, member, eastward_wind, u, northward_wind, v, wind_speed, speed, wind_from_direction, direction_from, wind_speed_of_gust, gust; found "latitud"; the nearest is latitude',
      { columns: { latitud: "lat" } },
    ],
    [
      "a mapping to no header",
      HEAD,
      'winds.csv, line 1, columns: the column mapping of "lon" names a header of the file; "x" is none: found "lat", "lon", "u", "v"',
      { columns: { lon: "x" } },
    ],
    [
      "two mappings of a quantity",
      HEAD,
      'a quantity is mapped once; found "latitude" mapped again',
      { columns: { lat: "lat", latitude: "lon" } },
    ],
    [
      "two mappings to a header",
      HEAD,
      'a column holds one quantity; "lat" is mapped to two',
      { columns: { lat: "lat", lon: "lat" } },
    ],
    ["a current's name mapped in a wind", HEAD, 'found "direction_to"', { columns: { direction_to: "u" } }],
    [
      "notes before, so that the header is further down",
      "# one\n\n# two\nlat,u,v\n",
      "winds.csv, line 4: the file has a longitude column",
    ],
  ])("%s", async (_, text, message, options) => {
    expect(await messageOf(text, options)).toContain(message);
  });

  test("and a message stays short where the headers are many", async () => {
    const headers = Array.from({ length: 2000 }, (_, index) => `column_${index}`).join(",");
    expect((await messageOf(`${headers}\n`)).length).toBeLessThan(800);
  });
});

describe("a cell that breaks its rule is told with its line, its column and what it says", () => {
  test.each<Case>([
    [
      "text for a number",
      `${HEAD}0,0,calm,1\n`,
      'winds.csv, line 2: a cell of "u" is a number; found "calm"',
    ],
    [
      "text in the second component",
      `${HEAD}0,0,1,1\n0,1,1,--\n`,
      'winds.csv, line 3: a cell of "v" is a number; found "--"',
    ],
    [
      "a decimal comma under tabs",
      "lat\tlon\tu\tv\n0\t0\t1,5\t1\n",
      'a cell of "u" is a number; found "1,5"',
    ],
    ["a thousands separator", "lat;lon;u;v\n0;0;1.000,5;1\n", 'a cell of "u" is a number; found "1.000,5"'],
    ["a hexadecimal number", `${HEAD}0,0,0x10,1\n`, 'found "0x10"'],
    ["an infinite number", `${HEAD}0,0,Infinity,1\n`, 'a cell of "u" is a number; found "Infinity"'],
    ["a number beyond floating point", `${HEAD}0,0,1e999,1\n`, 'a cell of "u" is finite; found "1e999"'],
    [
      "a fill value",
      `${HEAD}0,0,-9999,1\n`,
      'a cell of "u" is at most 500 m/s, and a missing value is an empty cell or NaN; found -9999 m/s',
    ],
    ["a fill value beside a missing one", `${HEAD}0,0,,1e20\n`, 'a cell of "v" is at most 500 m/s'],
    ["a gust as a fill value", "lat,lon,u,v,gust\n0,0,1,1,9999\n", 'a cell of "gust" is at most 500 m/s'],
    ["a minus alone", `${HEAD}0,0,-,1\n`, 'found "-"'],
    ["a point alone", `${HEAD}0,0,.,1\n`, 'found "."'],
    ["two points", `${HEAD}0,0,1.2.3,1\n`, 'found "1.2.3"'],
    ["two numbers", `${HEAD}0,0,1 2,1\n`, 'found "1 2"'],
    ["control characters, shown escaped", `${HEAD}0,0,\u0007\u0000,1\n`, 'found "\\u0007\\u0000"'],
    ["a long text, cut", `${HEAD}0,0,${"x".repeat(99)},1\n`, `found "${"x".repeat(59)}…"`],
    ["an empty latitude", `${HEAD},0,1,1\n`, 'a cell of "lat" is a latitude in -90..90; found ""'],
    ["no latitude", `${HEAD}NaN,0,1,1\n`, 'a cell of "lat" is a latitude in -90..90; found "NaN"'],
    [
      "a latitude beyond the pole",
      `${HEAD}90.01,0,1,1\n`,
      'a cell of "lat" is a latitude in -90..90; found "90.01"',
    ],
    [
      "a longitude beyond any turn",
      `${HEAD}0,9999,1,1\n`,
      'a cell of "lon" is a longitude in -1080..1080; found "9999"',
    ],
    [
      "a negative wind speed",
      "lat,lon,speed,direction_from\n0,0,-1,90\n",
      'a cell of "speed" is a speed, not below 0; found -1 m/s',
    ],
    [
      "a negative gust",
      "lat,lon,u,v,gust\n0,0,1,1,-1\n",
      'a cell of "gust" is a speed, not below 0; found -1 m/s',
    ],
    [
      "a direction beyond a turn",
      "lat,lon,speed,direction_from\n0,0,1,999\n",
      'a cell of "direction_from" is a direction in -360..360; found 999',
    ],
    [
      "an empty height",
      "lat,lon,height,u,v\n0,0,,1,1\n",
      'a cell of "height" is a height within 100000 m; found ""',
    ],
    [
      "a pressure of nothing",
      "lat,lon,air_pressure,u,v\n0,0,0,1,1\n",
      'a cell of "air_pressure" is a pressure in 0.008863..1776.87 hPa; found "0"',
    ],
    ["a pressure in the wrong unit", "lat,lon,air_pressure [hPa],u,v\n0,0,85000,1,1\n", 'found "85000"'],
    [
      "an empty time",
      `${TIMED},0,0,1,1\n`,
      'a cell of "time" is a date and time of ISO 8601, as 2027-05-04T06:00:00Z; found ""',
    ],
    [
      "a time without a zone",
      `${TIMED}2027-05-04T06:00:00,0,0,1,1\n`,
      'winds.csv, line 2: a cell of "time" has an explicit zone, as Z or +02:00; found "2027-05-04T06:00:00"',
    ],
    ["a date alone", `${TIMED}2027-05-04,0,0,1,1\n`, "is a date and time of ISO 8601"],
    ["a date in another order", `${TIMED}04/05/2027 06:00Z,0,0,1,1\n`, "is a date and time of ISO 8601"],
    ["hours since", `${TIMED}12,0,0,1,1\n`, "is a date and time of ISO 8601"],
    [
      "a day that is not",
      `${TIMED}2027-02-29T06:00Z,0,0,1,1\n`,
      'a cell of "time" is in the calendar; found "2027-02-29T06:00Z"',
    ],
    ["a month that is not", `${TIMED}2027-13-01T06:00Z,0,0,1,1\n`, "is in the calendar"],
    ["an hour that is not", `${TIMED}2027-02-01T24:00Z,0,0,1,1\n`, "is in the calendar"],
    ["a zone that is not", `${TIMED}2027-02-01T06:00+25:00,0,0,1,1\n`, "has a zone within a day"],
    [
      "a fault below a quoted line end",
      'lat,lon,u,v,name\n0,0,1,1,"a\nb"\n0,1,x,1,c\n',
      'winds.csv, line 4: a cell of "u" is a number; found "x"',
    ],
    ["a fault below notes and blank lines", `# note\n\n${HEAD}\n0,0,x,1\n`, "winds.csv, line 5:"],
  ])("%s", async (_, text, message, options) => {
    expect(await messageOf(text, options)).toContain(message);
  });
});

describe("a node given twice is told with both lines", () => {
  test.each<Case>([
    [
      "in a steady field",
      `${HEAD}0,0,1,1\n0,1,1,1\n0,0.0,2,2\n`,
      "winds.csv, line 4: a node is given once; found latitude 0, longitude 0 on lines 2 and 4",
    ],
    [
      "at a time and a height",
      "time,height,lat,lon,u,v\n2027-05-04T06:00Z,10,0,0,1,1\n2027-05-04T06:00Z,10,0,0,1,1\n",
      "winds.csv, line 3: a node is given once; found latitude 0, longitude 0, height 10 m, time 2027-05-04T06:00Z on lines 2 and 3",
    ],
    ["even as a missing value", `${HEAD}0,0,,\n0,0,,\n`, "on lines 2 and 3"],
    ["among notes and quotes", `# note\n${HEAD}"0",0,1,1\n\n0,0,1,1\n`, "on lines 3 and 5"],
  ])("%s", async (_, text, message) => {
    expect(await messageOf(text)).toContain(message);
  });

  test("at any distance", async () => {
    const rows = Array.from(
      { length: 40_000 },
      (_, row) => `${row % 90},${Math.floor(row / 90) / 2},1,1\n`,
    ).join("");
    expect(await messageOf(`${HEAD}${rows}7,0,1,1\n`)).toContain(
      "latitude 7, longitude 0 on lines 9 and 40002",
    );
  });

  test("also where rows had to wait for their grid", async () => {
    // Every 17th node of a long diagonal walk through 1,500 × 1,500 nodes: sparse enough to wait, and never a grid at first.
    const places = Array.from(
      { length: 3000 },
      (_, row) => `${((row * 7) % 1500) / 20},${((row * 11) % 1500) / 10},1,1\n`,
    );
    const text = `${HEAD}${places.slice(0, 1500).join("")}${places[40]}`;
    const dense = Array.from({ length: 400 }, (_, j) =>
      Array.from({ length: 400 }, (_, i) => `${-j / 20 - 1},${-i / 10 - 1},1,1\n`).join(""),
    ).join("");
    expect(await messageOf(text + dense)).toContain("on lines 42 and 1502");
  });

  test("and by one line where the file cannot be read again", async () => {
    const pieces = opened(new TextEncoder().encode(`${HEAD}0,0,1,1\n0,0,1,1\n`))();
    const iterator = pieces[Symbol.asyncIterator]();
    const once = () => ({ [Symbol.asyncIterator]: () => iterator });
    await expect(readGridFile(once, { file: "winds.csv", role: "wind" })).rejects.toThrow(
      "winds.csv: the file has a header",
    );
  });
});
