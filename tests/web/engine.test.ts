import { readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { estimatePlan } from "../../src/index.ts";
import { writeCsv } from "../../src/report/csv.ts";
import { placeWaypoint } from "../../web/state/waypoint-edits.ts";
import type { Estimator } from "../../web/worker/estimator.ts";
import { previewField } from "../../web/worker/field-preview.ts";
import { answerLattice } from "../../web/worker/lattice.ts";
import type { ReportQuestion } from "../../web/worker/protocol.ts";
import { writeReport } from "../../web/worker/write-report.ts";
import { demoEngine } from "./demo-engine.ts";

async function* bytesOf(name: string): AsyncGenerator<Uint8Array> {
  yield readFileSync(new URL(`../../data/demo/${name}`, import.meta.url));
}

describe("the worker's estimate", () => {
  test("is that of the library, figure for figure, and its export the same text", async () => {
    const { plan, estimator } = demoEngine("islands");
    const answer = await estimator.estimate(plan);
    if (!answer.ok) throw new Error(answer.fault);
    const own = await estimatePlan(JSON.stringify(plan), { file: "islands.plan.json", open: bytesOf });
    expect(answer.estimate).toEqual(own.estimate);
    const { routes, craft, pace } = own.plan;
    const text = await reportOf(estimator, { format: "csv", units: "sea", route: null });
    expect(text).toBe(writeCsv({ estimate: own.estimate, routes, craft, pace }));
    expect(answer.landPending).toBe(true);
  });

  test("of a route edited and edited back is the same again", async () => {
    const { plan, estimator } = demoEngine("islands");
    const first = await estimator.estimate(plan);
    const moved = await estimator.estimate(placeWaypoint(plan, 0, 1, 53.47, -13.61));
    expect(moved).not.toEqual(first);
    expect(await estimator.estimate(plan)).toEqual(first);
  });

  test("of a plan read again has its prepared routes, so that nothing is drawn anew; another window's step alone leaves their legs", async () => {
    const { plan, reader } = demoEngine("islands-decide");
    const first = await reader.read(plan);
    const again = await reader.read({ ...plan, title: "Another" });
    expect(first.prepared.map(({ every_s }) => every_s)).toEqual(first.prepared.map(() => 3600));
    expect(again.prepared.every((route, n) => route === first.prepared[n])).toBe(true);
    const denser = await reader.read({ ...plan, window: { ...plan.window, every: "1 min" } } as typeof plan);
    expect(denser.prepared.map(({ every_s }) => every_s)).toEqual(denser.prepared.map(() => 60));
    expect(denser.prepared.every((route, n) => route.legs === first.prepared[n]?.legs)).toBe(true);
    const arriving = await reader.read({ ...plan, pace: { arrive: "2027-05-04T20:00Z" } });
    expect(arriving.prepared.map(({ every_s }) => every_s)).toEqual(first.prepared.map(() => null));
  });

  test("draws an ocean route as one line across the antimeridian, its figures on it", async () => {
    const { plan, estimator } = demoEngine("ocean");
    const answer = await estimator.estimate(plan);
    if (!answer.ok) throw new Error(answer.fault);
    for (const { lon, distance_m, waypoints, profile } of answer.drawings) {
      for (let at = 1; at < lon.length; at += 1) {
        expect(Math.abs((lon[at] ?? 0) - (lon[at - 1] ?? 0))).toBeLessThan(90);
        expect(distance_m[at]).toBeGreaterThan(distance_m[at - 1] ?? 0);
      }
      expect(Math.max(...lon)).toBeGreaterThan(180);
      expect(waypoints.at(-1)).toBe(lon.length - 1);
      const along = profile?.lon ?? new Float64Array();
      // Both lines run between the same ends; rounding of a longitude.
      expect(along[0]).toBeCloseTo(lon[0] ?? 0, 9);
      expect(along.at(-1)).toBeCloseTo(lon.at(-1) ?? 0, 6);
    }
  });

  test("says in a sentence what is wrong with a plan, and which file is missing", async () => {
    const { plan, estimator } = demoEngine("survey");
    const bad = await estimator.estimate({ ...plan, reserve: "8 minutes" });
    expect(bad).toEqual({
      ok: false,
      fault: expect.stringMatching(/^"Reserve" takes a number/),
      key: "reserve",
    });
    const missing = await estimator.estimate({ ...plan, fields: [{ role: "wind", file: "other.csv" }] });
    expect(missing).toEqual({
      ok: false,
      fault: 'the plan names "other.csv"; open that file too',
      key: null,
    });
    expect((await estimator.estimate(plan)).ok).toBe(true);
  });

  test("writes what is decided after the figures for drawing were handed over to the page", async () => {
    const { plan, estimator } = demoEngine("islands-decide");
    const answer = await estimator.estimate(plan);
    if (!answer.ok) throw new Error(answer.fault);
    const buffers = answer.drawings.flatMap(({ profile }) =>
      Object.values(profile ?? {}).map((column: Float64Array<ArrayBuffer>) => column.buffer),
    );
    structuredClone(answer, { transfer: [...new Set(buffers)] });
    const text = await reportOf(estimator, { format: "table", units: "sea", route: 1 });
    expect(text).toContain("The reserve holds with a probability of 91 %");
  });

  test("writes the chosen route alone", async () => {
    const { plan, estimator } = demoEngine("islands");
    expect(await estimator.answered()).toBeNull();
    await estimator.estimate(plan);
    const text = await reportOf(estimator, { format: "table", units: "metric", route: 1 });
    expect(text).toContain(plan.routes[1]?.name ?? "?");
    expect(text).not.toContain(`== ${plan.routes[0]?.name}`);
  });
});

describe("the worker's fields", () => {
  test("tell their progress, and what they hold", async () => {
    const { plan, fields } = demoEngine("islands");
    const shares: number[] = [];
    const [field] = plan.fields ?? [];
    if (!field) throw new Error("the demo has no field");
    const answer = await fields.open(1, field, ({ readBytes, totalBytes }) =>
      shares.push(readBytes / totalBytes),
    );
    expect(answer).toMatchObject({ ok: true, inspection: { role: "current", file: "islands-current.csv" } });
    expect(shares.at(-1)).toBe(1);
  });

  test("can be cancelled while they are read, and read again", async () => {
    const { plan, fields } = demoEngine("islands");
    const [field] = plan.fields ?? [];
    if (!field) throw new Error("the demo has no field");
    const cancelled = await fields.open(7, field, () => fields.cancel(7));
    expect(cancelled).toEqual({ ok: false, cancelled: true, fault: "islands-current.csv was not read" });
    expect((await fields.open(8, field, () => undefined)).ok).toBe(true);
  });

  test("are sampled on a lattice of round positions, where they have a value", async () => {
    const { plan, estimator, fields } = demoEngine("islands");
    await estimator.estimate(plan);
    const question = {
      role: "current" as const,
      instant: Date.parse(plan.departure),
      height_m: null,
      south: 53.4,
      north: 53.7,
      west: -13.8,
      east: -13.4,
      stepLat: 0.05,
      stepLon: 0.05,
      phase: 0.5,
    };
    const lattice = answerLattice(fields.current(), question);
    expect(lattice.lat.length).toBeGreaterThan(10);
    for (const lat of lattice.lat) expect(Math.abs(((lat / 0.05) % 1) - 0.5)).toBeLessThan(1e-6);
    expect([...lattice.east_m_s, ...lattice.north_m_s].every(Number.isFinite)).toBe(true);
    const elsewhere = answerLattice(fields.current(), { ...question, south: 0, north: 1 });
    expect(elsewhere.lat.length).toBe(0);
    // The same place a turn further east is the same place.
    const turned = answerLattice(fields.current(), { ...question, west: 346.2, east: 346.6 });
    expect(turned.east_m_s.length).toBe(lattice.east_m_s.length);
  });

  test("show their first rows, and whether a mapping would do", async () => {
    const content = new Blob(["# a note\nzeit,breite,laenge,u,v\n", ...rows()]);
    const unmapped = await previewField(content, { role: "wind", file: "a.csv" });
    expect(unmapped.header).toEqual(["zeit", "breite", "laenge", "u", "v"]);
    expect(unmapped.rows[0]).toEqual(["2027-05-04T06:00Z", "50", "0", "1", "2"]);
    expect(unmapped.fault).toContain("a.csv");
    const mapped = await previewField(content, {
      role: "wind",
      file: "a.csv",
      columns: { time: "zeit", lat: "breite", lon: "laenge" },
    });
    expect(mapped.fault).toBeNull();
    expect(mapped.isOtherKind).toBe(false);
    expect(mapped.used).toEqual(["zeit", "breite", "laenge", "u", "v"]);
  });

  test("of another kind show no rows, but say what they look like", async () => {
    const content = new Blob(["GRIB", Uint8Array.of(0, 0, 0, 2)]);
    const found = await previewField(content, { role: "wind", file: "a.csv" });
    expect([found.header, found.rows, found.isOtherKind]).toEqual([[], [], true]);
    expect(found.fault).toMatch(/^a\.csv: a field is a CSV file; found what looks like GRIB: [^.;]/);
  });
});

async function reportOf(estimator: Estimator, question: ReportQuestion): Promise<string> {
  const input = await estimator.answered();
  if (input === null) throw new Error("nothing was estimated");
  return writeReport(input, question);
}

function rows(): string[] {
  return [50, 51].flatMap((lat) => [0, 1].map((lon) => `2027-05-04T06:00Z,${lat},${lon},1,2\n`));
}
