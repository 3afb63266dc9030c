import type { Craft, Pace, Reserve } from "../craft/craft.ts";
import { InputError } from "../errors.ts";
import type { Field } from "../field/field.ts";
import { momentText } from "./finding-text.ts";
import {
  landText,
  legFinding,
  type NumberedLeg,
  routeFinding,
  statusOf,
  stopText,
  watchedText,
} from "./findings.ts";
import { type Flow, makeFlow } from "./flow.ts";
import { hover, plainStay, type Stay } from "./hover.ts";
import { isoTime, type LegOutcome, type LegTerms, legEstimate } from "./leg-result.ts";
import { accountInto, type LegRun, runLeg, type Stop } from "./leg-run.ts";
import { LegWatch } from "./leg-watch.ts";
import { type LegSums, makeLegSums } from "./leg-work.ts";
import { magneticVariation } from "./magnetic.ts";
import { type Motion, makeMotion, stillMotion } from "./motion.ts";
import { mediumRole, type PreparedLeg, type PreparedRoute } from "./prepare.ts";
import type { Finding, LegEstimate, Profile, Reached, RouteEstimate, Still } from "./result.ts";
import { routeTotals } from "./route-totals.ts";
import { END_STATION, Samples, START_STATION } from "./samples.ts";
import { makeStations } from "./stations.ts";
import { makeStep, type Step } from "./step.ts";
import { reserveAmount, storeFindings } from "./store-findings.ts";

/** What the second half of an estimate depends on. */
export interface Conditions {
  /** ms since 1970-01-01T00:00Z. */
  readonly departure: number;
  readonly craft: Craft;
  readonly pace: Pace;
  readonly reserve: Reserve | null;
  /** The fields in use, with the axes and in the order that the route was prepared for. */
  readonly fields: readonly Field[];
}

/** A route's estimate with its figures along the way. */
export interface RouteRun {
  readonly estimate: RouteEstimate;
  readonly profile: Profile;
}

/**
 * Estimates a prepared route: the second half, run for every departure, pace, craft or set of values.
 *
 * Time is the integral of ds / g(s, t(s)) with g = a + sqrt(V² - c²), use that of its rate over g, and the fields' figures are line
 * integrals along the track at the times when the craft is there.
 *
 * @throws InputError where the pace has no speed even with every field at zero
 * @throws Error where the fields are not those that the route was prepared for
 */
export function estimateRoute(prepared: PreparedRoute, conditions: Conditions): RouteRun {
  checkFields(prepared, conditions.fields);
  const run = new RouteWork(prepared, conditions);
  for (const [index, leg] of prepared.legs.entries()) run.addLeg({ number: index + 1, prepared: leg }, index);
  return run.result();
}

function checkFields({ roles, legs }: PreparedRoute, fields: readonly Field[]): void {
  const fits =
    roles.length === fields.length &&
    fields.every(({ role, tiles }, n) => role === roles[n] && tiles.length === legs[0]?.cells[n]?.length);
  if (!fits) throw new Error("the fields are not those that the route was prepared for");
}

class RouteWork {
  readonly #prepared: PreparedRoute;
  readonly #conditions: Conditions;
  readonly #flows: readonly Flow[];
  readonly #medium: Flow | null;
  readonly #wind: Flow | null;
  readonly #step: Step;
  readonly #samples = new Samples();
  readonly #legs: LegEstimate[] = [];
  readonly #findings: Finding[] = [];
  #elapsed = 0;
  #timeBound = 0;
  #used = 0;
  #lastLegRate: number | null = null;
  #reached: Reached | null = null;

  constructor(prepared: PreparedRoute, conditions: Conditions) {
    this.#prepared = prepared;
    this.#conditions = conditions;
    this.#flows = conditions.fields.map((field) => makeFlow(field, conditions.departure));
    const role = mediumRole(conditions.craft);
    this.#medium = this.#flows.find(({ field }) => field.role === role) ?? null;
    this.#wind = this.#flows.find(({ field }) => field.role === "wind") ?? null;
    this.#step = makeStep(makeStations(), this.#motionOn(prepared.legs[0] as PreparedLeg));
  }

  addLeg(leg: NumberedLeg, index: number): void {
    const { prepared } = leg;
    const { craft } = this.#conditions;
    const motion = this.#motionOn(prepared);
    const pace = this.#paceOn(prepared);
    const still = this.#stillOn(leg, motion);
    const terms: LegTerms = {
      pace,
      still,
      roles: this.#prepared.roles,
      medium: this.#medium?.field.role ?? null,
    };
    if (this.#reached !== null) {
      this.#legs.push(legEstimate(leg.number, prepared, terms, null));
      return;
    }
    this.#setOut(prepared, index, motion);
    const middle = prepared.track.at(prepared.track.length / 2).course * (Math.PI / 180);
    const sums = makeLegSums(Math.sin(middle), Math.cos(middle));
    const watch = new LegWatch(craft);
    const stop = this.#runUnderWay(leg, sums, watch);
    watch.close(stop?.at ?? prepared.track.length);
    const stay = stop === null ? this.#stayAt(prepared, sums) : null;
    this.#reportLand(leg, stop?.at ?? prepared.track.length);
    this.#report(leg, watch, stay, stop, this.#elapsed + sums.time);
    if (stop !== null) {
      this.#stopAt(leg, sums, stop);
    } else if (stay !== null && stay.failure !== null) {
      this.#stopStaying(leg, sums, stay);
    }
    const outcome = this.#reached === null && stay !== null ? this.#outcome(leg, sums, stay) : null;
    this.#legs.push(legEstimate(leg.number, prepared, terms, outcome));
    if (outcome !== null) this.#arrive(prepared, outcome);
  }

  #paceOn(leg: PreparedLeg): Pace {
    const { pace } = this.#conditions;
    const speed = leg.to.speed_m_s;
    if (speed === null || pace.hold === "power" || pace.hold === "least-energy") return pace;
    return { hold: pace.hold, speed_m_s: speed };
  }

  #motionOn(leg: PreparedLeg): Motion {
    const lowest = this.#lowestLevel();
    const from = leg.heights.from ?? lowest;
    const to = leg.heights.to ?? lowest;
    return makeMotion(
      this.#conditions.craft,
      this.#paceOn(leg),
      this.#wind !== null,
      (to - from) / leg.track.length,
    );
  }

  /** Where a waypoint without any height is, m above the surface. */
  #lowestLevel(): number {
    const levels = this.#medium?.field.tiles.map(({ height }) => height?.[0] ?? 0) ?? [0];
    return Math.min(...levels);
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

  #setOut(leg: PreparedLeg, index: number, motion: Motion): void {
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
    if (index === 0) step.lastGroundSpeed = stillMotion(motion)?.groundSpeed ?? 1;
  }

  #legRun(leg: PreparedLeg, alongOnly: boolean): LegRun {
    this.#step.alongOnly = alongOnly;
    return { curve: leg.curve, panels: leg.panels, flows: this.#flows, step: this.#step };
  }

  #runUnderWay({ number, prepared }: NumberedLeg, sums: LegSums, watch: LegWatch): Stop | null {
    const run = this.#legRun(prepared, false);
    const account = accountInto(run, sums, watch);
    return runLeg(run, this.#elapsed, (from, to, start, panel) => {
      if (from === 0) this.#samples.add(number, this.#step, START_STATION, this.#elapsed, this.#used);
      account(from, to, start, panel);
      this.#samples.add(number, this.#step, END_STATION, this.#elapsed + sums.time, this.#used + sums.use);
    });
  }

  /** Time of the leg with the medium's cross-track component at zero; `null` where that run stops on the way. */
  #alongOnlyTime(leg: PreparedLeg, sums: LegSums): number | null {
    if (this.#medium === null || this.#step.motion.groundSpeedFixed) return sums.time;
    let time = 0;
    const stop = runLeg(this.#legRun(leg, true), this.#elapsed, () => {
      time += this.#step.time;
    });
    return stop === null ? time : null;
  }

  #stayAt(leg: PreparedLeg, sums: LegSums): Stay {
    const { craft } = this.#conditions;
    const seconds = leg.to.stay_s;
    const wind = this.#wind;
    if (seconds === 0 || craft.moves === "water" || wind === null) return plainStay(craft, seconds);
    return hover(craft, wind, leg, this.#step.stations, this.#elapsed + sums.time, seconds);
  }

  /** One hint a leg: from the first stretch over land to the last that the route reaches. */
  #reportLand(leg: NumberedLeg, reached: number): void {
    const met = leg.prepared.land.filter(({ from_m }) => from_m <= reached);
    const first = met[0];
    const last = met[met.length - 1];
    if (first === undefined || last === undefined) return;
    this.#findings.push(legFinding("crosses-land", leg, first.from_m, last.to_m, landText(met)));
  }

  #report(leg: NumberedLeg, watch: LegWatch, stay: Stay | null, stop: Stop | null, time: number): void {
    const { craft, departure } = this.#conditions;
    const length = leg.prepared.track.length;
    if (stay !== null && stay.maxWind > 0) watch.whileStaying(stay.maxWind, length);
    watch.close(stop?.at ?? length);
    for (const watched of watch.found()) {
      const { from, to } = watched.stretch;
      this.#findings.push(legFinding(watched.code, leg, from, to, watchedText(watched, craft)));
    }
    if (watch.gustUnknown && craft.limits.gust_m_s !== null)
      this.#findings.push(
        legFinding(
          "no-field",
          leg,
          0,
          length,
          "the wind has no gusts here, so that the craft's gust limit is not checked",
        ),
      );
    if (stay !== null) this.#reportStay(leg, stay);
    if (stop !== null) {
      const role = stop.role;
      const moment = departure + 1000 * time;
      this.#findings.push(
        legFinding(
          stop.code,
          leg,
          stop.at,
          stop.at,
          stopText(stop.code, role, stop, moment, this.#validity(role)),
        ),
      );
    }
  }

  /** What a stay rests on that is not real data, unless the leg before it says so already. */
  #reportStay(leg: NumberedLeg, { edges }: Stay): void {
    const length = leg.prepared.track.length;
    for (const [used, code, what] of [
      [edges.held, "held-beyond", "the wind ends before the stay does; its last values are held"],
      [
        edges.filled,
        "gap-filled",
        "the wind has missing values where the craft stays, filled by the plan's gap policy",
      ],
      [edges.zero, "zero-outside", "the craft stays outside the wind's area; taken as no wind"],
    ] as const) {
      const told = this.#findings.some((finding) => finding.code === code && finding.leg === leg.number);
      if (used && !told) this.#findings.push(legFinding(code, leg, length, length, what));
    }
  }

  #validity(role: Field["role"] | null): string {
    const times = this.#conditions.fields
      .filter((field) => field.role === role)
      .flatMap((field) => field.tiles.flatMap((tile) => (tile.times === null ? [] : Array.from(tile.times))));
    if (times.length === 0) return "";
    return `the ${role} is valid from ${momentText(Math.min(...times))} to ${momentText(Math.max(...times))}`;
  }

  #stopAt({ number }: NumberedLeg, sums: LegSums, stop: Stop): void {
    this.#reached = {
      leg: number,
      at_m: stop.at,
      time_s: this.#elapsed + sums.time,
      use: this.#used + sums.use,
    };
  }

  #stopStaying(leg: NumberedLeg, sums: LegSums, stay: Stay): void {
    const failure = stay.failure as NonNullable<Stay["failure"]>;
    const length = leg.prepared.track.length;
    const moment = this.#conditions.departure + 1000 * failure.time;
    const held = { along: 0, cross: 0, throughSpeed: failure.windSpeed };
    this.#findings.push(
      legFinding(
        failure.code,
        leg,
        length,
        length,
        stopText(failure.code, "wind", held, moment, this.#validity("wind")),
      ),
    );
    this.#reached = {
      leg: leg.number,
      at_m: length,
      time_s: failure.time,
      use: this.#used + sums.use + stay.use,
    };
  }

  #outcome(leg: NumberedLeg, sums: LegSums, stay: Stay): LegOutcome {
    const { craft, departure } = this.#conditions;
    const { prepared } = leg;
    const moment = departure + 1000 * this.#elapsed;
    const variation = magneticVariation(prepared.from, prepared.heights.from ?? this.#lowestLevel(), moment);
    if (variation === null && !this.#findings.some(({ code }) => code === "no-variation"))
      this.#findings.push(
        routeFinding(
          "no-variation",
          `the magnetic model has no date ${momentText(moment)}; magnetic courses are left empty`,
        ),
      );
    return {
      sums,
      stayUse: stay.use,
      stayUseBound: stay.useBound,
      alongOnlyTime: this.#alongOnlyTime(prepared, sums),
      departureBound: this.#timeBound,
      departure: moment,
      variation,
      remaining: craft.store.usable - (this.#used + sums.use + stay.use),
    };
  }

  #arrive(leg: PreparedLeg, outcome: LegOutcome): void {
    const { sums } = outcome;
    this.#timeBound = this.#timeBound * (1 + sums.growth) + sums.timeBound;
    this.#elapsed += sums.time + leg.to.stay_s;
    this.#used += sums.use + outcome.stayUse;
    this.#lastLegRate = sums.use / sums.time;
    if (leg.to.stay_s > 0) this.#samples.addStay(this.#elapsed, this.#used, outcome.stayUse / leg.to.stay_s);
  }

  result(): RouteRun {
    const { craft, departure, reserve } = this.#conditions;
    const { route, legs } = this.#prepared;
    const complete = this.#reached === null;
    const kept = reserveAmount(reserve, craft, complete ? this.#lastLegRate : null);
    const numbered = legs.map((prepared, index) => ({ number: index + 1, prepared }));
    const left = complete ? craft.store.usable - this.#used : null;
    const findings = inOrder([
      ...this.#findings,
      ...storeFindings(this.#samples, numbered, craft, kept, left),
    ]);
    const last = this.#legs[this.#legs.length - 1] as LegEstimate;
    const legStarts = legs.map((_, n) => legs.slice(0, n).reduce((sum, { track }) => sum + track.length, 0));
    const estimate: RouteEstimate = {
      name: route.name,
      status: statusOf(findings),
      departure: isoTime(departure),
      arrival: last.arrival,
      storeUnit: craft.store.unit,
      usable: craft.store.usable,
      reserve: kept,
      ...(this.#reached === null ? {} : { reached: this.#reached }),
      totals: routeTotals(this.#legs, complete, this.#timeBound, craft.store.usable - this.#used),
      legs: this.#legs,
      findings,
    };
    return { estimate, profile: this.#samples.profile(legStarts, craft.store.usable) };
  }
}

/** Notes of the whole route first, then along the route. */
function inOrder(findings: readonly Finding[]): Finding[] {
  return [...findings].sort((a, b) => (a.leg ?? 0) - (b.leg ?? 0) || (a.at_m ?? 0) - (b.at_m ?? 0));
}
