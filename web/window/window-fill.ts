import { type ReadonlySignal, signal } from "@preact/signals";
import type { SureWindow, WindowCell } from "../core.ts";
import type { Engine } from "../state/page-state.ts";
import type { PlanDocument } from "../state/plan-document.ts";
import type { WindowBegun, WindowBests, WindowShape } from "../worker/protocol.ts";
import { cellOrder } from "./fill-order.ts";
import { tryBests } from "./try-bests.ts";

/** A window as far as it is worked out. */
export interface Filled {
  readonly plan: PlanDocument;
  readonly shape: WindowShape;
  /** By the cells' indices; `null` where still to come. The same array is filled on and on. */
  readonly cells: readonly (WindowCell | null)[];
  readonly done: number;
  /** Longest passage of the cells that are there, s. */
  readonly longest_s: number;
  /** Once all cells are there. */
  readonly bests: WindowBests | null;
  /** Once the bests are put to the test; `null` too where the plan names nothing to do so with. */
  readonly sure: SureWindow | null;
  /** The core's sentence about a what-if that cannot be tried; `null` where all can. */
  readonly sureFault: string | null;
}

export interface WindowFill {
  readonly filled: ReadonlySignal<Filled | null>;
  /** The core's sentence about what is wrong with the window; `null` where nothing is. */
  readonly fault: ReadonlySignal<string | null>;
  /** Begins anew with a plan that names a window; what was going on ends. */
  ask(plan: PlanDocument): Promise<void>;
  /** Works out the bests to the minute. */
  refine(): Promise<void>;
  stop(): void;
}

type Hand = Pick<Engine, "beginWindow" | "windowSlice" | "windowBests" | "windowSure">;

/** How long a hand works before it looks up: the first also answers everything else that the page asks. */
const BUDGETS_MS = [8, 60] as const;
/** Most cells that a hand is given at a time, so that it does not keep what another could do. */
const MOST_GIVEN = 64;

let tickets = 0;

/** @param hands the workers that fill a window together; the first begins at once */
export function createWindowFill(hands: readonly (() => Hand)[]): WindowFill {
  const filled = signal<Filled | null>(null);
  const fault = signal<string | null>(null);
  let current = 0;
  let tries = 0;

  /** The bests, and then how sure they are. On the last hand, since it takes a while and the first answers everything else. */
  const decide = async (ticket: number, cells: readonly WindowCell[], refine: boolean): Promise<void> => {
    const hand = hands.at(-1)?.();
    const bests = await hand?.windowBests(ticket, cells, refine);
    if (ticket !== current || !hand || !bests || filled.value === null) return;
    filled.value = { ...filled.value, bests };
    if (!filled.value.shape.tried) return;
    tries += 1;
    const own = tries;
    const wanted = (): boolean => ticket === current && own === tries;
    const found = await tryBests(hand, ticket, { cells, refine, inTime: bests.inTime }, wanted);
    if (found === null || filled.value === null) return;
    filled.value = { ...filled.value, ...found };
  };

  const begin = async (
    hand: Hand,
    ticket: number,
    plan: PlanDocument,
    first_ms: number | null,
  ): Promise<WindowBegun | null> => {
    const answer = await hand.beginWindow(ticket, plan, first_ms);
    if (ticket !== current) return null;
    if (answer.ok) return answer;
    fault.value = answer.fault;
    return null;
  };

  return {
    filled,
    fault,
    async ask(plan) {
      tickets += 1;
      const ticket = tickets;
      current = ticket;
      const queue = createQueue();
      const show = createShow(filled, () => ticket === current);
      await Promise.all(
        hands.map(async (handOf, at) => {
          // A worker that has yet to start would keep the first from its first cells.
          if (at > 0) await show.begun;
          const hand = handOf();
          const budget_ms = BUDGETS_MS[at] ?? 40;
          // The first cells come with the window itself: a question less before something is seen.
          const begun = await begin(hand, ticket, plan, at === 0 ? budget_ms : null);
          if (begun === null) {
            show.begin();
            return;
          }
          if (queue.open(begun.shape)) show.open(plan, begun.shape);
          fault.value = null;
          if (begun.first.length > 0) show.add(queue.takeFirst(begun.first.length), begun.first);
          await work(hand, ticket, queue, show, budget_ms);
        }),
      );
      const done = show.finished();
      if (ticket !== current || done === null) return;
      await decide(ticket, done, false);
    },
    async refine() {
      const cells = filled.value?.cells.flatMap((cell) => cell ?? []);
      if (cells !== undefined) await decide(current, cells, true);
    },
    stop() {
      tickets += 1;
      current = tickets;
    },
  };
}

/** Takes cells from the queue and works them out, until none is left or another window was asked. */
async function work(
  hand: Hand,
  ticket: number,
  queue: ReturnType<typeof createQueue>,
  show: ReturnType<typeof createShow>,
  budget_ms: number,
): Promise<void> {
  for (let given = queue.take(); given.length > 0 && show.wanted(); given = queue.take()) {
    const slice = await hand.windowSlice(ticket, given, budget_ms);
    if (slice === null || !show.wanted()) break;
    const { length } = slice.cells;
    queue.giveBack(given.subarray(length));
    show.add(given.subarray(0, length), slice.cells);
  }
  show.begin();
}

function createQueue() {
  let order: Int32Array | null = null;
  let next = 0;
  let returned: Int32Array[] = [];
  return {
    /** Says whether it was the first to open it. */
    open({ departures, routes, speeds }: WindowShape): boolean {
      if (order !== null) return false;
      order = cellOrder(departures.length, routes * (speeds?.length ?? 1));
      return true;
    },
    /** The first of all, before any other is taken. */
    takeFirst(count: number): Int32Array {
      next = count;
      return order?.slice(0, count) ?? new Int32Array();
    },
    take(): Int32Array {
      const back = returned.shift();
      if (back !== undefined) return back;
      const given = order?.slice(next, next + MOST_GIVEN) ?? new Int32Array();
      next += given.length;
      return given;
    },
    giveBack(rest: Int32Array): void {
      if (rest.length > 0) returned = [rest.slice(), ...returned];
    },
  };
}

/** Shows what is done at most once a frame. */
function createShow(filled: { value: Filled | null }, wanted: () => boolean) {
  let cells: (WindowCell | null)[] = [];
  let done = 0;
  let longest_s = 0;
  let painting = false;
  let begin: () => void = () => undefined;
  const begun = new Promise<void>((resolve) => {
    begin = resolve;
  });
  const paint = (): void => {
    painting = false;
    if (wanted() && filled.value) filled.value = { ...filled.value, cells, done, longest_s };
  };
  return {
    wanted,
    /** Resolves with the first cells, or once it is clear that none will come. */
    begun,
    begin: () => begin(),
    open(plan: PlanDocument, shape: WindowShape): void {
      cells = Array.from(
        { length: shape.departures.length * shape.routes * (shape.speeds?.length ?? 1) },
        () => null,
      );
      filled.value = { plan, shape, cells, done, longest_s, bests: null, sure: null, sureFault: null };
    },
    add(indices: Int32Array, found: readonly WindowCell[]): void {
      found.forEach((cell, at) => {
        cells[indices[at] ?? 0] = cell;
        longest_s = Math.max(longest_s, cell.passage_s ?? 0);
      });
      done += found.length;
      begin();
      if (painting) return;
      painting = true;
      requestAnimationFrame(paint);
    },
    /** All cells in order; `null` while some are missing. */
    finished(): readonly WindowCell[] | null {
      if (done === 0 || done < cells.length) return null;
      paint();
      return cells.flatMap((cell) => cell ?? []);
    },
  };
}
