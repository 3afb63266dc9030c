import { statSync } from "node:fs";

/** Nothing is said of a file that is read within this time, ms. */
const PATIENCE = 1000;
/** Least time between two lines, ms. */
const STEP = 200;

export interface Progress {
  add(bytes: number): void;
  end(): void;
}

const SILENT: Progress = { add: () => undefined, end: () => undefined };

function sizeOf(path: string): number {
  try {
    return statSync(path).size;
  } catch {
    return 0;
  }
}

/** Says on standard error how far a long file is read; on a terminal only, and takes its line back at the end. */
export function startProgress(name: string, path: string): Progress {
  if (!process.stderr.isTTY) return SILENT;
  const size = sizeOf(path);
  const shown = name.replace(/\p{Cc}/gu, "?").slice(-60);
  let read = 0;
  let last = performance.now() + PATIENCE - STEP;
  let written = false;
  return {
    add(bytes) {
      read += bytes;
      const now = performance.now();
      if (now - last < STEP) return;
      last = now;
      written = true;
      const amount = size > 0 ? `${Math.floor((100 * read) / size)} %` : `${Math.floor(read / 1e6)} MB`;
      process.stderr.write(`\r\u001b[Kreading ${shown}: ${amount}`);
    },
    end() {
      if (written) process.stderr.write("\r\u001b[K");
    },
  };
}
