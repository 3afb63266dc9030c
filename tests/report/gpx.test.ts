import { spawnSync } from "node:child_process";
import { DOMParser } from "@xmldom/xmldom";
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { writeGpx } from "../../src/report/gpx.ts";
import { xmlDecimal, xmlText } from "../../src/report/xml-text.ts";
import { drone, ocean, oceanSketch, reportOf, tender, tenderSketch } from "./fixtures.ts";

const SCHEMA = new URL("gpx-from-memory.xsd", import.meta.url).pathname;

/** What the schema checker says of a file: empty where it is valid. */
function complaints(xml: string): string {
  const run = spawnSync("xmllint", ["--noout", "--nonet", "--schema", SCHEMA, "-"], {
    input: xml,
    encoding: "utf8",
  });
  if (run.error) throw run.error;
  return run.status === 0 ? "" : run.stderr;
}

function parsed(xml: string) {
  return new DOMParser().parseFromString(xml, "text/xml");
}

describe("GPX", () => {
  it("is valid for every fixture", () => {
    for (const input of [tender, drone, ocean]) expect(complaints(writeGpx(input))).toBe("");
  });

  it("would be refused by the schema for what it must not hold", () => {
    const good = writeGpx(tender);
    expect(complaints(good.replace(/lon="[^"]*"/, 'lon="180"'))).toMatch(/maxExclusive|longitudeType/);
    expect(complaints(good.replace("<name>Quay</name>", "<ele>high</ele>"))).toMatch(/decimal/);
    expect(complaints(good.replace("<number>1</number>", ""))).toBe("");
  });

  it("has one route each, every waypoint in order, with names and positions", () => {
    const document = parsed(writeGpx(tender));
    const routes = [...document.getElementsByTagName("rte")];
    expect(routes).toHaveLength(3);
    for (const [index, route] of routes.entries()) {
      const points = [...route.getElementsByTagName("rtept")];
      const waypoints = tender.routes[index]?.waypoints ?? [];
      expect(
        points.map((point) => [Number(point.getAttribute("lat")), Number(point.getAttribute("lon"))]),
      ).toEqual(waypoints.map(({ lat, lon }) => [lat, lon]));
      expect(points.map((point) => point.getElementsByTagName("name")[0]?.textContent)).toEqual(
        waypoints.map(({ name }) => name),
      );
    }
    expect(document.getElementsByTagName("metadata")[0]?.textContent).toContain("Not for navigation");
    expect(document.getElementsByTagName("time")).toHaveLength(0);
  });

  it("writes 180° as -180°, and longitudes beyond a turn within it", () => {
    const at = (lon: number) => {
      const [route] = oceanSketch.routes;
      if (route === undefined) throw new Error("the sketch has a route");
      const sketch = { ...oceanSketch, routes: [{ ...route, from: { ...route.from, lon } }] };
      return /lon="([^"]*)"/.exec(writeGpx(reportOf(sketch)))?.[1];
    };
    expect([180, -180, 179.9999999999, 180.5, 359.75, -0].map(at)).toEqual([
      "-180",
      "-180",
      "-180",
      "-179.5",
      "-0.25",
      "0",
    ]);
  });

  it("gives heights as elevation only where there are any, and says what they are above", () => {
    expect(writeGpx(drone)).toContain("<ele>60</ele>");
    expect(writeGpx(drone)).toContain("height above the surface");
    expect(writeGpx(tender)).not.toContain("<ele>");
  });

  it("stays valid whatever the names hold", () => {
    const name = fc.array(
      fc.oneof(
        fc.string({ unit: "binary", maxLength: 8 }),
        fc.constantFrom("]]>", "<!--", "&amp;", "\u0000", "\ud800", "\uffff", "<x y='"),
      ),
      { maxLength: 6 },
    );
    fc.assert(
      fc.property(name, (parts) => {
        const text = parts.join("");
        const input = reportOf({
          ...tenderSketch,
          title: text,
          routes: tenderSketch.routes.map((route) => ({
            ...route,
            name: text,
            from: { ...route.from, name: text },
          })),
        });
        expect(complaints(writeGpx(input))).toBe("");
      }),
      { numRuns: 40 },
    );
  });
});

describe("XML text", () => {
  it("escapes markup and replaces what XML cannot carry", () => {
    expect(xmlText("a<b & \"c\" 'd'>\u0001\ud800\u{1F6F6}")).toBe(
      "a&lt;b &amp; &quot;c&quot; &apos;d&apos;&gt;\uFFFD\uFFFD\u{1F6F6}",
    );
  });
  it("writes decimals without an exponent", () => {
    expect([1e-7, -1e-12, 58.1032, 100, 0.5].map((value) => xmlDecimal(value, 9))).toEqual([
      "0.0000001",
      "0",
      "58.1032",
      "100",
      "0.5",
    ]);
  });
});
