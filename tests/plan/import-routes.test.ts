import { describe, expect, it } from "vitest";
import { importRoutes } from "../../src/plan/import-routes.ts";
import { writeGeoJson } from "../../src/report/geojson.ts";
import { writeGpx } from "../../src/report/gpx.ts";
import { drone, ocean, tender } from "../report/fixtures.ts";

const gpx = (inside: string) =>
  `<?xml version="1.0"?>\n<gpx version="1.1" xmlns="http://www.topografix.com/GPX/1/1">\n${inside}\n</gpx>`;
const geojson = (...features: unknown[]) => JSON.stringify({ type: "FeatureCollection", features });
const feature = (geometry: unknown, properties: unknown = {}) => ({ type: "Feature", properties, geometry });
const routesIn = (text: string, file = "out.gpx") => importRoutes(text, file).routes;

describe("GPX", () => {
  it("gives routes and tracks with their names, every point a waypoint", () => {
    const text =
      gpx(`<rte><name>A &amp; B</name><rtept lat="1" lon="2"><name>Quay</name></rtept><rtept lat="1.5" lon="-2"/></rte>
      <trk><name>Run</name><trkseg><trkpt lat="3" lon="4"/></trkseg><trkseg><trkpt lat="5" lon="6"/></trkseg></trk>
      <wpt lat="0" lon="0"/>`);
    expect(importRoutes(text, "x.gpx")).toEqual({
      routes: [
        {
          name: "A & B",
          waypoints: [
            { name: "Quay", lat: 1, lon: 2 },
            { lat: 1.5, lon: -2 },
          ],
        },
        {
          name: "Run",
          waypoints: [
            { lat: 3, lon: 4 },
            { lat: 5, lon: 6 },
          ],
        },
      ],
      notes: ["left out of it: 1 beside the routes (wpt)"],
    });
  });

  it("makes one route of waypoints alone, named for the file's own name or the file", () => {
    const points = '<wpt lat="1" lon="2"><name>One</name></wpt><wpt lat="3" lon="4"/>';
    expect(routesIn(gpx(points), "folder/my marks.gpx")[0]?.name).toBe("my marks");
    expect(routesIn(gpx(`<metadata><name>Marks</name></metadata>${points}`))[0]).toEqual({
      name: "Marks",
      waypoints: [
        { name: "One", lat: 1, lon: 2 },
        { lat: 3, lon: 4 },
      ],
    });
  });

  it("reads any prefix, encoding mark, CDATA and character reference", () => {
    const text =
      '\uFEFF<g:gpx xmlns:g="http://www.topografix.com/GPX/1/0"><g:rte><g:name><![CDATA[<b>]]>&#233;</g:name><g:rtept lat=" +1.5 " lon=".5"/><g:rtept lat="1e1" lon="2"/></g:rte></g:gpx>';
    expect(routesIn(text)).toEqual([
      {
        name: "<b>é",
        waypoints: [
          { lat: 1.5, lon: 0.5 },
          { lat: 10, lon: 2 },
        ],
      },
    ]);
  });

  it("leaves out a point that repeats the one before, and says so", () => {
    const point = '<trkpt lat="1" lon="2"/>';
    const text = gpx(`<trk><trkseg>${point}${point}${point}<trkpt lat="3" lon="4"/>${point}</trkseg></trk>`);
    const { routes, notes } = importRoutes(text, "run.gpx");
    expect(routes[0]?.waypoints).toHaveLength(3);
    expect(notes).toEqual(['"run": left out 2 waypoints that repeat the one before']);
  });

  it.each([tender, drone, ocean])("gives back the routes that writeGpx wrote (%#)", (input) => {
    const routes = routesIn(writeGpx(input));
    expect(routes.map(({ name }) => name)).toEqual(input.routes.map(({ name }) => name));
    routes.forEach(({ waypoints }, at) => {
      const wanted = input.routes[at]?.waypoints ?? [];
      expect(waypoints.map(({ name }) => name)).toEqual(wanted.map(({ name }) => name));
      // GPX is written with nine places of a degree.
      waypoints.forEach(({ lat, lon, height }, n) => {
        expect(Number(lat)).toBeCloseTo(wanted[n]?.lat ?? Number.NaN, 8);
        expect(Math.abs(Number(lon) - (wanted[n]?.lon ?? Number.NaN)) % 360).toBeCloseTo(0, 8);
        const kept = wanted[n]?.height_m;
        expect(height).toBe(kept === null ? undefined : `${kept} m`);
      });
    });
  });

  it.each([
    ["", "a table begins with a header; found none"],
    ["<gpx", "GPX is well-formed XML"],
    ["<gpx>", "GPX is well-formed XML"],
    ["<gpx></gxp>", "GPX is well-formed XML"],
    ["<gpx><rte></gpx></rte>", "GPX is well-formed XML"],
    ["<gpx/><gpx/>", "GPX is well-formed XML"],
    ["<gpx>&nbsp;</gpx>", "GPX is well-formed XML"],
    ["<gpx a=1></gpx>", "GPX is well-formed XML"],
    ["<!-- only this -->", "GPX is well-formed XML"],
    ["<kml/>", 'a GPX file\'s outermost element is gpx; found "kml"'],
    ["<gpx/>", "a file of routes holds at least one route; found none"],
    ["<gpx><rte/></gpx>", 'the route "out" has at least 2 different places; found 0'],
    [
      '<gpx><wpt lat="1" lon="2"/></gpx>',
      'the list of waypoints "out" has at least 2 different places; found 1',
    ],
    ['<gpx><rte><rtept lon="2"/></rte></gpx>', 'latitude takes decimal degrees; found ""'],
    ['<gpx><rte><rtept lat="north" lon="2"/></rte></gpx>', 'latitude takes decimal degrees; found "north"'],
    ['<gpx><rte><rtept lat="1,5" lon="2"/></rte></gpx>', 'latitude takes decimal degrees; found "1,5"'],
    ['<gpx><rte><rtept lat="91" lon="2"/></rte></gpx>', "latitude is in -90..90; found 91"],
    ['<gpx><rte><rtept lat="1" lon="361"/></rte></gpx>', "longitude is in -180..180 or 0..360; found 361"],
    ['<gpx><rte><rtept lat="NaN" lon="2"/></rte></gpx>', 'latitude takes decimal degrees; found "NaN"'],
    ['<gpx><rte><rtept lat="1e999" lon="2"/></rte></gpx>', "latitude is in -90..90; found Infinity"],
    [
      '<!DOCTYPE gpx [<!ENTITY a "b">]>\n<gpx>&a;</gpx>',
      "a GPX file has no document type of its own; found one",
    ],
    ["\n\n<!doctype gpx>\n<gpx/>", "line 3: a GPX file has no document type"],
    [`<gpx>${"<rte/>".repeat(101)}</gpx>`, "a file holds at most 100 routes; found 101"],
  ])("refuses %.60s", (text, message) => {
    expect(() => importRoutes(text, "out.gpx")).toThrow(message);
  });

  it("names the line of a fault", () => {
    const text = gpx('<rte>\n<rtept lat="1" lon="2"/>\n<rtept lat="x" lon="2"/>\n</rte>');
    expect(() => importRoutes(text, "a.gpx")).toThrow(
      'a.gpx, line 5: latitude takes decimal degrees; found "x"',
    );
  });
});

describe("files that are too much", () => {
  it("are refused for more waypoints than a plan's route should have, and told how many", () => {
    const points = Array.from({ length: 2001 }, (_, n) => `<trkpt lat="${n / 100}" lon="1"/>`).join("");
    expect(() => importRoutes(gpx(`<trk><trkseg>${points}</trkseg></trk>`), "out.gpx")).toThrow(
      'the track "out" has at most 2000 waypoints as a route; found 2001: thin it out first',
    );
    const rows = Array.from({ length: 2001 }, (_, n) => `${n / 100},1`).join("\n");
    expect(() => importRoutes(`lat,lon\n${rows}\n`, "x.csv")).toThrow("found 2001");
  });

  it("are refused for their size before anything is read", () => {
    const text = `<gpx>${" ".repeat(16_000_000)}</gpx>`;
    expect(() => importRoutes(text, "out.gpx")).toThrow("a file of routes is at most 16 MB; found 16 MB");
  });
});

describe("GeoJSON", () => {
  const line = {
    type: "LineString",
    coordinates: [
      [2, 1],
      [4, 3, 100],
    ],
  };

  it("makes a route of each line, and of points where there are no lines", () => {
    expect(
      importRoutes(
        geojson(feature(line, { name: "Out" }), feature({ type: "Point", coordinates: [0, 0] })),
        "a.geojson",
      ),
    ).toEqual({
      routes: [
        {
          name: "Out",
          waypoints: [
            { lat: 1, lon: 2 },
            { lat: 3, lon: 4 },
          ],
        },
      ],
      notes: ["left out of it: 1 beside the lines (Point)"],
    });
    const points = [
      feature({ type: "Point", coordinates: [2, 1] }, { name: "Quay" }),
      feature({
        type: "MultiPoint",
        coordinates: [
          [4, 3],
          [6, 5],
        ],
      }),
      feature(null),
    ];
    expect(routesIn(geojson(...points), "marks.geojson")).toEqual([
      {
        name: "marks",
        waypoints: [
          { name: "Quay", lat: 1, lon: 2 },
          { lat: 3, lon: 4 },
          { lat: 5, lon: 6 },
        ],
      },
    ]);
  });

  it("joins a line that was cut at the antimeridian, where the cut is no waypoint", () => {
    const cut = {
      type: "MultiLineString",
      coordinates: [
        [
          [170, 10],
          [180, 15],
        ],
        [
          [-180, 15],
          [-170, 20],
        ],
      ],
    };
    expect(routesIn(JSON.stringify(cut))[0]?.waypoints).toEqual([
      { lat: 10, lon: 170 },
      { lat: 20, lon: -170 },
    ]);
  });

  it("joins parts that go on where the one before ended, and makes routes of parts that do not", () => {
    const parts = {
      type: "MultiLineString",
      coordinates: [
        [
          [0, 0],
          [1, 1],
        ],
        [
          [1, 1],
          [2, 2],
        ],
        [
          [5, 5],
          [6, 6],
        ],
      ],
    };
    const routes = routesIn(geojson(feature(parts, { name: "P" })));
    expect(routes.map(({ name, waypoints }) => [name, waypoints.length])).toEqual([
      ["P 1", 3],
      ["P 2", 2],
    ]);
  });

  it.each([tender, drone, ocean])("gives back the routes that writeGeoJson wrote (%#)", (input) => {
    const routes = routesIn(writeGeoJson(input));
    expect(routes.map(({ name }) => name)).toEqual(input.routes.map(({ name }) => name));
    routes.forEach(({ waypoints }, at) => {
      const wanted = input.routes[at]?.waypoints ?? [];
      expect(waypoints.map(({ name, path, stay }) => [name, path ?? "geodesic", stay])).toEqual(
        wanted.map(({ name, path, stay_s }, n) => [
          name,
          n === 0 ? "geodesic" : path,
          stay_s > 0 ? `${stay_s} s` : undefined,
        ]),
      );
      // Coordinates are written with seven places of a degree.
      waypoints.forEach(({ lat, lon }, n) => {
        expect(Number(lat)).toBeCloseTo(wanted[n]?.lat ?? Number.NaN, 6);
        expect(Math.abs(Number(lon) - (wanted[n]?.lon ?? Number.NaN)) % 360).toBeCloseTo(0, 6);
      });
    });
  });

  it.each([
    ["{", "line 1"],
    ["[]", "GeoJSON is an object"],
    ["{}", "type takes a type of GeoJSON"],
    ['{"type":"Topology"}', 'type takes a type of GeoJSON; found "Topology"'],
    ['{"type":"FeatureCollection"}', "features takes a list"],
    ['{"type":"FeatureCollection","features":{}}', "features takes a list"],
    ['{"type":"FeatureCollection","features":[]}', "at least one route; found none"],
    ['{"type":"FeatureCollection","features":[7]}', "out, features[0]: GeoJSON is an object; found 7"],
    ['{"type":"Feature","geometry":null}', "at least one route; found none"],
    ['{"type":"Feature","geometry":{}}', "out: geometry.type takes a type of GeoJSON"],
    ['{"type":"Polygon","coordinates":[]}', "at least one route; found none"],
    ['{"type":"LineString"}', "coordinates take a list"],
    ['{"type":"LineString","coordinates":[]}', "at least 2 different places; found 0"],
    ['{"type":"LineString","coordinates":[[1,2],[1,2]]}', "at least 2 different places; found 1"],
    ['{"type":"LineString","coordinates":[1,2]}', "out, coordinates[0]: coordinates take a list; found 1"],
    ['{"type":"LineString","coordinates":[[1],[2]]}', "a position is a longitude and a latitude in degrees"],
    ['{"type":"LineString","coordinates":[["1","2"],[2,3]]}', "a position is a longitude and a latitude"],
    [
      '{"type":"LineString","coordinates":[[1,91],[2,3]]}',
      "out, coordinates[0]: latitude is in -90..90; found 91",
    ],
    ['{"type":"LineString","coordinates":[[500,1],[2,3]]}', "longitude is in"],
    ['{"type":"LineString","coordinates":[[null,null],[2,3]]}', "a position is"],
    ['{"type":"MultiLineString","coordinates":[[1,2]]}', "out, coordinates[0][0]: coordinates take a list"],
    ['{"type":"LineString","type":"Point"}', "line 1"],
    [
      `${'{"type":"GeometryCollection","geometries":['.repeat(30)}${"]}".repeat(30)}`,
      "nested at most 20 deep",
    ],
  ])("refuses %.60s", (text, message) => {
    expect(() => importRoutes(text, "out")).toThrow(message);
  });
});

describe("a table of waypoints", () => {
  it("keeps positions and figures as they were written, in every notation", () => {
    const text =
      "# harbour list\nName;Latitude;Longitude;Speed [kn];Stay;Height [m];Path;Light\nQuay;50°21.5'N;4 09.05 W;;;;;red\nHead;50.25;-4.5;8;5 min;60;rhumb;\n";
    expect(importRoutes(text, "list.csv")).toEqual({
      routes: [
        {
          name: "list",
          waypoints: [
            { name: "Quay", lat: "50°21.5'N", lon: "4 09.05 W" },
            {
              name: "Head",
              lat: 50.25,
              lon: -4.5,
              path: "rhumb",
              speed: "8 kn",
              height: "60 m",
              stay: "5 min",
            },
          ],
        },
      ],
      notes: ['columns not used: "Light"'],
    });
  });

  it("tells routes apart by a column, and reads quotes, tabs, blank rows and any line end", () => {
    const text = 'route\tname\tlat\tlon\r\nA\t"Qu""ay\t1"\t1\t2\r\nB\t\t3\t4\r\n\r\nA\t\t5\t6\r\nB\t\t7\t8';
    expect(routesIn(text, "x.tsv")).toEqual([
      {
        name: "A",
        waypoints: [
          { name: 'Qu"ay 1', lat: 1, lon: 2 },
          { lat: 5, lon: 6 },
        ],
      },
      {
        name: "B",
        waypoints: [
          { lat: 3, lon: 4 },
          { lat: 7, lon: 8 },
        ],
      },
    ]);
  });

  it("keeps a place given twice where there is a stay", () => {
    expect(routesIn("lat,lon,stay\n1,2,\n3,4,\n3,4,5 min\n", "x.csv")[0]?.waypoints).toHaveLength(3);
  });

  it.each([
    ["\n\n", "a table begins with a header; found none"],
    ["lat,lon\n", "a file of routes holds at least one route; found none"],
    ["lat,lon\n1,2\n", 'the route "x" has at least 2 different places; found 1'],
    ["name,lon\nA,2\n", 'x.csv, line 1: a table of waypoints has a column "lat"; found "name", "lon"'],
    ["lat,name\n2,A\n", 'a table of waypoints has a column "lon"'],
    ["lat,lon\n1,2\n,3\n", "x.csv, line 3: latitude takes degrees"],
    ["lat,lon\n1,2\n3\n", "x.csv, line 3: longitude takes degrees"],
    ["lat,lon\n1,2\nx,3\n", 'x.csv, line 3: latitude takes degrees, as 50.358 or "50°21.5\'N"; found "x"'],
    ["lat;lon\n1,5;2\n3;4\n", "latitude takes a point as its decimal sign"],
    ["lat,lon\n91,2\n3,4\n", "latitude is in -90..90"],
    ["lat,lon\n50 21.5,2\n3,4\n", "latitude takes a hemisphere"],
    ["lat,lon\n4 E,2\n3,4\n", "latitude takes the hemisphere N or S"],
    ["lat,lon,speed\n1,2,\n3,4,12\n", "x.csv, line 3: speed"],
    ["lat,lon,speed\n1,2,\n3,4,12 parsecs\n", "x.csv, line 3: speed"],
    ["lat,lon,speed [parsecs]\n1,2,\n3,4,12\n", "x.csv, line 3: speed"],
    ["lat,lon,stay\n1,2,\n3,4,5 kn\n", "x.csv, line 3: stay"],
    ["lat,lon,height\n1,2,\n3,4,high\n", "x.csv, line 3: height"],
    ["lat,lon,path\n1,2,\n3,4,straight\n", 'path takes "geodesic" or "rhumb"; found "straight"'],
    ['lat,lon,name\n1,2,"open\n3,4,b\n', "a quoted cell ends with a quote"],
  ])("refuses %.60s", (text, message) => {
    expect(() => importRoutes(text, "x.csv")).toThrow(message);
  });
});
