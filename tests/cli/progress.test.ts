import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { startProgress } from "../../src/cli/progress.ts";

let folder: string;
let file: string;
let written: string[];
let now: number;
const wasTerminal = process.stderr.isTTY;

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), "legwork-progress-"));
  file = join(folder, "wind.csv");
  writeFileSync(file, "x".repeat(1000));
  written = [];
  now = 0;
  vi.spyOn(process.stderr, "write").mockImplementation((text) => {
    written.push(String(text));
    return true;
  });
  vi.spyOn(performance, "now").mockImplementation(() => now);
});

afterEach(() => {
  vi.restoreAllMocks();
  process.stderr.isTTY = wasTerminal;
  rmSync(folder, { recursive: true, force: true });
});

/** Reads the file in four pieces, so many ms each, and says what was written meanwhile. */
function readIn(step: number): string[] {
  const progress = startProgress("wind.csv", file);
  for (let piece = 0; piece < 4; piece += 1) {
    now += step;
    progress.add(250);
  }
  progress.end();
  return written;
}

describe("progress", () => {
  it("is shown on a terminal for a file that takes over a second, and taken back", () => {
    process.stderr.isTTY = true;
    expect(readIn(500)).toEqual([
      "\r\u001b[Kreading wind.csv: 50 %",
      "\r\u001b[Kreading wind.csv: 75 %",
      "\r\u001b[Kreading wind.csv: 100 %",
      "\r\u001b[K",
    ]);
  });
  it("is not shown for a quick file", () => {
    process.stderr.isTTY = true;
    expect(readIn(200)).toEqual([]);
  });
  it("is not shown where standard error is no terminal", () => {
    process.stderr.isTTY = false;
    expect(readIn(5000)).toEqual([]);
  });
});
