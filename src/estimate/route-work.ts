import { InputError } from "../errors.ts";
import type { Conditions } from "./conditions.ts";
import { FindingBook } from "./finding-book.ts";
import type { NumberedLeg } from "./findings.ts";
import { type Flow, makeFlow } from "./flow.ts";
import { hover, plainStay, type Stay } from "./hover.ts";
import { lowestLevel, motionOn, paceOn } from "./leg-motion.ts";
import { type LegOutcome, type LegTerms, legEstimate } from "./leg-result.ts";
import { accountInto, accountTimes, type LegRun, runLeg, type Stop } from "./leg-run.ts";
import { LegWatch } from "./leg-watch.ts";
import { type LegSums, makeLegSums } from "./leg-work.ts";
import { magneticVariation } from "./magnetic.ts";
import { type Motion, stillMotion } from "./motion.ts";
import { mediumRole, type PreparedLeg, type PreparedRoute } from "./prepare.ts";
import type { LegEstimate, Reached, Still } from "./result.ts";
import { END_STATION, Samples, START_STATION } from "./samples.ts";
import { reachOf } from "./smooth-fleet.ts";
import { SmoothLeg } from "./smooth-leg.ts";
import { makeStations } from "./stations.ts";
import { makeStep, type Step } from "./step.ts";

/** A route in work: leg after leg, with what has passed so far. */
export class RouteWork {
  readonly samples: Samples;
  readonly book: FindingBook;
  /** Accounts of the legs so far; empty where the outcome alone is wanted. */
  readonly legs: LegEstimate[] = [];
  /** Seconds since departure, under way and staying, and the bound on their error. */
  elapsed = 0;
  timeBound = 0;
  /** Seconds under way. */
  underWay = 0;
  /** Seconds since departure at the last waypoint reached, before a stay there. */
  arrived = 0;
  used = 0;
  /** Store units per second under way on the last leg that was completed. */
  lastLegRate: number | null = null;
  /** How far the route came, where it stops on the way. */
  reached: Reached | null = null;

  readonly #prepared: PreparedRoute;
  readonly #conditions: Conditions;
  readonly #full: boolean;
  readonly #flows: readonly Flow[];
  readonly #medium: Flow | null;
  readonly #wind: Flow | null;
  readonly #step: Step;
  /** By smooth steps, made where they first serve: by whether the medium's cross-track component is taken as zero. */
  readonly #smooth = new Map<boolean, SmoothLeg>();
  /** The last valid time met, s since departure: before the leg in work, and on it. */
  #met = 0;
  #metOnLeg = 0;

  /** @param full whether everything is worked out, or the outcome alone */
  constructor(prepared: PreparedRoute, conditions: Conditions, full: boolean) {
    const { craft, fields, departure } = conditions;
    this.#prepared = prepared;
    this.#conditions = conditions;
    this.#full = full;
    this.samples = new Samples(full);
    this.book = new FindingBook(craft, fields, departure);
    this.#flows = fields.map((field) => makeFlow(field, departure));
    const role = mediumRole(craft);
    this.#medium = this.#flows.find(({ field }) => field.role === role) ?? null;
    this.#wind = this.#flows.find(({ field }) => field.role === "wind") ?? null;
    this.#step = makeStep(makeStations(), motionOn(conditions, prepared.legs[0] as PreparedLeg));
  }

  /** Runs the next leg, or, after a stop, keeps its geometry and still figures. */
  addLeg(leg: NumberedLeg): void {
    const { prepared } = leg;
    const motion = motionOn(this.#conditions, prepared);
    const still = this.#stillOn(leg, motion);
    const outcome = this.reached === null ? this.#run(leg, motion) : null;
    if (this.#full) {
      const medium = this.#medium?.field.role ?? null;
      const terms: LegTerms = {
        pace: paceOn(this.#conditions.pace, prepared),
        still,
        roles: this.#prepared.roles,
        medium,
      };
      this.legs.push(legEstimate(leg.number, prepared, terms, outcome));
    }
    if (outcome !== null) this.#arrive(prepared, outcome);
  }

  /** The same leg, with its stay, with every field at zero. */
  #stillOn({ prepared, number }: NumberedLeg, motion: Motion): Still {
    const { craft } = this.#conditions;
    const still = stillMotion(motion);
    const stay = plainStay(craft, prepared.to.stay_s);
    if (still === null || stay.failure !== null) {
      throw new InputError(
        `leg ${number} of route "${this.#prepared.route.name}" to ${prepared.to.name}: the pace takes a speed within the power model of ${craft.name}; found none even with every field at zero`,
      );
    }
    const time = prepared.track.length / still.groundSpeed;
    return { time_s: time, use: time * still.rate + stay.use };
  }

  /** Runs a leg with its stay; `null` where the route stops on it. */
  #run(leg: NumberedLeg, motion: Motion): LegOutcome | null {
    const { prepared } = leg;
    this.#setOut(prepared, motion);
    const middle = prepared.track.at(prepared.track.length / 2).course * (Math.PI / 180);
    const sums = makeLegSums(Math.sin(middle), Math.cos(middle));
    const watch = new LegWatch(this.#conditions.craft);
    const stop = this.#runUnderWay(leg, sums, watch);
    const place = stop?.at ?? prepared.track.length;
    const stay = stop === null ? this.#stayAt(prepared, sums) : null;
    if (stay !== null && stay.maxWind > 0) watch.whileStaying(stay.maxWind, place);
    watch.close(place);
    this.book.met(leg, watch, place);
    if (stop !== null) return this.#stopAt(leg, sums, stop);
    return this.#afterStay(leg, sums, stay as Stay);
  }

  #setOut(leg: PreparedLeg, motion: Motion): void {
    this.#flows.forEach((flow, n) => {
      flow.cells = leg.cells[n] ?? [];
      flow.heights = leg.heights;
    });
    const step = this.#step;
    step.motion = motion;
    step.medium = this.#medium;
    step.wind = this.#wind;
    step.along.fill(0);
    step.cross.fill(0);
    step.windAlong.fill(0);
    step.windCross.fill(0);
    this.#guess(motion);
  }

  /** The same first guess on every leg and run, so that figures do not depend on what was worked out before them. */
  #guess(motion: Motion): void {
    this.#step.lastGroundSpeed = stillMotion(motion)?.groundSpeed ?? 1;
  }

  #legRun(leg: PreparedLeg, alongOnly: boolean): LegRun {
    const step = this.#step;
    step.alongOnly = alongOnly;
    return {
      curve: leg.curve,
      panels: leg.panels,
      flows: this.#flows,
      step,
      smooth: this.#smoothOn(leg, alongOnly),
      stations: !alongOnly,
      clock: { elapsed: 0, met: this.#met },
    };
  }

  /**
   * Sets out by smooth steps; `null` where the craft's speed or rate depends on the fields, or where there is another field, whose valid
   * times the steps would pass over.
   */
  #smoothOn(leg: PreparedLeg, alongOnly: boolean): SmoothLeg | null {
    const { throughSpeed, steadyRate } = this.#step.motion;
    const medium = this.#medium;
    if (medium === null || steadyRate < 0 || this.#flows.length > 1) return null;
    const { departure } = this.#conditions;
    // The run with the cross component at zero stands beside one run alone: single steps are quicker.
    const every_s = alongOnly ? null : this.#prepared.every_s;
    const smooth = this.#smooth.get(alongOnly) ?? new SmoothLeg(medium.field, departure, every_s, alongOnly);
    this.#smooth.set(alongOnly, smooth);
    const reach = reachOf(throughSpeed);
    smooth.setOut({ leg, cells: medium.cells, speed: throughSpeed, rate: steadyRate, reach });
    return smooth;
  }

  #runUnderWay({ number, prepared }: NumberedLeg, sums: LegSums, watch: LegWatch): Stop | null {
    const run = this.#legRun(prepared, false);
    const account = this.#full ? accountInto(run, sums, watch) : accountTimes(run, sums, watch);
    const stop = runLeg(run, this.elapsed, (from, to, start, panel) => {
      if (from === 0) this.samples.add(number, this.#step, START_STATION, this.elapsed, this.used);
      account(from, to, start, panel);
      this.samples.add(number, this.#step, END_STATION, this.elapsed + sums.time, this.used + sums.use);
    });
    this.#metOnLeg = run.clock.met;
    return stop;
  }

  #stayAt(leg: PreparedLeg, sums: LegSums): Stay {
    const { craft } = this.#conditions;
    const seconds = leg.to.stay_s;
    const wind = this.#wind;
    if (seconds === 0 || craft.moves === "water" || wind === null) return plainStay(craft, seconds);
    return hover(craft, wind, leg, this.#step.stations, this.elapsed + sums.time, seconds);
  }

  #stopAt(leg: NumberedLeg, sums: LegSums, stop: Stop): null {
    const time = this.elapsed + sums.time;
    this.book.stopped(leg, stop, time);
    this.reached = { leg: leg.number, at_m: stop.at, time_s: time, use: this.used + sums.use };
    return null;
  }

  #afterStay(leg: NumberedLeg, sums: LegSums, stay: Stay): LegOutcome | null {
    this.book.stayed(leg, stay);
    const { failure } = stay;
    if (failure === null) return this.#outcome(leg.prepared, sums, stay);
    const at = leg.prepared.track.length;
    const { code, time, windSpeed } = failure;
    this.book.stopped(leg, { code, at, role: "wind", along: 0, cross: 0, throughSpeed: windSpeed }, time);
    this.reached = { leg: leg.number, at_m: at, time_s: time, use: this.used + sums.use + stay.use };
    return null;
  }

  #outcome(leg: PreparedLeg, sums: LegSums, stay: Stay): LegOutcome {
    const moment = this.#conditions.departure + 1000 * this.elapsed;
    const remaining = this.#conditions.craft.store.usable - (this.used + sums.use + stay.use);
    return {
      sums,
      stayUse: stay.use,
      stayUseBound: stay.useBound,
      alongOnlyTime: this.#full ? this.#alongOnlyTime(leg, sums) : null,
      departureBound: this.timeBound,
      departure: moment,
      variation: this.#full ? this.#variation(leg, moment) : null,
      remaining,
    };
  }

  /** Time of the leg with the medium's cross-track component at zero; `null` where that run stops on the way. */
  #alongOnlyTime(leg: PreparedLeg, sums: LegSums): number | null {
    const { motion } = this.#step;
    if (this.#medium === null || motion.groundSpeedFixed) return sums.time;
    this.#guess(motion);
    let time = 0;
    const stop = runLeg(this.#legRun(leg, true), this.elapsed, () => {
      time += this.#step.time;
    });
    return stop === null ? time : null;
  }

  #variation(leg: PreparedLeg, moment: number): number | null {
    const variation = magneticVariation(leg.from, leg.heights.from ?? lowestLevel(this.#conditions), moment);
    if (variation === null) this.book.withoutVariation(moment);
    return variation;
  }

  #arrive(leg: PreparedLeg, outcome: LegOutcome): void {
    const { sums, stayUse } = outcome;
    const stay = leg.to.stay_s;
    this.timeBound = this.timeBound * (1 + sums.growth) + sums.timeBound;
    this.#met = this.#metOnLeg;
    this.underWay += sums.time;
    this.arrived = this.elapsed + sums.time;
    this.elapsed = this.arrived + stay;
    this.used += sums.use + stayUse;
    this.lastLegRate = sums.use / sums.time;
    if (stay > 0) this.samples.addStay(this.elapsed, this.used, stayUse / stay);
  }
}
