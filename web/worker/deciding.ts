import type { WindowCell } from "../core.ts";
import type { NamedParts } from "../faults/field-labels.ts";
import { toldByLabel } from "../faults/told-by-label.ts";
import type { PlanDocument } from "../state/plan-document.ts";
import { cellOrder } from "../window/fill-order.ts";
import { askedOf } from "./asked-of.ts";
import {
  boundText,
  CellTrials,
  conditionsOf,
  estimateArriving,
  fastestBound,
  fastestWithReserve,
  latestInTime,
  leastUseBound,
  leastUseSpeed,
  type MinuteCells,
  makeSweep,
  type PaceBound,
  paceCurve,
  refinedBests,
  refineRoutes,
  type Steps,
  type SureWindow,
  type Sweep,
  summariseWindow,
  sureWindow,
  sweepCells,
  windowDepartures,
} from "./choose.ts";
import { estimatePrepared, InputError, type Plan } from "./core.ts";
import { decide } from "./decide.ts";
import type { PlanRead, PlanReader } from "./plan-reader.ts";
import type {
  Answered,
  DecideAnswer,
  PaceAnswer,
  SureQuestion,
  SureSlice,
  WindowBegun,
  WindowBests,
  WindowSlice,
} from "./protocol.ts";

/** What the worker works out for a decision, question by question. */
export interface Deciding {
  decide(plan: PlanDocument, turnBack: boolean): Promise<Answered<DecideAnswer>>;
  /** @param first_ms how long to work on the first cells; `null` to leave them */
  beginWindow(ticket: number, plan: PlanDocument, first_ms: number | null): Promise<Answered<WindowBegun>>;
  windowSlice(ticket: number, indices: Int32Array, budget_ms: number): WindowSlice | null;
  windowBests(ticket: number, cells: readonly WindowCell[], refine: boolean): WindowBests | null;
  windowSure(ticket: number, question: SureQuestion | null, budget_ms: number): Answered<SureSlice> | null;
  paceCurve(plan: PlanDocument, route: number): Promise<Answered<PaceAnswer>>;
}

interface OpenWindow {
  readonly ticket: number;
  readonly sweep: Sweep;
  readonly window: NonNullable<Plan["window"]>;
  readonly departures: readonly number[];
  readonly speeds: readonly (number | null)[];
  readonly trials: CellTrials;
  /** The cells tried for the bests to the minute, once they were asked for. */
  minutes: readonly MinuteCells[] | null;
  /** What is left to try of the bests. */
  sure: Steps<SureWindow> | null;
}

export function createDeciding(reader: PlanReader): Deciding {
  let open: OpenWindow | null = null;
  return {
    decide: (plan, turnBack) =>
      answered(plan, async () => {
        const read = await reader.read(plan);
        const { estimate, sensitivities } = decide(read, answerOf(read), turnBack);
        return { routes: estimate.routes, sensitivities };
      }),
    beginWindow: (ticket, document, first_ms) =>
      answered(document, async () => {
        const read = await reader.read(document);
        const { plan, input, prepared } = read;
        if (plan.window === undefined) throw new Error("a window is asked of a plan that names none");
        const asked = askedOf(read);
        const sweep = makeSweep(prepared, input, plan.arrive ?? null, asked);
        const departures = windowDepartures(plan.window);
        const { speeds_m_s } = plan.window;
        const trials = new CellTrials(sweep, asked, plan.window);
        const speeds = speeds_m_s ?? [null];
        open = { ticket, sweep, window: plan.window, departures, speeds, trials, minutes: null, sure: null };
        const { unit, usable } = input.craft.store;
        const tried = CellTrials.has(asked);
        const shape = {
          departures,
          routes: prepared.length,
          speeds: speeds_m_s,
          storeUnit: unit,
          usable,
          tried,
        };
        const order = cellOrder(departures.length, prepared.length * speeds.length);
        return { shape, first: first_ms === null ? [] : slice(open, order, first_ms).cells };
      }),
    windowSlice(ticket, indices, budget_ms) {
      if (open === null || open.ticket !== ticket) return null;
      return slice(open, indices, budget_ms);
    },
    windowBests(ticket, cells, refine) {
      if (open === null || open.ticket !== ticket) return null;
      const { sweep, window } = open;
      if (refine) open.minutes ??= refineRoutes(sweep, window, cells);
      const refined = refine && open.minutes !== null ? refinedBests(open.minutes) : null;
      return { summary: summariseWindow(cells), refined, ...inTimeOf(open) };
    },
    windowSure(ticket, question, budget_ms) {
      if (open === null || open.ticket !== ticket) return null;
      const { sweep, window, trials } = open;
      if (question !== null) {
        const { cells, refine, inTime } = question;
        if (refine) open.minutes ??= refineRoutes(sweep, window, cells);
        const minutes = refine ? open.minutes : null;
        open.sure = sureWindow(sweep, trials, { window, cells, minutes, inTime, paces: null });
      }
      return sureSlice(open.sure, budget_ms);
    },
    paceCurve: (plan, route) => answered(plan, async () => paceOf(await reader.read(plan), route)),
  };
}

/** The latest departures that arrive in time, or the core's sentence about what is wrong with the arrival to keep. */
function inTimeOf({ sweep, window }: OpenWindow): Pick<WindowBests, "inTime" | "inTimeFault"> {
  try {
    return { inTime: latestInTime(sweep, window), inTimeFault: null };
  } catch (fault) {
    if (fault instanceof InputError) return { inTime: null, inTimeFault: toldByLabel(fault) };
    throw fault;
  }
}

/**
 * Cells in the order asked for, until the time is spent: so the worker can hear what else is asked in between. Departures of one
 * route and speed are cheaper side by side: more are taken at a time as long as that fits the time.
 */
function slice(open: OpenWindow, indices: Int32Array, budget_ms: number): WindowSlice {
  const begun = performance.now();
  const cells: WindowCell[] = [];
  for (let some = 1; cells.length < indices.length; ) {
    const before = performance.now();
    cells.push(...sideBySide(open, indices.subarray(cells.length, cells.length + some)));
    const now = performance.now();
    if (now - begun >= budget_ms) break;
    if (now - before < budget_ms / 4) some *= 2;
  }
  return { cells };
}

/** The cells of some indices, those of one route and speed together. */
function sideBySide({ sweep, departures, speeds }: OpenWindow, indices: Int32Array): WindowCell[] {
  const cells = new Array<WindowCell>(indices.length);
  const ways = sweep.prepared.length * speeds.length;
  for (const way of new Set(indices.map((index) => index % ways))) {
    const places = Array.from(indices.keys()).filter((at) => (indices[at] as number) % ways === way);
    const prepared = sweep.prepared[Math.floor(way / speeds.length)];
    const moments = places.flatMap((at) => departures[Math.floor((indices[at] as number) / ways)] ?? []);
    if (prepared === undefined || moments.length < places.length)
      throw new Error(`cells ${indices.join(", ")} are not all in the window`);
    const found = sweepCells(sweep, prepared, moments, speeds[way % speeds.length] ?? null);
    places.forEach((at, n) => {
      cells[at] = found[n] as WindowCell;
    });
  }
  return cells;
}

function sureSlice(steps: Steps<SureWindow> | null, budget_ms: number): Answered<SureSlice> {
  if (steps === null) throw new Error("the bests of a window go on being tried before they begin");
  const end = performance.now() + budget_ms;
  try {
    for (;;) {
      const { done, value } = steps.next();
      if (done === true) return { ok: true, sure: value };
      if (performance.now() >= end) return { ok: true, sure: null };
    }
  } catch (fault) {
    if (fault instanceof InputError) return { ok: false, fault: fault.message };
    throw fault;
  }
}

function paceOf(read: PlanRead, at: number): PaceAnswer {
  const { input, prepared } = read;
  const route = prepared[at];
  const estimate = answerOf(read).estimate.routes[at];
  if (route === undefined || estimate === undefined) throw new Error(`no route ${at} in the plan`);
  const { pace, ...conditions } = conditionsOf(estimate, input, at);
  const least = leastUseSpeed(route, conditions);
  const fastest = fastestWithReserve(route, conditions);
  const words = (bound: PaceBound | null): string | null => bound && boundText(bound);
  return {
    curve: paceCurve(route, conditions),
    least,
    leastBound: words(leastUseBound(route, conditions, least)),
    fastest,
    fastestBound: words(fastestBound(route, conditions, fastest)),
    speed_m_s: pace.hold === "through-speed" ? pace.speed_m_s : null,
  };
}

function answerOf(read: PlanRead) {
  const { plan, input, prepared } = read;
  return plan.arrive === undefined
    ? estimatePrepared(prepared, input)
    : estimateArriving(prepared, input, plan.arrive, askedOf(read));
}

async function answered<T>(plan: NamedParts, find: () => Promise<T>): Promise<Answered<T>> {
  try {
    return { ok: true, ...(await find()) };
  } catch (fault) {
    if (fault instanceof InputError) return { ok: false, fault: toldByLabel(fault, plan) };
    throw fault;
  }
}
