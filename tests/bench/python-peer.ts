import { type ChildProcess, spawn, spawnSync } from "node:child_process";
import { writeFileSync } from "node:fs";
import { join } from "node:path";
import { createInterface } from "node:readline";
import type { PreparedRoute } from "../../src/estimate/prepare.ts";

const PYTHONS = ["python3", "/usr/bin/python3"];
/** Places of a leg handed to the peer, for its cubic splines: nearer than this, m. */
const SPACING_M = 5000;

/** What the peer answers: seconds of work, and the figure or figures that came out. */
export interface PeerAnswer {
  readonly seconds: number;
  readonly figures: readonly number[];
}

/** The Python side, kept running so that it takes turns with us; asked one thing at a time. */
export class PythonPeer {
  readonly #child: ChildProcess;
  readonly #lines: AsyncIterator<string>;

  constructor(python: string, script: string, setUp: string) {
    this.#child = spawn(python, [script, setUp], { stdio: ["pipe", "pipe", "inherit"] });
    const output = this.#child.stdout as NonNullable<ChildProcess["stdout"]>;
    this.#lines = createInterface({ input: output })[Symbol.asyncIterator]();
  }

  async ask(what: string, more: object = {}): Promise<PeerAnswer> {
    this.#child.stdin?.write(`${JSON.stringify({ what, ...more })}\n`);
    const { value, done } = await this.#lines.next();
    if (done === true) throw new Error(`the Python peer ended while asked for ${what}`);
    return JSON.parse(value) as PeerAnswer;
  }

  close(): void {
    this.#child.stdin?.end();
  }
}

/** Starts the peer on the job's routes; `null` where there is no Python with SciPy. */
export function startPeer(
  here: string,
  folder: string,
  prepared: readonly PreparedRoute[],
): PythonPeer | null {
  const python = PYTHONS.find((name) => spawnSync(name, ["-c", "import scipy"]).status === 0);
  if (python === undefined) return null;
  const setUp = join(folder, "routes.json");
  writeFileSync(setUp, JSON.stringify(prepared.map(routeTable)));
  return new PythonPeer(python, join(here, "peer.py"), setUp);
}

function routeTable({ legs }: PreparedRoute): object {
  return legs.map(({ track }) => {
    const count = Math.ceil(track.length / SPACING_M);
    const s = Array.from({ length: count + 1 }, (_, n) => (track.length * n) / count);
    const points = s.map((at) => track.at(at));
    return {
      s,
      lon: points.map(({ lon }) => lon),
      lat: points.map(({ lat }) => lat),
      sin: points.map(({ course }) => Math.sin((course * Math.PI) / 180)),
      cos: points.map(({ course }) => Math.cos((course * Math.PI) / 180)),
    };
  });
}
