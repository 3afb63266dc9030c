import { CellTrials } from "../choose/cell-trials.ts";
import {
  type DepartureWindow,
  stepFault,
  type WindowFault,
  windowFault,
} from "../choose/departure-window.ts";
import { type InTime, latestInTime } from "../choose/in-time.ts";
import { type RefinedWindow, refinedBests, refineRoutes } from "../choose/refine.ts";
import { type RoutePaces, routePaces } from "../choose/route-paces.ts";
import { runSteps } from "../choose/steps.ts";
import { type SureWindow, sureWindow } from "../choose/sure-window.ts";
import { checkSpeed, makeSweep, windowCells } from "../choose/window.ts";
import type { WindowCell } from "../choose/window-cell.ts";
import { summariseWindow, type WindowSummary } from "../choose/window-summary.ts";
import type { Craft, Pace } from "../craft/craft.ts";
import { InputError, type Place } from "../errors.ts";
import { type EstimateInput, prepareRoutes } from "../estimate/estimate.ts";
import { quoted } from "../found.ts";
import { parseQuantity } from "../units.ts";
import { checkPlan, type PlanChecked, type PlanRequest } from "./estimate-plan.ts";
import type { Plan } from "./plan.ts";
import { parseTime } from "./time.ts";
import { toldOf } from "./told-of.ts";

/** What a door hands over beside the plan's text; parts of the window given here take the place of the plan's. */
export interface WindowRequest extends PlanRequest {
  /** First and last departure, ISO 8601 with a zone. */
  readonly from?: string;
  readonly to?: string;
  /** Step, as `30 min`. */
  readonly every?: string;
  /** Speeds to try, as `8 kn`. */
  readonly speeds?: readonly string[];
  /** An arrival to keep, ISO 8601 with a zone: the latest departure for it is looked for. */
  readonly arriveBy?: string;
  /** Whether the bests are refined to the minute. */
  readonly refine?: boolean;
}

/** A window of departures, answered. */
export interface WindowAnswer {
  readonly plan: Plan;
  readonly input: EstimateInput;
  readonly window: DepartureWindow;
  readonly cells: readonly WindowCell[];
  readonly summary: WindowSummary;
  readonly refined: RefinedWindow | null;
  /** The latest departures that arrive in time; `null` where no arrival is to be kept. */
  readonly inTime: InTime | null;
  /** The choice of pace per route; `null` unless the bests are refined, the window names speeds and the pace holds a through-speed. */
  readonly paces: readonly RoutePaces[] | null;
  /** The bests put to the test with the plan's members, what-ifs and stated errors; `null` where it names none. */
  readonly sure: SureWindow | null;
}

/**
 * Compares departures: reads a plan with its craft and fields and estimates every route × departure × speed of its window.
 *
 * Errors: an InputError in one sentence for whatever is wrong in what the user gave.
 *
 * @example
 * const plan = JSON.stringify({
 *   format: "legwork-plan/1", departure: "2027-05-04T06:00:00Z",
 *   craft: {
 *     name: "Boat", moves: "water", speed: "5 m/s",
 *     power: { model: "constant", rate: "1 kW" }, store: { capacity: "10 kWh" },
 *   },
 *   window: { from: "2027-05-04T06:00Z", to: "2027-05-04T12:00Z", every: "2 h" },
 *   routes: [{ name: "East", waypoints: [{ name: "A", lat: 0, lon: 0 }, { name: "B", lat: 0, lon: 1 }] }],
 * });
 * async function* open() {}
 * const answer = await windowPlan(plan, { file: "east.plan.json", open });
 * answer.cells.map(({ departure }) => departure.slice(11, 16)) // → ["06:00", "08:00", "10:00", "12:00"]
 */
export async function windowPlan(text: string, request: WindowRequest): Promise<WindowAnswer> {
  const checked = await checkPlan(text, request);
  const window = windowAsked(checked.plan, request);
  return toldOf({ file: request.file }, () => answerWindow(checked, window, request));
}

function answerWindow(
  { plan, input, members }: PlanChecked,
  window: DepartureWindow,
  { file, arriveBy, refine = false }: WindowRequest,
): WindowAnswer {
  const { whatIfs = [], errors = [], confidence } = plan;
  const asked = { whatIfs, errors, members, confidence };
  // At the step of the plan, whatever is asked beside it: each cell is the plan's own estimate, to the last bit.
  const sweep = makeSweep(prepareRoutes(input), input, plan.arrive ?? null, asked);
  const ofArriveBy = arriveBy === undefined ? { file, key: "window.arriveBy" } : { key: "arriveBy" };
  const inTime = toldOf(ofArriveBy, () => latestInTime(sweep, window));
  const cells = [...windowCells(sweep, window)];
  const minutes = refine ? refineRoutes(sweep, window, cells) : null;
  const summary = summariseWindow(cells);
  const isPaceOpen = minutes !== null && window.speeds_m_s !== null && plan.pace.hold === "through-speed";
  const hasRange = Number.isFinite(plan.craft.speeds?.max ?? plan.craft.power.max);
  const paces = isPaceOpen && hasRange ? routePaces(sweep, refinedBests(minutes)) : null;
  const sure = CellTrials.has(asked)
    ? runSteps(
        sureWindow(sweep, new CellTrials(sweep, asked, window), { window, cells, minutes, inTime, paces }),
      )
    : null;
  // Last, since what is tried to be sure counts too.
  const refined = minutes && refinedBests(minutes);
  return { plan, input, window, cells, summary, refined, inTime, paces, sure };
}

/** The window asked for: parts of the request in place of the plan's. A fault in those is not told of the plan's file. */
function windowAsked(plan: Plan, request: WindowRequest): DepartureWindow {
  const { window: planned, craft, pace, routes } = plan;
  const { file, from, to, every, speeds, arriveBy } = request;
  const needed = (what: string, value: number | undefined): number => {
    if (value !== undefined) return value;
    throw new InputError(
      `a window of departures needs from, to and every, in the plan or beside it; found no ${what} in either`,
      { file, key: "window" },
    );
  };
  const keep = arriveBy === undefined ? planned?.arriveBy : parseTime(arriveBy, "arriveBy");
  const window = {
    ...(keep === undefined ? {} : { arriveBy: keep }),
    from: needed("from", from === undefined ? planned?.from : parseTime(from, "from")),
    to: needed("to", to === undefined ? planned?.to : parseTime(to, "to")),
    every_s: needed("every", every === undefined ? planned?.every_s : stepAsked(every)),
    speeds_m_s:
      speeds === undefined
        ? (planned?.speeds_m_s ?? null)
        : speeds.map((speed) => speedAsked(speed, craft, pace)),
  };
  const wrong = windowFault(window, routes.length);
  if (wrong !== null) throw new InputError(wrong.sentence, partsGiven(wrong, request));
  return window;
}

/** Of the parts of a window at fault, those that the request gives; the plan's window where it gives none of them. */
function partsGiven({ parts }: WindowFault, { file, ...given }: WindowRequest): Place {
  const own = parts.filter((part) => given[part] !== undefined);
  return own.length === 0 ? { file, key: "window" } : { key: own.join(", ") };
}

function stepAsked(text: string): number {
  const step = parseQuantity(text, "time", "every");
  const wrong = stepFault(step, quoted(text));
  if (wrong !== null) throw new InputError(wrong.sentence, { key: "every" });
  return step;
}

/** A speed given beside the plan: a fault in it is not told of the plan's file. */
function speedAsked(text: string, craft: Craft, pace: Pace): number {
  const speed = parseQuantity(text, "speed", "speeds");
  toldOf({ key: "speeds" }, () => checkSpeed(craft, pace, speed));
  return speed;
}
