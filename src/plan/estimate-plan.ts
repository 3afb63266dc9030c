import { estimateArriving } from "../choose/arriving-estimate.ts";
import { CellTrials } from "../choose/cell-trials.ts";
import type { DecidedEstimate } from "../choose/decided.ts";
import type { SensitivityProfile } from "../choose/sensitivity-profile.ts";
import { withTurnBack } from "../choose/turn-back-estimate.ts";
import { type UncertaintyAsked, withUncertainty } from "../choose/uncertain-estimate.ts";
import type { Land } from "../coast/land-cells.ts";
import { landFinder } from "../coast/land-finder.ts";
import { InputError } from "../errors.ts";
import {
  type EstimateAnswer,
  type EstimateInput,
  estimatePrepared,
  prepareRoutes,
} from "../estimate/estimate.ts";
import { fieldNotes } from "../estimate/field-notes.ts";
import type { PreparedRoute } from "../estimate/prepare.ts";
import type { Finding } from "../estimate/result.ts";
import { quoted } from "../found.ts";
import { comparedStep } from "./compared-step.ts";
import type { MemberFields } from "./merge-fields.ts";
import type { OpenFile, Plan } from "./plan.ts";
import { type FileProgress, readMembers } from "./read-fields.ts";
import { readPlan } from "./read-plan.ts";
import { parseTime } from "./time.ts";
import { toldOf } from "./told-of.ts";

/** What a door hands over beside the plan's text. */
export interface PlanRequest {
  /** Name of the plan for messages. */
  readonly file: string;
  /** Yields the bytes of files that the plan names, in pieces. */
  readonly open: OpenFile;
  /** Departure in place of the plan's, ISO 8601 with a zone. */
  readonly departure?: string;
  /** Names of the routes to estimate; all where left out. */
  readonly routes?: readonly string[];
  /** Loads the coarse land for the hint `crosses-land`; called for craft in water only. */
  readonly loadLand?: () => Promise<Land | null>;
  readonly onProgress?: FileProgress;
  /** Work out turning back for every route, alternates or not. */
  readonly turnBack?: boolean;
}

/** An answered plan: what was asked, and the figures. */
export interface PlanAnswer extends EstimateAnswer {
  /** Its routes carry `turnBack` where the plan has alternates or the request asks for it. */
  readonly estimate: DecidedEstimate;
  /** Per route, where a wrong forecast would hurt most; left out where the plan states no error. */
  readonly sensitivities?: readonly (SensitivityProfile | null)[];
  readonly plan: Plan;
  readonly input: EstimateInput;
}

/** A plan with everything that it names read. */
export interface PlanChecked {
  readonly plan: Plan;
  /** Of an ensemble, with the control's fields: the member of the lowest number. */
  readonly input: EstimateInput;
  /** Every member of an ensemble; empty where there are fewer than two. */
  readonly members: readonly MemberFields[];
  /** What there is to note of the fields, whatever the route. */
  readonly notes: readonly Finding[];
}

/**
 * The main job: reads a plan with its craft and fields and estimates its routes.
 *
 * @throws InputError in one sentence with file, line or key for whatever is wrong in what the user gave
 *
 * @example
 * const plan = JSON.stringify({
 *   format: "legwork-plan/1", departure: "2027-05-04T06:00:00Z",
 *   craft: {
 *     name: "Boat", moves: "water", speed: "5 m/s",
 *     power: { model: "constant", rate: "1 kW" }, store: { capacity: "10 kWh" },
 *   },
 *   fields: [{ role: "current", file: "stream.csv" }],
 *   routes: [{ name: "East", waypoints: [{ name: "A", lat: 0, lon: 0 }, { name: "B", lat: 0, lon: 1 }] }],
 * });
 * async function* open() {
 *   yield new TextEncoder().encode("lat,lon,u,v\n-1,0,1,0\n-1,1,1,0\n1,0,1,0\n1,1,1,0\n");
 * }
 * const answer = await estimatePlan(plan, { file: "east.plan.json", open });
 * answer.estimate.routes[0].totals.time_s // → 18553.248
 */
export async function estimatePlan(text: string, request: PlanRequest): Promise<PlanAnswer> {
  const checked = await checkPlan(text, request);
  return toldOf({ file: request.file }, () => estimateChecked(checked, request.turnBack));
}

function estimateChecked({ plan, input, members }: PlanChecked, turnBack = false): PlanAnswer {
  const prepared = prepareRoutes(input);
  const { alternates = [], whatIfs = [], errors = [], confidence } = plan;
  const asked = { whatIfs, errors, members, confidence };
  const answer = answerOf(plan, input, prepared, asked);
  const isAsked = alternates.length > 0 || turnBack;
  const turned = isAsked ? withTurnBack(answer, prepared, input, alternates) : answer;
  if (!CellTrials.has(asked)) return { ...turned, plan, input };
  return { ...withUncertainty(turned, prepared, input, asked), plan, input };
}

/** Estimates what is read: at the plan's pace, or at the speeds that make the arrival it asks for. */
function answerOf(
  { arrive }: Plan,
  input: EstimateInput,
  prepared: readonly PreparedRoute[],
  asked: UncertaintyAsked,
): EstimateAnswer {
  return arrive === undefined
    ? estimatePrepared(prepared, input)
    : estimateArriving(prepared, input, arrive, asked);
}

/**
 * Reads and checks everything that a plan names, and computes nothing.
 *
 * @throws InputError as {@link estimatePlan} does
 *
 * @example
 * const plan = JSON.stringify({
 *   format: "legwork-plan/1", departure: "2027-05-04T06:00:00Z",
 *   craft: {
 *     name: "Boat", moves: "water", speed: "5 m/s",
 *     power: { model: "constant", rate: "1 kW" }, store: { capacity: "10 kWh" },
 *   },
 *   fields: [{ role: "current", file: "stream.csv" }],
 *   routes: [{ name: "East", waypoints: [{ name: "A", lat: 0, lon: 0 }, { name: "B", lat: 0, lon: 1 }] }],
 * });
 * async function* open() {
 *   yield new TextEncoder().encode("lat,lon,u,v\n-1,0,1,0\n-1,1,1,0\n1,0,1,0\n1,1,1,0\n");
 * }
 * const { input } = await checkPlan(plan, { file: "east.plan.json", open });
 * [input.craft.store.usable, input.fields[0].role] // → [36e6, "current"]
 */
export async function checkPlan(text: string, request: PlanRequest): Promise<PlanChecked> {
  const plan = await checkPlanText(text, request);
  return { plan, ...(await readInput(plan, request)) };
}

async function checkPlanText(text: string, { file, open, departure, routes }: PlanRequest): Promise<Plan> {
  const plan = await readPlan(text, { file, open });
  return {
    ...plan,
    ...(departure === undefined ? {} : { departure: parseTime(departure, "departure") }),
    ...(routes === undefined ? {} : { routes: routesNamed(plan, routes) }),
  };
}

/** The routes asked for. A fault in a name is the request's, so that it is not told of the plan's file. */
function routesNamed({ routes }: Plan, names: readonly string[]): Plan["routes"] {
  const twice = names.find((name, index) => names.indexOf(name) !== index);
  if (twice !== undefined)
    throw new InputError(`a route is asked for once; found ${quoted(twice)} twice`, { key: "routes" });
  return names.map((name) => {
    const route = routes.find((candidate) => candidate.name === name);
    if (route !== undefined) return route;
    const known = routes.map((candidate) => quoted(candidate.name)).join(", ");
    throw new InputError(`a route is one of ${known}; found ${quoted(name)}`, { key: "routes" });
  });
}

async function readInput(
  plan: Plan,
  { open, loadLand, onProgress }: PlanRequest,
): Promise<Omit<PlanChecked, "plan">> {
  const { title, departure, craft, pace, reserve, routes } = plan;
  const { fields, members } = await readMembers(plan.fields, open, onProgress);
  const coast = craft.moves === "water" && loadLand !== undefined ? await loadLand() : null;
  const land = coast === null ? null : landFinder(coast);
  const input = { title, departure, craft, pace, reserve, fields, routes, land, ...comparedStep(plan) };
  return { input, members, notes: fieldNotes(input) };
}
