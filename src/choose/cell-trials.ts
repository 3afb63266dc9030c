import type { Conditions } from "../estimate/conditions.ts";
import { durationText, missedArrivalText, momentText } from "../estimate/finding-text.ts";
import { routeFinding } from "../estimate/findings.ts";
import type { PreparedRoute } from "../estimate/prepare.ts";
import { decidesArrival, heldToArrival } from "./arrival-kept.ts";
import type { ArrivalWindow } from "./arrival-window.ts";
import { type CellSpread, cellSpread } from "./cell-spread.ts";
import type { DepartureWindow } from "./departure-window.ts";
import { membersHeld } from "./ensemble.ts";
import { runSteps, type Steps } from "./steps.ts";
import type { DecidedBy, Sure } from "./sure.ts";
import { routeOf, type Sweep } from "./sweep.ts";
import { type Trial, type Tried, trialsOf, tryOne } from "./trial.ts";
import type { UncertaintyAsked } from "./uncertain-estimate.ts";
import { decidingVariant, variantText } from "./what-if-results.ts";
import { arrivalOf, type CellFinding, cellFinding, paceAt, type WindowCell } from "./window-cell.ts";

const BY_ERROR: DecidedBy = { member: null, whatIf: null, error: true };

/** What cells are tried in. */
export interface TrialCounts {
  readonly members: number;
  readonly whatIfs: number;
  /** Probability with which the reserve has to hold under the stated error, 0..1; left out where none is asked for. */
  readonly confidence?: number;
}

/** What is known of one cell so far. */
interface Known {
  readonly route: number;
  readonly base: Conditions;
  readonly tried: Map<Trial, Tried>;
  /** `undefined` while it is not worked out. */
  spread?: CellSpread;
}

/** What trials are made for. */
type Tested = Pick<Sweep, "prepared" | "conditions" | "arrive">;

/**
 * Puts cells of a sweep to the test with everything that a plan names: every member of an ensemble, every what-if and the
 * stated forecast error, each a true estimate at the cell's departure and at the speed at which it was estimated. Where a confidence is
 * asked for, a cell holds only if its reserve does with that probability. Where the plan's pace asks for a span of times to arrive in, a cell
 * holds only if it is kept in every member and what-if, and with that probability.
 *
 * What is worked out for a cell is kept. Whether it holds is known at its first break, and what broke the last cell is tried
 * first, so that going down a ranking costs little more than one estimate a cell that is passed over, and one a member and what-if where
 * it ends. The changed fields of the what-ifs are
 * kept too, cut to the nodes that the routes span.
 *
 * @example
 * const craft = readCraft(
 *   `{ "name": "Drone", "moves": "air", "power": { "model": "constant", "rate": "1 kW" },
 *      "store": { "capacity": "10 kWh" } }`,
 * );
 * const waypoint = (name, lon) => (
 *   { name, lat: 0, lon, path: "rhumb", speed_m_s: null, height_m: null, stay_s: 0 });
 * const wind = (u) => {
 *   const slices = [Float64Array.of(u, 0, u, 0, u, 0, u, 0)];
 *   const axes = { lon: Float64Array.of(-1, 2), lat: Float64Array.of(-1, 1), height: null, times: null };
 *   const tile = { files: [], ...axes, slices, gusts: null, masks: [null], global: false, beyond: "stop" };
 *   return { role: "wind", tiles: [tile], outside: "stop" };
 * };
 * const routes = [{ name: "East", waypoints: [waypoint("A", 0), waypoint("B", 1)] }];
 * const pace = { hold: "through-speed", speed_m_s: 10 };
 * const input = { title: "", departure: 0, craft, pace, reserve: null, fields: [wind(0)], routes, land: null };
 * const sweep = makeSweep(prepareRoutes(input), input);
 * const members = [0, -9].map((u, member) => ({ member, fields: [wind(u)] }));
 * const trials = new CellTrials(sweep, { whatIfs: [], errors: [], members });
 * runSteps(trials.sure(sweepCell(sweep, sweep.prepared[0], 0, null))).decidedBy.member // → 1
 */
export class CellTrials {
  readonly #sweep: Tested;
  readonly #asked: UncertaintyAsked;
  /** The arrival that the cells were found for, and have to keep. */
  readonly #arrive: ArrivalWindow | null;
  /** What broke the last cell first. */
  #trials: Trial[];
  readonly #inOrder: readonly Trial[];
  /** Whether the last cell was broken by the stated error alone. */
  #unsureFirst = false;
  readonly #known = new Map<string, Known>();

  /**
   * @param window whose speeds, where it names some, stand in place of an arrival that the plan's pace asks for
   * @param trials as others have them for the same sweep, so that their changed fields serve these too
   */
  constructor(
    sweep: Tested,
    asked: UncertaintyAsked,
    window: Pick<DepartureWindow, "speeds_m_s"> = { speeds_m_s: null },
    trials: readonly Trial[] = trialsOf(sweep, asked),
  ) {
    this.#sweep = sweep;
    this.#asked = asked;
    this.#arrive = window.speeds_m_s === null ? sweep.arrive : null;
    this.#inOrder = trials;
    this.#trials = [...trials];
  }

  /** Whether a plan names anything to put a cell to the test with. */
  static has({ members, whatIfs, errors }: UncertaintyAsked): boolean {
    return members.length + whatIfs.length + errors.length > 0;
  }

  /** Whether anything that a plan names may make a cell a stop that is none itself: an error does where a confidence is asked for. */
  static decide({ members, whatIfs, errors, confidence }: UncertaintyAsked): boolean {
    return members.length + whatIfs.length > 0 || (errors.length > 0 && confidence !== undefined);
  }

  /** Whether each cell goes at a speed found for it, the cheapest that holds. */
  get findsSpeeds(): boolean {
    return decidesArrival(this.#arrive);
  }

  /** How many members and what-ifs there are, and the confidence asked for. */
  get counts(): TrialCounts {
    const { members, whatIfs, confidence } = this.#asked;
    const counts = { members: members.length, whatIfs: whatIfs.length };
    return confidence === undefined ? counts : { ...counts, confidence };
  }

  /**
   * Whether a cell can be done, and in every member and what-if too, and its reserve holds with the probability asked for.
   *
   * @param notAfter an arrival to keep in all of them, ms since 1970-01-01T00:00Z
   */
  *holds(cell: WindowCell, notAfter: number | null = null): Steps<boolean> {
    if (cell.status === "stop" || isLate(arrivalOf(cell), notAfter)) return false;
    const known = this.#knownOf(cell);
    if (this.#unsureFirst && (yield* this.#isUnsure(known))) return false;
    for (const trial of this.#trials) {
      const isNew = !known.tried.has(trial);
      const { status, arrival } = this.#try(known, trial);
      if (isNew) yield;
      if (status !== "stop" && !isLate(arrival, notAfter)) continue;
      this.#trials = [trial, ...this.#trials.filter((other) => other !== trial)];
      this.#unsureFirst = false;
      return false;
    }
    this.#unsureFirst = yield* this.#isUnsure(known);
    return !this.#unsureFirst;
  }

  /** Whether a cell is broken by what broke the last that did not hold, or by the plain estimate: one estimate at most. */
  *isBrokenAlike(cell: WindowCell): Steps<boolean> {
    if (cell.status === "stop") return true;
    const known = this.#knownOf(cell);
    if (this.#unsureFirst) return yield* this.#isUnsure(known);
    const [first] = this.#trials;
    return first !== undefined && this.#try(known, first).status === "stop";
  }

  /**
   * All that a cell comes to.
   *
   * @param notAfter an arrival to keep, ms since 1970-01-01T00:00Z: a member or what-if that arrives later counts as a stop
   */
  *sure(cell: WindowCell, notAfter: number | null = null): Steps<Sure> {
    const known = this.#knownOf(cell);
    const tried: Tried[] = [];
    for (const trial of this.#inOrder) {
      if (!known.tried.has(trial)) yield;
      tried.push(keptInTime(this.#try(known, trial), notAfter));
    }
    const spread = yield* this.#spread(known);
    const deciding = decidingVariant(cell.status, tried);
    const members = tried.flatMap(({ by, arrival, remaining, reserve }) =>
      by.member === null ? [] : [{ member: by.member, arrives: arrival !== null, remaining, reserve }],
    );
    const status = deciding?.variant.status ?? cell.status;
    const decided =
      status !== "stop" && spread.unsure !== null
        ? ({ status: "stop", decidedBy: BY_ERROR, worst: spread.unsure, asBad: 0 } as const)
        : {
            status,
            decidedBy: deciding?.variant.by ?? { member: null, whatIf: null },
            worst: deciding === null ? cell.worst : deciding.variant.worst,
            asBad: deciding?.others ?? 0,
          };
    return {
      ...decided,
      ensemble: members.length === 0 ? null : membersHeld(members),
      reserveHolds: spread.reserveHolds,
    };
  }

  /** What stops a cell, be it the plain estimate or what the plan names beside it, as a finding says it; `null` where nothing does. */
  *stoppedBy(cell: WindowCell): Steps<CellFinding | null> {
    if (cell.status === "stop") return cell.worst;
    const { status, worst, decidedBy, asBad } = yield* this.sure(cell);
    if (decidedBy.error === true) return worst;
    const trial = this.#inOrder.find(({ by }) => by === decidedBy);
    if (status !== "stop" || worst === null || trial === undefined) return null;
    const variant = { label: trial.label, status, remaining: null, worst };
    return { ...worst, leg: null, at_m: null, message: variantText({ variant, others: asBad }) };
  }

  /** When a cell arrives in one of the members and what-ifs, by its place among them: ms since 1970-01-01T00:00Z; `null` where it does not. */
  arrivalIn(place: number, cell: WindowCell): number | null {
    return this.#try(this.#knownOf(cell), this.#inOrder[place] as Trial).arrival;
  }

  /** What a cell comes to under the stated error. */
  spreadOf(cell: WindowCell): CellSpread {
    return runSteps(this.#spread(this.#knownOf(cell)));
  }

  #knownOf(cell: WindowCell): Known {
    const key = JSON.stringify([cell.route, cell.departure, cell.speed_m_s]);
    const before = this.#known.get(key);
    if (before !== undefined) return before;
    const { prepared, conditions } = this.#sweep;
    const route = prepared.indexOf(routeOf(this.#sweep, cell.route));
    const base = {
      ...conditions,
      departure: Date.parse(cell.departure),
      pace: paceAt(conditions.pace, cell.speed_m_s),
    };
    const known: Known = { route, base, tried: new Map() };
    this.#known.set(key, known);
    return known;
  }

  #try({ route, base, tried }: Known, trial: Trial): Tried {
    const before = tried.get(trial);
    if (before !== undefined) return before;
    const plain = tryOne(trial, route, base, this.#sweep);
    const found = heldToArrival(plain, plain.arrival, this.#arrive);
    tried.set(trial, found);
    return found;
  }

  /** Whether the reserve or the arrival holds with less than the probability asked for. */
  *#isUnsure(known: Known): Steps<boolean> {
    return this.#asked.confidence !== undefined && (yield* this.#spread(known)).unsure !== null;
  }

  *#spread(known: Known): Steps<CellSpread> {
    if (known.spread === undefined) {
      yield;
      const prepared = this.#sweep.prepared[known.route] as PreparedRoute;
      known.spread = cellSpread(prepared, known.base, this.#asked, this.#arrive);
    }
    return known.spread;
  }
}

function isLate(arrival: number | null, notAfter: number | null): boolean {
  return arrival !== null && notAfter !== null && arrival > notAfter;
}

/** An arrival after the one to keep is a stop, unless there is a graver one. */
function keptInTime(tried: Tried, notAfter: number | null): Tried {
  const { arrival, status } = tried;
  if (arrival === null || notAfter === null || status === "stop" || !isLate(arrival, notAfter)) return tried;
  const late = (arrival - notAfter) / 1000;
  const message = `it arrives ${missedArrivalText(arrival, late)}, ${durationText(late)} after ${momentText(notAfter)}`;
  return { ...tried, status: "stop", worst: cellFinding(routeFinding("arrival-missed", message)) };
}
