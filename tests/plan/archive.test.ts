import fc from "fast-check";
import { strToU8, zipSync } from "fflate";
import { describe, expect, it } from "vitest";
import { readArchive, writeArchive } from "../../src/plan/archive.ts";
import { statedSums } from "../../src/plan/archive-sums.ts";
import { crc32 } from "../../src/plan/crc32.ts";
import type { PlanDocument } from "../../src/plan/plan-schema.ts";
import { serializePlan } from "../../src/plan/write-plan.ts";
import { SUPPLY_RUN } from "./documents.ts";

const PLAN = SUPPLY_RUN as PlanDocument;
const named = (craft: string, ...fields: string[]): PlanDocument => ({
  ...PLAN,
  craft: { file: craft },
  fields: fields.map((file) => ({ role: "wind", file })),
});
const bytesOf = (name: string) => strToU8(`bytes of ${name}`);
const read = (entries: Record<string, string>) =>
  readArchive(
    zipSync(Object.fromEntries(Object.entries(entries).map(([name, text]) => [name, strToU8(text)]))),
    "a.zip",
  );

describe("an archive", () => {
  it("gives back the plan and the files that were put into it", () => {
    const plan = named("boat.craft.json", "wind.csv", "far/current.csv");
    const { plan: found, files } = readArchive(writeArchive(plan, "supply-run", bytesOf), "a.zip");
    expect(found).toEqual({ name: "supply-run.plan.json", text: serializePlan(plan) });
    expect([...files.keys()].sort()).toEqual(["boat.craft.json", "far/current.csv", "wind.csv"]);
    for (const [name, content] of files) expect(content).toEqual(bytesOf(name));
  });

  it("has the same bytes whenever it is written", () => {
    const plan = named("boat.craft.json", "wind.csv");
    expect(writeArchive(plan, "run", bytesOf)).toEqual(writeArchive(plan, "run", bytesOf));
  });

  it("takes in files from outside the plan's folder under names of its own, in the plan too", () => {
    const plan = named("../boat.craft.json", "../a/wind.csv", "wind.csv", "b\\..\\..\\wind.csv");
    const { plan: found, files } = readArchive(writeArchive(plan, "run", bytesOf), "a.zip");
    expect([...files.keys()].sort()).toEqual(["2-wind.csv", "3-wind.csv", "boat.craft.json", "wind.csv"]);
    const { craft, fields } = JSON.parse(found.text) as PlanDocument;
    expect(craft).toEqual({ file: "boat.craft.json" });
    expect(fields?.map(({ file }) => file)).toEqual(["wind.csv", "2-wind.csv", "3-wind.csv"]);
    expect(files.get("3-wind.csv")).toEqual(bytesOf("b\\..\\..\\wind.csv"));
  });

  it.each<[string, Record<string, string>, string]>([
    ["no plan", { "a.csv": "" }, "a.zip: an archive holds one plan (.plan.json); found 0"],
    ["two plans", { "a.plan.json": "", "b.plan.json": "" }, "found 2"],
    ["a name that climbs", { "a.plan.json": "", "../b.csv": "" }, 'stays inside it; found "../b.csv"'],
    ["a name that climbs inside", { "a.plan.json": "", "x/../../b": "" }, "stays inside it"],
    ["an absolute name", { "a.plan.json": "", "/etc/b": "" }, "stays inside it"],
    ["a drive", { "a.plan.json": "", "C:b": "" }, "stays inside it"],
    ["a backslash", { "a.plan.json": "", "x\\b": "" }, "stays inside it"],
    ["a control character", { "a.plan.json": "", "x\u0000b": "" }, "stays inside it"],
    ["a long name", { "a.plan.json": "", ["x".repeat(201)]: "" }, "stays inside it"],
    [
      "many files",
      Object.fromEntries(Array.from({ length: 201 }, (_, n) => [`${n}.csv`, ""])),
      "an archive holds at most 200 files; found more",
    ],
  ])("is refused with %s", (_, entries, message) => {
    expect(() => read(entries)).toThrow(message);
  });

  it("is refused where its entries claim more than it may hold, before they are unpacked", () => {
    const bytes = zipSync({ "a.plan.json": strToU8("{}"), "b.csv": strToU8("x".repeat(1000)) });
    const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
    // The uncompressed size in each central header, at 24 bytes after its signature (APPNOTE 4.3.12).
    for (let at = 0; at + 28 < bytes.length; at += 1)
      if (view.getUint32(at, true) === 0x02014b50) view.setUint32(at + 24, 0xfffffff0, true);
    expect(() => readArchive(bytes, "a.zip")).toThrow(
      "an archive holds at most 1000 MB unpacked; found more",
    );
  });

  it("is refused where it is no whole ZIP file", () => {
    const whole = writeArchive(named("boat.craft.json"), "run", bytesOf);
    for (const bytes of [
      new Uint8Array(),
      strToU8("PK"),
      strToU8("x".repeat(500)),
      whole.slice(0, -30),
      whole.slice(20),
    ])
      expect(() => readArchive(bytes, "a.zip")).toThrow(/^a\.zip: (an archive|a file in an archive) /);
  });

  it("is refused where its plan is not UTF-8", () => {
    const bytes = zipSync({ "a.plan.json": new Uint8Array([0xff, 0xfe, 0x80]) });
    expect(() => readArchive(bytes, "a.zip")).toThrow(
      "a.plan.json: the text is UTF-8; found bytes that are not",
    );
  });
});

/** The bytes of `wind.csv`, or the sentence with which the archive is refused. */
function readOrMessage(bytes: Uint8Array): Uint8Array | string {
  try {
    return readArchive(bytes, "a.zip").files.get("wind.csv") ?? "no file";
  } catch (fault) {
    if (fault instanceof Error && fault.name === "InputError") return fault.message;
    throw fault;
  }
}

describe("the sums of an archive", () => {
  // The check value of CRC-32/ISO-HDLC and further sums of zlib, by Python's zlib.crc32.
  it.each([
    ["123456789", 0xcbf43926],
    ["", 0],
    ["a", 0xe8b7be43],
    ["lat,lon,u,v\n50,-5,3,4\n", 0x3815e2f2],
  ])("of %j is the one of ISO 3309", (text, sum) => {
    expect(crc32(strToU8(text))).toBe(sum);
  });

  it("are those of its entries, in their order", () => {
    const bytes = zipSync({ "b.csv": strToU8("123456789"), "x/": new Uint8Array(), "a.csv": strToU8("a") });
    expect(statedSums(bytes)).toEqual([0xcbf43926, 0, 0xe8b7be43]);
  });

  it("tell a damaged file by its name, stored or packed, wherever it is damaged", () => {
    const content = strToU8(Array.from({ length: 400 }, (_, n) => `${n % 7},${(n * 37) % 101}`).join("\n"));
    for (const level of [0, 6] as const) {
      const bytes = zipSync({ "a.plan.json": strToU8("{}"), "wind.csv": [content, { level }] });
      const view = new DataView(bytes.buffer, bytes.byteOffset);
      const first = 30 + view.getUint16(26, true) + view.getUint32(18, true);
      const data = first + 30 + view.getUint16(first + 26, true);
      const size = view.getUint32(first + 18, true);
      fc.assert(
        fc.property(fc.nat(size - 1), fc.integer({ min: 1, max: 255 }), (at, flip) => {
          const damaged = bytes.slice();
          damaged[data + at] = (damaged[data + at] as number) ^ flip;
          const outcome = readOrMessage(damaged);
          // A packed file may be packed another way with the same content: that is no damage.
          if (level === 6 && typeof outcome !== "string") expect(outcome).toEqual(content);
          else
            expect(outcome).toMatch(
              /^a\.zip: (a file in an archive has the CRC-32 that the archive states; found "wind\.csv" damaged|an archive is a whole ZIP file)/,
            );
        }),
        { numRuns: 300, endOnFailure: true },
      );
    }
  });

  it("that are themselves damaged tell so too", () => {
    const bytes = zipSync({ "a.plan.json": strToU8("{}") });
    const at = bytes.length - 22 - 46 - "a.plan.json".length + 16;
    bytes[at] = (bytes[at] as number) ^ 1;
    expect(() => readArchive(bytes, "a.zip")).toThrow('found "a.plan.json" damaged');
  });
});
