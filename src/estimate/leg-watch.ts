import type { Craft } from "../craft/craft.ts";
import type { FieldRole, Tile } from "../field/field.ts";
import { type Flow, gustAt } from "./flow.ts";
import { STATIONS } from "./gauss-kronrod.ts";
import type { FindingCode } from "./result.ts";
import type { Step } from "./step.ts";
import { closeStretch, cover, feed, makeStretch, type Stretch } from "./stretch.ts";

/** A stretch of a leg on which something holds that the estimate wants read. */
export interface Watched {
  readonly code: FindingCode;
  /** The field that it is about, `null` where it is about none. */
  readonly role: FieldRole | null;
  readonly stretch: Stretch;
}

/** cos 60°: the wind blows within 60° of dead against the set of the current (common practice). */
const OPPOSED_COSINE = 0.5;

/** Watches one leg for the findings that come from fields and speeds along it. */
export class LegWatch {
  readonly #craft: Craft;
  readonly #wind = makeStretch();
  readonly #gust = makeStretch();
  readonly #slow = makeStretch();
  readonly #stems = makeStretch();
  readonly #opposed = makeStretch();
  readonly #polar = makeStretch();
  readonly #edges = { wind: edgeStretches(), current: edgeStretches() };
  /** Whether some of the leg had no gusts to hold against the craft's limit. */
  gustUnknown = false;

  constructor(craft: Craft) {
    this.#craft = craft;
  }

  /** Reads the spans on which data were filled, held or set to zero, and latitude beyond 85°. */
  overSpan(flows: readonly Flow[], polar: boolean, from: number, to: number): void {
    if (polar) cover(this.#polar, from, to);
    for (const flow of flows) {
      const edges = this.#edges[flow.field.role];
      if (flow.filled) cover(edges.filled, from, to);
      if (flow.held) cover(edges.held, from, to);
      if (flow.state === "zero") cover(edges.zero, from, to);
      if (flow.beyondLevels) cover(edges.height, from, to);
    }
  }

  /** Reads speeds and fields at the stations of an accepted step that started at `start` seconds. */
  atStations(step: Step, flows: readonly Flow[], start: number): void {
    const { groundSpeed_m_s, wind_m_s, gust_m_s } = this.#craft.limits;
    const wind = flowOf(flows, "wind");
    const current = this.#craft.moves === "water" ? flowOf(flows, "current") : null;
    const stemming = step.motion.groundSpeedFixed;
    const windCounts = wind !== null && (wind_m_s !== null || current !== null);
    if (groundSpeed_m_s !== null || stemming || windCounts) {
      for (let i = 0; i < STATIONS; i += 1) {
        const s = step.stations.s[i] as number;
        const g = step.groundSpeed[i] as number;
        if (groundSpeed_m_s !== null) feed(this.#slow, s, groundSpeed_m_s - g, groundSpeed_m_s - g);
        if (stemming) feed(this.#stems, s, (step.along[i] as number) - g, step.along[i] as number);
        if (windCounts) this.#readWind(wind, current, i, s, start + (step.elapsed[i] as number));
      }
    }
    if (wind !== null && gust_m_s !== null) this.#readGusts(step, wind, start, gust_m_s);
  }

  #readWind(wind: Flow, current: Flow | null, i: number, s: number, time: number): void {
    const { wind_m_s, opposedWind_m_s, opposedCurrent_m_s } = this.#craft.limits;
    const windAlong = alongAt(wind, i, time);
    const windCross = crossAt(wind, i, time);
    const windSpeed = Math.sqrt(windAlong * windAlong + windCross * windCross);
    if (wind_m_s !== null) feed(this.#wind, s, above(windSpeed, wind_m_s), windSpeed);
    if (current === null) return;
    const along = alongAt(current, i, time);
    const cross = crossAt(current, i, time);
    const speed = Math.sqrt(along * along + cross * cross);
    const product = windSpeed * speed;
    const against = product > 0 ? -(windAlong * along + windCross * cross) / product : -1;
    const margin = Math.min(
      windSpeed / opposedWind_m_s - 1,
      speed / opposedCurrent_m_s - 1,
      against - OPPOSED_COSINE,
    );
    feed(this.#opposed, s, margin, windSpeed);
  }

  #readGusts(step: Step, wind: Flow, start: number, limit: number): void {
    const tile = wind.tile < 0 ? null : (wind.field.tiles[wind.tile] as Tile);
    if (tile === null || tile.gusts === null) {
      this.gustUnknown = this.gustUnknown || wind.state === "data";
      return;
    }
    for (let i = 0; i < STATIONS; i += 1) {
      const gust = gustAt(wind, i, start + (step.elapsed[i] as number), step.stations);
      if (Number.isNaN(gust)) this.gustUnknown = true;
      else feed(this.#gust, step.stations.s[i] as number, above(gust, limit), gust);
    }
  }

  /** Ends what is open at the leg's end, or where the route stopped. */
  close(place: number): void {
    for (const stretch of [this.#wind, this.#gust, this.#slow, this.#stems, this.#opposed])
      closeStretch(stretch, place);
  }

  /** Wind met while staying at the leg's end. */
  whileStaying(windSpeed: number, place: number): void {
    const limit = this.#craft.limits.wind_m_s;
    if (limit !== null) feed(this.#wind, place, above(windSpeed, limit), windSpeed);
  }

  /** Everything found, in the order of the contract's severities. */
  found(): Watched[] {
    const all: Watched[] = [
      { code: "wind-limit", role: "wind", stretch: this.#wind },
      { code: "gust-limit", role: "wind", stretch: this.#gust },
      ...this.#edgesOf("current"),
      ...this.#edgesOf("wind"),
      { code: "slow-over-ground", role: null, stretch: this.#slow },
      { code: "stems-flow", role: null, stretch: this.#stems },
      { code: "wind-against-current", role: null, stretch: this.#opposed },
      { code: "near-pole", role: null, stretch: this.#polar },
    ];
    return all.filter(({ stretch }) => stretch.from >= 0);
  }

  #edgesOf(role: FieldRole): Watched[] {
    const edges = this.#edges[role];
    return [
      { code: "gap-filled", role, stretch: edges.filled },
      { code: "held-beyond", role, stretch: edges.held },
      { code: "zero-outside", role, stretch: edges.zero },
      { code: "height-outside-field", role, stretch: edges.height },
    ];
  }
}

function flowOf(flows: readonly Flow[], role: FieldRole): Flow | null {
  for (const flow of flows) if (flow.field.role === role) return flow;
  return null;
}

/** How far a speed is above a limit, m/s; exactly at it, but for rounding, is not above. */
function above(speed: number, limit: number): number {
  return speed - limit * (1 + 1e-12);
}

function edgeStretches() {
  return { filled: makeStretch(), held: makeStretch(), zero: makeStretch(), height: makeStretch() };
}

function alongAt(flow: Flow, i: number, time: number): number {
  return (flow.along[i] as number) + (time - flow.from) * flow.perSecond * (flow.alongChange[i] as number);
}

function crossAt(flow: Flow, i: number, time: number): number {
  return (flow.cross[i] as number) + (time - flow.from) * flow.perSecond * (flow.crossChange[i] as number);
}
