import type { Field } from "../field/field.ts";
import { type Passage, SmoothFleet } from "./smooth-fleet.ts";

/** A smooth step taken. */
interface StepTaken {
  /** Metres from the leg's start. */
  readonly to: number;
  /** s */
  readonly time: number;
  /** The valid time before, from which on its slices hold, s since departure. */
  readonly since: number;
}

/** One craft that goes along a leg by smooth steps where they serve: a fleet of one. */
export class SmoothLeg {
  readonly #fleet: SmoothFleet;
  #taken: StepTaken[] = [];

  /**
   * @param departure ms since 1970
   * @param every_s step of the departures that are compared, s; `null` for none
   */
  constructor(field: Field, departure: number, every_s: number | null, alongOnly: boolean) {
    const taken = (_n: number, to: number, time: number, since: number) => {
      this.#taken.push({ to, time, since });
    };
    this.#fleet = new SmoothFleet(field, [departure], every_s, { alongOnly, taken });
  }

  /** The last valid time met, s since departure: the clock may be a little short of it. */
  get met(): number {
    return this.#fleet.log.met[0] as number;
  }

  setOut(passage: Passage): void {
    this.#fleet.setOut(passage);
  }

  /**
   * Goes over a panel as far as smooth steps lead.
   *
   * @param start s since departure at the leg's start
   * @param elapsed s since then
   */
  cross(panel: number, start: number, elapsed: number, met: number): readonly StepTaken[] {
    const fleet = this.#fleet;
    this.#taken = [];
    fleet.log.put(0, start, elapsed, met);
    fleet.cross(panel);
    return this.#taken;
  }
}
