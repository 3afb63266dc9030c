import { gzipSync } from "node:zlib";
import fc from "fast-check";
import { strToU8, zipSync } from "fflate";
import { describe, expect, test } from "vitest";
import { fileKind } from "../../src/field/file-kind.ts";
import { messageOf } from "./read-text.ts";

const CSV = "lat,lon,u,v\n50,-5,3,4\n50,-4,5,6\n";

const bytesOf = (...parts: readonly (string | readonly number[])[]): Uint8Array =>
  Uint8Array.from(
    parts.flatMap((part) => (typeof part === "string" ? [...part].map((c) => c.charCodeAt(0)) : part)),
  );

describe("a file of another kind is named, with what to do about it", () => {
  test.each<readonly [kind: string, bytes: Uint8Array]>([
    ["a gzip file", gzipSync(CSV)],
    ["a ZIP archive", zipSync({ "wind.csv": strToU8(CSV) })],
    ["a ZIP archive", zipSync({})],
    ["a spreadsheet or another office document", zipSync({ "[Content_Types].xml": strToU8("<Types/>") })],
    [
      "a spreadsheet or another office document",
      zipSync({ mimetype: [strToU8("application/vnd.oasis.opendocument.spreadsheet"), { level: 0 }] }),
    ],
  ])("%s, as a program writes it", async (kind, bytes) => {
    expect(fileKind(bytes)?.name).toBe(kind);
    expect(await messageOf(bytes)).toMatch(
      new RegExp(`^winds\\.csv: a field is a CSV file; found what looks like ${kind}: [^.;]+`),
    );
  });

  // First bytes by the formats' specifications, which src/field/file-kind.ts names.
  test.each<readonly [kind: string, bytes: Uint8Array]>([
    ["GRIB", bytesOf("GRIB", [0, 0, 0, 2, 0, 0, 0, 0, 0, 1, 0, 0])],
    ["GRIB", bytesOf("GRIB", [0, 1, 44, 1], "7777")],
    ["GRIB", bytesOf([1], "\r\r\n123\r\r\nYUTA50 KWBC 040600\r\r\n", "GRIB", [0, 1, 44, 1])],
    ["BUFR", bytesOf("BUFR", [0, 1, 44, 4])],
    ["NetCDF", bytesOf("CDF", [5, 0, 0, 0])],
    ["NetCDF-4 or HDF5", bytesOf([0x89], "HDF\r\n", [0x1a], "\n", [2, 8, 8])],
    ["NetCDF-4 or HDF5", bytesOf(new Array(512).fill(32), [0x89], "HDF\r\n", [0x1a], "\n")],
    ["HDF4", bytesOf([0x0e, 0x03, 0x13, 0x01])],
    ["Parquet", bytesOf("PAR1", [0x15, 0x04])],
    ["a Zstandard file", bytesOf([0x28, 0xb5, 0x2f, 0xfd, 0x24])],
    ["a 7z archive", bytesOf("7z", [0xbc, 0xaf, 0x27, 0x1c])],
    ["a spreadsheet or another office document", bytesOf([0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1, 0x1a, 0xe1])],
    ["a PNG picture", bytesOf([0x89], "PNG\r\n", [0x1a], "\n")],
    ["a JPEG picture", bytesOf([0xff, 0xd8, 0xff, 0xe0])],
    ["a TIFF picture", bytesOf("II", [42, 0])],
    ["a TIFF picture", bytesOf("MM", [0, 42])],
    ["a PDF document", bytesOf("%PDF-1.7\n")],
    ["a web page", bytesOf("\n<!DOCTYPE html>\n<html><head>")],
    ["a web page", bytesOf([0xef, 0xbb, 0xbf], '<html lang="en">')],
    ["text in UTF-16", bytesOf([0xfe, 0xff, 0, 108])],
  ])("%s, by its first bytes", (kind, bytes) => {
    expect(fileKind(bytes)?.name).toBe(kind);
  });

  test("whatever the pieces in which it comes, and without a line end in sight", async () => {
    const bytes = new Uint8Array(200_000).fill(1);
    bytes.set(bytesOf("GRIB", [0, 3, 13, 2]));
    const sentence =
      "winds.csv: a field is a CSV file; found what looks like GRIB: export it as CSV, for example with xarray in Python (to_dataframe().to_csv())";
    expect(await messageOf(bytes)).toBe(sentence);
    expect(await messageOf(bytes, { pieceBytes: 3 })).toBe(sentence);
  });
});

describe("what may be text is left to the reader of tables", () => {
  test.each([
    ["nothing", ""],
    ["a CSV", CSV],
    ["a CSV with a byte order mark", `\u{feff}${CSV}`],
    ["a header that begins with the letters of a signature", "GRIB,lat,lon,u,v\n"],
    ["another", "PK,lat,lon,u,v\n"],
    ["another", "BZh9,lat,lon,u,v\n"],
    ["another", "CDF,lat,lon\n"],
    ["another", "PAR1,lat,lon\n"],
    ["another", "MM,lat,lon\n"],
    ["a note that speaks of such a file", "# from wind.GRIB2, HDF and a <html> page\nlat,lon,u,v\n"],
  ])("%s", (_, text) => {
    expect(fileKind(strToU8(text))).toBeNull();
  });

  test("any lines of printable text that a header may be", () => {
    const line = fc.string({ unit: fc.constantFrom(...'abcGRIBUFCDHPK17z,;"# _[]/-\t'), maxLength: 40 });
    fc.assert(
      fc.property(fc.array(line, { maxLength: 4 }), (lines) => {
        expect(fileKind(strToU8(lines.join("\n")))).toBeNull();
      }),
      { numRuns: 2000, endOnFailure: true },
    );
  });
});
