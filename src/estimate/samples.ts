import { STATIONS } from "./gauss-kronrod.ts";
import type { Profile } from "./result.ts";
import type { Step } from "./step.ts";

/** Figures kept at the start of every leg and the end of every step and stay, in order along the route. */
export class Samples {
  readonly leg: number[] = [];
  /** Metres from the leg's start. */
  readonly place: number[] = [];
  readonly time: number[] = [];
  /** Spent since the route's departure, store units. */
  readonly use: number[] = [];
  /** Use per metre just before the sample; on the sample of a leg's start, just after. */
  readonly usePerMetre: number[] = [];
  /** Use per metre just after the sample before this one: the slope at the start of the step that ends here. */
  readonly usePerMetreBefore: number[] = [];
  readonly #full: boolean;
  readonly #lat: number[] = [];
  readonly #lon: number[] = [];
  readonly #along: number[] = [];
  readonly #cross: number[] = [];
  readonly #groundSpeed: number[] = [];
  readonly #throughSpeed: number[] = [];
  readonly #rate: number[] = [];

  /** @param full whether a profile is wanted, or time and use alone */
  constructor(full: boolean) {
    this.#full = full;
  }

  /** Keeps what holds at a station (0 or the last) of the step just solved. */
  add(leg: number, step: Step, station: number, time: number, use: number): void {
    const slope = (i: number) => (step.rate[i] as number) / (step.groundSpeed[i] as number);
    this.leg.push(leg);
    this.place.push(step.stations.s[station] as number);
    this.time.push(time);
    this.use.push(use);
    this.usePerMetre.push(slope(station));
    this.usePerMetreBefore.push(slope(0));
    if (!this.#full) return;
    this.#lat.push(step.stations.lat[station] as number);
    this.#lon.push(step.stations.lon[station] as number);
    this.#along.push(step.along[station] as number);
    this.#cross.push(step.cross[station] as number);
    this.#groundSpeed.push(step.groundSpeed[station] as number);
    this.#throughSpeed.push(step.throughSpeed[station] as number);
    this.#rate.push(step.rate[station] as number);
  }

  /** Keeps the end of a stay: the last place again, later and with more spent. */
  addStay(time: number, use: number, rate: number): void {
    const last = this.leg.length - 1;
    this.leg.push(this.leg[last] as number);
    this.place.push(this.place[last] as number);
    this.time.push(time);
    this.use.push(use);
    this.usePerMetre.push(0);
    this.usePerMetreBefore.push(0);
    if (!this.#full) return;
    for (const list of [this.#lat, this.#lon, this.#along, this.#cross]) list.push(list[last] as number);
    this.#groundSpeed.push(0);
    this.#throughSpeed.push(this.#throughSpeed[last] as number);
    this.#rate.push(rate);
  }

  /** @param legStarts metres from the route's start to each leg's, index 0 for leg 1 */
  profile(legStarts: readonly number[], usable: number): Profile {
    return {
      leg: Int32Array.from(this.leg),
      distance_m: Float64Array.from(
        this.place,
        (s, n) => (legStarts[(this.leg[n] as number) - 1] as number) + s,
      ),
      time_s: Float64Array.from(this.time),
      lat: Float64Array.from(this.#lat),
      lon: Float64Array.from(this.#lon),
      along_m_s: Float64Array.from(this.#along),
      cross_m_s: Float64Array.from(this.#cross),
      groundSpeed_m_s: Float64Array.from(this.#groundSpeed),
      throughSpeed_m_s: Float64Array.from(this.#throughSpeed),
      usePerSecond: Float64Array.from(this.#rate),
      remaining: Float64Array.from(this.use, (use) => usable - use),
    };
  }
}

export const START_STATION = 0;
export const END_STATION = STATIONS - 1;

/** Where spending first passes an amount: the leg and the metres from its start; `null` where it never does. */
export function placeOfUse(
  samples: Samples,
  amount: number,
): { readonly leg: number; readonly at: number } | null {
  const { use, leg, place } = samples;
  const after = use.findIndex((spent) => spent > amount);
  if (after < 0) return null;
  const at = place[after] as number;
  const from = place[after - 1];
  if (after === 0 || from === undefined || leg[after - 1] !== leg[after] || from === at)
    return { leg: leg[after] as number, at };
  const share = hermiteRoot(
    (use[after - 1] as number) - amount,
    (use[after] as number) - amount,
    (samples.usePerMetreBefore[after] as number) * (at - from),
    (samples.usePerMetre[after] as number) * (at - from),
  );
  return { leg: leg[after] as number, at: from + share * (at - from) };
}

/** The share 0..1 where the cubic with end values a <= 0 < b and end slopes da, db is zero, by bisection. */
function hermiteRoot(a: number, b: number, da: number, db: number): number {
  let low = 0;
  let high = 1;
  for (let step = 0; step < 50; step += 1) {
    const x = (low + high) / 2;
    const y = 1 - x;
    const value = a * (1 + 2 * x) * y * y + da * x * y * y + b * x * x * (3 - 2 * x) - db * x * x * y;
    if (value > 0) high = x;
    else low = x;
  }
  return (low + high) / 2;
}
