import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { graticuleLabel, graticuleLines, graticuleStep } from "../../web/chart/graticule.ts";
import { continuousLongitudes, turnsToward } from "../../web/chart/longitude.ts";
import { drawnRoutes, handlesOf, legMiddles } from "../../web/chart/route-view.ts";
import { scaleBar } from "../../web/chart/scale-bar.ts";
import { nearestSample, placeAtDistance, placeAtTime, valueAtDistance } from "../../web/state/along-route.ts";

describe("the graticule", () => {
  test("takes the finest step whose lines stand far enough apart", () => {
    expect(graticuleStep(100, 96)).toBe(1);
    expect(graticuleStep(2.8, 96)).toBe(45);
    expect(graticuleStep(600, 96)).toBeCloseTo(10 / 60, 12);
    expect(graticuleStep(1e9, 96)).toBeCloseTo(0.01 / 60, 12);
    expect(graticuleStep(0.1, 96)).toBe(45);
  });

  test("labels lines in degrees, or in degrees and minutes where they stand closer", () => {
    expect(graticuleLabel(-30, 10, "lon")).toBe("30°W");
    expect(graticuleLabel(190, 10, "lon")).toBe("170°W");
    expect(graticuleLabel(-180, 10, "lon")).toBe("180°");
    expect(graticuleLabel(0, 10, "lat")).toBe("0°");
    expect(graticuleLabel(58.5, 0.5, "lat")).toBe("58°30′N");
    expect(graticuleLabel(-58.00333333333, 0.2 / 60, "lat")).toBe("58°00.2′S");
  });

  test("has every line within its range once, without drifting", () => {
    const lines = graticuleLines(-6.5, -5.5, 1 / 60);
    expect(lines).toHaveLength(61);
    expect(lines.at(-1)).toBeCloseTo(-5.5, 12);
    expect(graticuleLines(170, 190, 10)).toEqual([170, 180, 190]);
  });
});

describe("longitudes on the chart", () => {
  test("run on across the antimeridian", () => {
    expect(continuousLongitudes([170, -170, -160, 175])).toEqual([170, 190, 200, 175]);
    expect(continuousLongitudes([-179, 179])).toEqual([-179, -181]);
  });

  test("never step by more than half a turn, and stay the same meridians", () => {
    fc.assert(
      fc.property(fc.array(fc.double({ min: -180, max: 360, noNaN: true }), { maxLength: 12 }), (lons) => {
        const line = continuousLongitudes(lons);
        line.forEach((lon, at) => {
          const turns = (lon - (lons[at] ?? 0)) / 360;
          expect(Math.abs(turns - Math.round(turns))).toBeLessThan(1e-9);
          const before = line[at - 1];
          if (before !== undefined) expect(Math.abs(lon - before)).toBeLessThanOrEqual(180 + 1e-9);
        });
      }),
      { numRuns: 200 },
    );
  });

  test("are brought to the copy of the world in view", () => {
    expect(turnsToward(190, -170)).toBe(-360);
    expect(turnsToward(190, 170)).toBe(0);
    expect(turnsToward(10, 725)).toBe(720);
  });
});

describe("the scale bar", () => {
  test("is the longest round length that fits", () => {
    expect(scaleBar(185.2, 1852, 120)).toEqual({ px: 100, value: 10 });
    expect(scaleBar(1, 1000, 120).value).toBe(0.1);
    const { px } = scaleBar(33.3, 1852, 120);
    expect(px).toBeGreaterThan(120 / 2.5);
    expect(px).toBeLessThanOrEqual(120);
  });
});

const LINE = {
  lat: Float64Array.of(0, 0, 10),
  lon: Float64Array.of(0, 10, 10),
  distance_m: Float64Array.of(0, 1000, 3000),
  time_s: Float64Array.of(0, 100, 500),
};

describe("places along a drawn route", () => {
  test("lie straight between samples, and at the ends beyond them", () => {
    expect(placeAtDistance(LINE, 500)).toEqual({ lat: 0, lon: 5, distance_m: 500 });
    expect(placeAtDistance(LINE, 2000)).toEqual({ lat: 5, lon: 10, distance_m: 2000 });
    expect(placeAtDistance(LINE, -5)?.lon).toBe(0);
    expect(placeAtDistance(LINE, 9999)?.lat).toBe(10);
    expect(
      placeAtDistance(
        { lat: new Float64Array(), lon: new Float64Array(), distance_m: new Float64Array() },
        0,
      ),
    ).toBeNull();
  });

  test("at a time are none before the departure and after the arrival", () => {
    expect(placeAtTime(LINE, 300)).toEqual({ lat: 5, lon: 10, distance_m: 2000 });
    expect(placeAtTime(LINE, -1)).toBeNull();
    expect(placeAtTime(LINE, 501)).toBeNull();
    expect(placeAtTime(LINE, 500)?.distance_m).toBe(3000);
  });

  test("carry the figures of the profile", () => {
    expect(valueAtDistance(LINE.distance_m, LINE.time_s, 2000)).toBe(300);
  });

  test("are found nearest to the pointer, longitude shrinking with latitude", () => {
    expect(nearestSample(LINE, 1, 9)).toBe(1);
    expect(nearestSample(LINE, 9, 8)).toBe(2);
  });
});

describe("what the chart draws of a route", () => {
  const route = {
    name: "Across",
    waypoints: [
      { name: "West", lat: 0, lon: 170 },
      { lat: "10°30.0'N", lon: "170°00.0'W" },
    ],
  };

  test("are handles at the positions as written, continuous across the antimeridian", () => {
    expect(handlesOf(route)).toEqual([
      { name: "West", lat: 0, lon: 170 },
      { name: "", lat: 10.5, lon: 190 },
    ]);
    expect(handlesOf({ name: "bad", waypoints: [{ lat: "north", lon: 0 }] })).toBeNull();
    expect(handlesOf(undefined)).toEqual([]);
  });

  test("is a straight line while there is no estimate, and the track itself once there is", () => {
    const plan = { format: "legwork-plan/1" as const, departure: "", craft: {}, routes: [route] };
    const none = {
      estimate: null,
      routes: [],
      drawings: [],
      fault: null,
      faultKey: null,
      landPending: false,
      ensemble: false,
    };
    expect(drawnRoutes(plan, none, 0)[0]?.drawing.profile).toBeNull();
    expect([...(drawnRoutes(plan, none, 0)[0]?.drawing.lon ?? [])]).toEqual([170, 190]);
  });

  test("has the middle of a leg on the track where the track bends", () => {
    const handles = handlesOf(route) ?? [];
    expect(legMiddles(handles, null)).toEqual([{ before: 1, lat: 5.25, lon: 180 }]);
    const drawing = {
      lat: Float64Array.of(0, 6, 10.5),
      lon: Float64Array.of(170, 179, 190),
      distance_m: Float64Array.of(0, 1, 2),
      waypoints: Int32Array.of(0, 2),
      profile: null,
    };
    expect(legMiddles(handles, drawing)).toEqual([{ before: 1, lat: 6, lon: 179 }]);
    expect(legMiddles(handles, { ...drawing, waypoints: Int32Array.of(0, 1, 2) })[0]?.lat).toBe(5.25);
  });
});
