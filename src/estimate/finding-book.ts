import type { Craft } from "../craft/craft.ts";
import type { Field, FieldRole } from "../field/field.ts";
import { minuteText, momentText } from "./finding-text.ts";
import { landText, legFinding, type NumberedLeg, routeFinding, stopText, watchedText } from "./findings.ts";
import type { Stay } from "./hover.ts";
import type { Stop } from "./leg-run.ts";
import type { LegWatch } from "./leg-watch.ts";
import type { Finding, FindingCode } from "./result.ts";

/** Collects the findings of one route as its legs are run. */
export class FindingBook {
  readonly findings: Finding[] = [];
  readonly #craft: Craft;
  readonly #fields: readonly Field[];
  readonly #departure: number;

  /** @param departure ms since 1970 */
  constructor(craft: Craft, fields: readonly Field[], departure: number) {
    this.#craft = craft;
    this.#fields = fields;
    this.#departure = departure;
  }

  /** What was met on a leg up to `reached` metres from its start. */
  met(leg: NumberedLeg, watch: LegWatch, reached: number): void {
    this.#land(leg, reached);
    for (const watched of watch.found()) {
      const { from, to } = watched.stretch;
      this.findings.push(legFinding(watched.code, leg, from, to, watchedText(watched, this.#craft)));
    }
    if (watch.gustUnknown && this.#craft.limits.gust_m_s !== null) {
      const what = "the wind has no gusts here, so that the craft's gust limit is not checked";
      this.findings.push(legFinding("no-field", leg, 0, reached, what));
    }
  }

  /** One hint a leg: from the first stretch over land to the last that the route reaches. */
  #land(leg: NumberedLeg, reached: number): void {
    const met = leg.prepared.land.filter(({ from_m }) => from_m <= reached);
    const first = met[0];
    const last = met[met.length - 1];
    if (first === undefined || last === undefined) return;
    this.findings.push(legFinding("crosses-land", leg, first.from_m, last.to_m, landText(met)));
  }

  /** What a stay rests on that is not real data, unless the leg before it says so already. */
  stayed(leg: NumberedLeg, { edges }: Stay): void {
    const length = leg.prepared.track.length;
    const say = (code: FindingCode, what: string): void => {
      const told = this.findings.some((finding) => finding.code === code && finding.leg === leg.number);
      if (!told) this.findings.push(legFinding(code, leg, length, length, what));
    };
    if (edges.held) say("held-beyond", "the wind ends before the stay does; its last values are held");
    if (edges.filled)
      say("gap-filled", "the wind has missing values where the craft stays, filled by the plan's gap policy");
    if (edges.zero) say("zero-outside", "the craft stays outside the wind's area; taken as no wind");
  }

  /** Why the route stops on a leg, `time` seconds after its departure. */
  stopped(leg: NumberedLeg, stop: Stop, time: number): void {
    const { code, role, at } = stop;
    const moment = this.#departure + 1000 * time;
    this.findings.push(
      legFinding(code, leg, at, at, stopText(code, role, stop, moment, this.#validity(role, moment))),
    );
  }

  /** That the magnetic model has no such date, once a route. */
  withoutVariation(moment: number): void {
    if (this.findings.some(({ code }) => code === "no-variation")) return;
    const what = `the magnetic model has no date ${minuteText(moment)}; magnetic courses are left empty`;
    this.findings.push(routeFinding("no-variation", what));
  }

  #validity(role: FieldRole | null, moment: number): string {
    const tiles = this.#fields.filter((field) => field.role === role).flatMap((field) => field.tiles);
    const first = tiles.map(({ times }) => times?.[0] ?? Number.POSITIVE_INFINITY);
    const last = tiles.map(({ times }) => times?.[times.length - 1] ?? Number.NEGATIVE_INFINITY);
    if (!first.some(Number.isFinite)) return "";
    const end = Math.max(...last);
    // Under way the end is reached on the second that is printed for both.
    const beyond = momentText(moment) === momentText(end) ? " and not beyond" : "";
    return `the ${role} is valid from ${momentText(Math.min(...first))} to ${momentText(end)}${beyond}`;
  }
}

/** Findings of the whole route first, then along the route. */
export function inOrder(findings: readonly Finding[]): Finding[] {
  return [...findings].sort((a, b) => (a.leg ?? 0) - (b.leg ?? 0) || (a.at_m ?? 0) - (b.at_m ?? 0));
}
