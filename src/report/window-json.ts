import type { InTime } from "../choose/in-time.ts";
import type { PaceBound } from "../choose/pace-bound.ts";
import type { RefinedWindow } from "../choose/refine.ts";
import type { RoutePaces } from "../choose/route-paces.ts";
import type { BestPair, Sure, SureBest, SureCell } from "../choose/sure.ts";
import type { SurePaces } from "../choose/sure-paces.ts";
import type { SureRoutes, SureWindow } from "../choose/sure-window.ts";
import type { CellFinding, WindowCell } from "../choose/window-cell.ts";
import type { Refusal, RouteSummary, WindowBest } from "../choose/window-summary.ts";
import { ADVISORY } from "../constants.ts";
import { fieldJson, refuseNotFinite } from "./json.ts";
import type { WindowReport } from "./window-input.ts";

/* Keys are written out one by one, as in `json.ts`. */

function finding(value: CellFinding | null): CellFinding | null {
  return (
    value && {
      code: value.code,
      severity: value.severity,
      leg: value.leg,
      at_m: value.at_m,
      message: value.message,
    }
  );
}

function sure(value: Sure): Sure {
  const { decidedBy, ensemble } = value;
  return {
    status: value.status,
    decidedBy: {
      member: decidedBy.member,
      whatIf: decidedBy.whatIf,
      ...(decidedBy.error === undefined ? {} : { error: decidedBy.error }),
    },
    worst: finding(value.worst),
    asBad: value.asBad,
    ensemble: ensemble && {
      members: ensemble.members,
      reserveHolds: ensemble.reserveHolds,
      breaksReserve: ensemble.breaksReserve,
      doesNotArrive: ensemble.doesNotArrive,
    },
    reserveHolds: value.reserveHolds,
  };
}

/** A cell that was put to the test says so. */
function cell(value: WindowCell | SureCell): WindowCell | SureCell {
  return {
    route: value.route,
    departure: value.departure,
    speed_m_s: value.speed_m_s,
    arrival: value.arrival,
    time_s: value.time_s,
    passage_s: value.passage_s,
    use: value.use,
    remaining: value.remaining,
    reserve: value.reserve,
    status: value.status,
    worst: finding(value.worst),
    ...("sure" in value ? { sure: sure(value.sure) } : {}),
  };
}

function best(value: WindowBest | SureBest): WindowBest {
  return {
    time: value.time && cell(value.time),
    use: value.use && cell(value.use),
    latest: value.latest && cell(value.latest),
    closedBy: finding(value.closedBy),
  };
}

function refusal(value: Refusal): Refusal {
  return {
    code: value.code,
    cells: value.cells,
    from: value.from,
    to: value.to,
    message: value.message,
  };
}

/** The bests by the plain estimate and, where they were put to the test, those that hold. */
function bests(plain: WindowBest, pair: BestPair | undefined) {
  return pair === undefined ? { best: best(plain) } : { best: best(pair.plain), sureBest: best(pair.sure) };
}

function route(value: RouteSummary, pair: BestPair | undefined) {
  return {
    route: value.route,
    cells: value.cells,
    possible: value.possible,
    ...bests(value.best, pair),
    refused: value.refused.map(refusal),
  };
}

function refined(value: RefinedWindow, tested: SureRoutes | null) {
  return {
    ...bests(value.best, tested?.best),
    routes: value.routes.map(({ route: name, best: own }, index) => ({
      route: name,
      ...bests(own, tested?.routes[index]),
    })),
  };
}

function inTime({ notAfter, routes }: InTime, tested: SureWindow["inTime"]) {
  return {
    notAfter,
    routes: routes.map(({ route: name, speed_m_s, latest, earliest }, index) => {
      const own = tested?.[index];
      const plain = own?.plain ?? latest;
      return {
        route: name,
        speed_m_s,
        latest: plain && cell(plain),
        ...(own === undefined ? {} : { sureLatest: own.sure && cell(own.sure) }),
        earliest: cell(earliest),
      };
    }),
  };
}

function bound(value: PaceBound | null): PaceBound | null {
  return value && { beyond: value.beyond, stop: finding(value.stop) };
}

function paces({ leastUse, fastest, ...own }: RoutePaces, tested: SurePaces | undefined) {
  const least = tested?.leastUse ?? leastUse;
  const quickest = tested?.fastest ?? fastest;
  return {
    route: own.route,
    departure: own.departure,
    leastUse: least && cell(least),
    leastUseBound: bound(own.leastUseBound),
    fastest: quickest && cell(quickest),
    fastestBound: bound(own.fastestBound),
    ...(tested === undefined ? {} : { sureFastest: tested.sureFastest && cell(tested.sureFastest) }),
  };
}

function tried({ members, whatIfs, confidence }: SureWindow) {
  return { members, whatIfs, ...(confidence === undefined ? {} : { confidence }) };
}

const iso = (time: number): string => new Date(time).toISOString();

/**
 * A window of departures as `legwork-window/1`: SI units with the unit in the key, one cell a route × departure × speed in the
 * order departure, route, speed; keys in a fixed order, two spaces of indent, a final line end. Where the plan names members, what-ifs or a
 * stated error, a best carries `sure`, and `sureBest` beside `best` are those that hold in all of them.
 *
 * @example
 * const report = { title: "Two marks", fields: [], craft: { name: "Tender", moves: "water", store: { unit: "J", usable: 36000000 } }, pace: { hold: "least-energy" }, arrive: null, window: { from: 0, to: 0, every_s: 60, speeds_m_s: null }, cells: [], summary: summariseWindow([]), refined: null, inTime: null, paces: null };
 * JSON.parse(writeWindowJson(report)).format // → "legwork-window/1"
 */
export function writeWindowJson({ title, fields, craft, arrive, window, ...rest }: WindowReport): string {
  const tested = rest.sure ?? null;
  const whole = {
    format: "legwork-window/1",
    advisory: ADVISORY,
    plan: { title },
    fields: fields.map(fieldJson),
    window: {
      from: iso(window.from),
      to: iso(window.to),
      every_s: window.every_s,
      speeds_m_s: window.speeds_m_s,
    },
    arrive:
      arrive === null
        ? null
        : {
            notBefore: arrive.notBefore === null ? null : iso(arrive.notBefore),
            notAfter: iso(arrive.notAfter),
          },
    storeUnit: craft.store.unit,
    usable: craft.store.usable,
    possible: rest.summary.possible,
    ...(tested === null ? {} : { tried: tried(tested) }),
    ...bests(rest.summary.best, tested?.best),
    routes: rest.summary.routes.map((each) =>
      route(
        each,
        tested?.routes.find((own) => own.route === each.route),
      ),
    ),
    ...(rest.refined === null ? {} : { refined: refined(rest.refined, tested?.refined ?? null) }),
    ...(rest.inTime === null ? {} : { inTime: inTime(rest.inTime, tested?.inTime ?? null) }),
    ...(rest.paces === null
      ? {}
      : { paces: rest.paces.map((each, index) => paces(each, tested?.paces?.[index])) }),
    cells: rest.cells.map(cell),
  };
  return `${JSON.stringify(whole, refuseNotFinite, 2)}\n`;
}
