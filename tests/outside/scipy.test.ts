import { expect, test } from "vitest";
import { pythonWith, runPython } from "./scipy.ts";

test("Python without a module fails with one sentence that names the Debian package", () => {
  const modules = [
    ["json", "python3"],
    ["no_such_module", "python3-scipy"],
  ] as const;
  expect(() => pythonWith(modules)).toThrow(
    "no python3 has what this check needs: install Debian's python3-scipy.",
  );
});

test("a Python program that fails says so with its own message", () => {
  expect(() => runPython("legs_by_scipy.py", [{}])).toThrow(
    /legs_by_scipy\.py ended with status 1[\s\S]*KeyError/,
  );
});
