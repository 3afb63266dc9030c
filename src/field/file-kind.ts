/** What a file that is no CSV looks like, and what its owner can do about it. */
export interface FileKind {
  /** With its article where it has one, as `a ZIP archive`. */
  readonly name: string;
  readonly remedy: string;
}

/** Bytes at the beginning of a file that tell its kind. */
const HEAD_BYTES = 4096;

const EXPORT = "export it as CSV, for example with xarray in Python (to_dataframe().to_csv())";
const UNPACK = "unpack it first";
const TABLE = "save its table as CSV";
const VALUES = "a field is a table of values, not a picture of them";

type Test = (head: Uint8Array) => boolean;

/** Whether bytes stand somewhere: numbers, or the characters of a text in Latin-1. */
const at =
  (offset: number, ...signature: readonly (number | string)[]): Test =>
  (head) =>
    signature
      .flatMap((part) => (typeof part === "number" ? part : [...part].map((letter) => letter.charCodeAt(0))))
      .every((byte, index) => head[offset + index] === byte);

const any =
  (...tests: readonly Test[]): Test =>
  (head) =>
    tests.some((test) => test(head));

/** Text with nothing but blanks and one byte order mark before it, letters of either case. */
const text =
  (pattern: RegExp): Test =>
  (head) =>
    pattern.test(String.fromCharCode(...head.subarray(0, 256)).replace(/^ï»¿/, ""));

/** A bulletin of the WMO: its heading, a line or two, may stand before the message. The octet after the length says the edition. */
const bulletin =
  (word: string, ...editions: readonly number[]): Test =>
  (head) =>
    Array.from({ length: 64 }, (_, offset) => offset).some(
      (offset) => at(offset, word)(head) && editions.includes(head[offset + 7] ?? -1),
    );

/**
 * Kinds by their first bytes. GRIB and BUFR: WMO-No. 306, FM 92 and FM 94, section 0. NetCDF: NetCDF Classic Format Specification
 * (CDF-1, -2, -5). HDF5: File Format Specification 3.0, II.A, the superblock at 0, 512, 1024, 2048. gzip: RFC 1952, 2.3.1. Zstandard:
 * RFC 8878, 3.1.1. ZIP: APPNOTE 6.3.10, 4.3.7 and 4.3.16; an office document names its contents or its type first (ECMA-376 part 2; OpenDocument 1.3 part
 * 2, 3.3). PNG: ISO/IEC 15948, 5.2. TIFF 6.0, section 2. The others from memory.
 */
const KINDS: readonly (readonly [name: string, remedy: string, test: Test])[] = [
  ["GRIB", EXPORT, bulletin("GRIB", 1, 2)],
  ["BUFR", EXPORT, bulletin("BUFR", 2, 3, 4, 5)],
  ["NetCDF", EXPORT, any(at(0, "CDF", 1), at(0, "CDF", 2), at(0, "CDF", 5))],
  [
    "NetCDF-4 or HDF5",
    EXPORT,
    any(...[0, 512, 1024, 2048].map((offset) => at(offset, 0x89, "HDF\r\n", 0x1a, "\n"))),
  ],
  ["HDF4", EXPORT, at(0, 0x0e, 0x03, 0x13, 0x01)],
  ["a MATLAB file", EXPORT, at(0, "MATLAB 5.0 MAT-file")],
  ["a NumPy file", EXPORT, at(0, 0x93, "NUMPY")],
  ["Parquet", EXPORT, at(0, "PAR1", 0x15)],
  ["a SQLite database", EXPORT, at(0, "SQLite format 3", 0)],
  ["a gzip file", UNPACK, at(0, 0x1f, 0x8b, 8)],
  ["an xz file", UNPACK, at(0, 0xfd, "7zXZ", 0)],
  ["a Zstandard file", UNPACK, at(0, 0x28, 0xb5, 0x2f, 0xfd)],
  [
    "a bzip2 file",
    UNPACK,
    any(at(4, 0x31, 0x41, 0x59, 0x26, 0x53, 0x59), at(4, 0x17, 0x72, 0x45, 0x38, 0x50, 0x90)),
  ],
  ["a 7z archive", UNPACK, at(0, "7z", 0xbc, 0xaf, 0x27, 0x1c)],
  ["a tar archive", UNPACK, at(257, "ustar")],
  [
    "a spreadsheet or another office document",
    TABLE,
    any(
      at(0, 0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1, 0x1a, 0xe1),
      text(/^PK.{28}(?:\[Content_Types\]\.xml|_rels\/|docProps\/|xl\/|mimetypeapplication\/vnd\.oasis)/s),
    ),
  ],
  ["a ZIP archive", UNPACK, any(at(0, "PK", 3, 4), at(0, "PK", 5, 6))],
  ["a PNG picture", VALUES, at(0, 0x89, "PNG\r\n", 0x1a, "\n")],
  ["a JPEG picture", VALUES, at(0, 0xff, 0xd8, 0xff)],
  ["a TIFF picture", VALUES, any(at(0, "II", 42, 0), at(0, "MM", 0, 42))],
  ["a PDF document", TABLE, at(0, "%PDF-")],
  ["a web page", "fetch the file itself", text(/^\s*<(?:!doctype html|html)\b/i)],
  ["text in UTF-16", "save it as UTF-8", any(at(0, 0xff, 0xfe), at(0, 0xfe, 0xff))],
];

/**
 * The kind of a file that is no CSV, by its first bytes; `null` for what may be text.
 *
 * @param bytes those that the file begins with; 4 KiB tell all there is to tell
 */
export function fileKind(bytes: Uint8Array): FileKind | null {
  const head = bytes.subarray(0, HEAD_BYTES);
  const [name, remedy] = KINDS.find(([, , test]) => test(head)) ?? [];
  return name === undefined || remedy === undefined ? null : { name, remedy };
}
