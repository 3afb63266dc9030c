import { spawnSync } from "node:child_process";
import { expect, test } from "vitest";
import { fileKind } from "../../src/field/file-kind.ts";
import { pythonWith } from "./scipy.ts";

/** Bytes that Python's own library, NumPy and SciPy write: an expression of each. */
const WRITTEN: readonly (readonly [kind: string, expression: string])[] = [
  ["a gzip file", 'gzip.compress(b"lat,lon")'],
  ["an xz file", 'lzma.compress(b"lat,lon")'],
  ["a bzip2 file", 'bz2.compress(b"lat,lon")'],
  ["a bzip2 file", 'bz2.compress(b"")'],
  ["a tar archive", "tar()"],
  ["a ZIP archive", "archive()"],
  ["a NumPy file", "filled(lambda out: numpy.save(out, numpy.eye(2)))"],
  ["a MATLAB file", 'filled(lambda out: scipy.io.savemat(out, {"u": [1.0]}))'],
  ["NetCDF", "netcdf(1)"],
  ["NetCDF", "netcdf(2)"],
  ["a SQLite database", "database()"],
];

const PROGRAM = `
import base64, bz2, gzip, io, json, lzma, sqlite3, sys, tarfile, zipfile
import numpy, scipy.io

def filled(write):
    out = io.BytesIO()
    write(out)
    return out.getvalue()

def tar():
    return filled(lambda out: tarfile.open(fileobj=out, mode="w").addfile(tarfile.TarInfo("wind.csv")))

def archive():
    return filled(lambda out: zipfile.ZipFile(out, "w").writestr("wind.csv", "lat,lon"))

def netcdf(version):
    out = io.BytesIO()
    grid = scipy.io.netcdf_file(out, "w", version=version)
    grid.createDimension("lat", 2)
    grid.flush()
    return out.getvalue()

def database():
    connection = sqlite3.connect(":memory:")
    connection.execute("create table wind (u)")
    connection.commit()
    return connection.serialize()

print(json.dumps([base64.b64encode(each()).decode() for each in [${WRITTEN.map(([, code]) => `lambda: ${code}`).join(", ")}]]))
`;

test("files are known by their first bytes as Python's library, NumPy and SciPy write them", () => {
  const python = pythonWith([["scipy.io", "python3-scipy"]]);
  const { stdout, stderr, status } = spawnSync(python, ["-c", PROGRAM], { encoding: "utf8" });
  expect(status, stderr).toBe(0);
  const kinds = (JSON.parse(stdout) as string[]).map((bytes) => fileKind(Buffer.from(bytes, "base64"))?.name);
  expect(kinds).toEqual(WRITTEN.map(([kind]) => kind));
});
