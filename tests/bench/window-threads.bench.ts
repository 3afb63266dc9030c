import { once } from "node:events";
import { fileURLToPath } from "node:url";
import { isMainThread, type MessagePort, parentPort, Worker, workerData } from "node:worker_threads";
import { sweepCells } from "../../src/choose/window.ts";
import type { WindowCell } from "../../src/choose/window-cell.ts";
import type { Field } from "../../src/field/field.ts";
import { DEPARTURES_S, makeOcean, oceanSweep, oceanWind } from "./ocean.ts";
import { type Contestant, takeTurns } from "./timing.ts";

/*
 * A window of departures filled by one thread and by two, in a process of its own: the wind stands in shared memory, every thread
 * prepares the routes for itself, and a queue gives out cells as the page does. Writes the two timings.
 */

const ROUTES = 5;
const CELLS = DEPARTURES_S.length * ROUTES;
/** Departures given out at a time, of every route: 60 cells; the page gives no more than 64. */
const GIVEN = 12;
const ROUNDS = 25;

if (isMainThread) await compare();
else serve(parentPort as MessagePort, workerData as Field);

async function compare(): Promise<void> {
  const wind = oceanWind((length) => new Float64Array(new SharedArrayBuffer(8 * length)));
  const threads = [startThread(wind), startThread(wind)];
  const contestants = [filledBy("one thread", threads.slice(0, 1)), filledBy("two threads", threads)];
  process.stdout.write(JSON.stringify(await takeTurns(contestants, ROUNDS, 3)));
  await Promise.all(threads.map((thread) => thread.terminate()));
}

function startThread(wind: Field): Worker {
  return new Worker(fileURLToPath(import.meta.url), { workerData: wind });
}

/** Seconds that threads take to fill the window together. @throws Error where a cell is missing or did not arrive */
function filledBy(name: string, threads: readonly Worker[]): Contestant {
  return {
    name,
    time: async () => {
      let arrived = 0;
      let next = 0;
      const start = performance.now();
      await Promise.all(
        threads.map(async (thread) => {
          while (next < DEPARTURES_S.length) {
            thread.postMessage(next);
            next += GIVEN;
            const [cells] = (await once(thread, "message")) as [WindowCell[]];
            arrived += cells.filter(({ arrival }) => arrival !== null).length;
          }
        }),
      );
      const seconds = (performance.now() - start) / 1000;
      if (arrived !== CELLS) throw new Error(`${name} filled ${arrived} of ${CELLS} cells`);
      return seconds;
    },
  };
}

/** Works out the cells of the departures from one on, side by side, route by route. */
function serve(port: MessagePort, wind: Field): void {
  const { sweep, departures } = oceanSweep(makeOcean(wind));
  port.on("message", (first: number) => {
    const some = departures.slice(first, first + GIVEN);
    port.postMessage(sweep.prepared.flatMap((prepared) => sweepCells(sweep, prepared, some, null)));
  });
}
