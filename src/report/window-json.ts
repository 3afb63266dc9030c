import type { InTime } from "../choose/in-time.ts";
import type { RefinedWindow } from "../choose/refine.ts";
import type { RoutePaces } from "../choose/route-paces.ts";
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

function cell(value: WindowCell): WindowCell {
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
  };
}

function best(value: WindowBest): WindowBest {
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

function route(value: RouteSummary): RouteSummary {
  return {
    route: value.route,
    cells: value.cells,
    possible: value.possible,
    best: best(value.best),
    refused: value.refused.map(refusal),
  };
}

function refined(value: RefinedWindow): RefinedWindow {
  return {
    best: best(value.best),
    routes: value.routes.map(({ route: name, best: own }) => ({ route: name, best: best(own) })),
  };
}

function inTime({ notAfter, routes }: InTime): InTime {
  return {
    notAfter,
    routes: routes.map(({ route: name, speed_m_s, latest, earliest }) => ({
      route: name,
      speed_m_s,
      latest: latest && cell(latest),
      earliest: cell(earliest),
    })),
  };
}

function paces({ route: name, departure, leastUse, fastest }: RoutePaces): RoutePaces {
  return { route: name, departure, leastUse: leastUse && cell(leastUse), fastest: fastest && cell(fastest) };
}

const iso = (time: number): string => new Date(time).toISOString();

/**
 * A window of departures as `legwork-window/1`: SI units with the unit in the key, one cell a route × departure × speed in the
 * order departure, route, speed; keys in a fixed order, two spaces of indent, a final line end.
 *
 * @example
 * const report = { title: "Two marks", fields: [], craft: { name: "Tender", moves: "water", store: { unit: "J", usable: 36000000 } }, pace: { hold: "least-energy" }, arrive: null, window: { from: 0, to: 0, every_s: 60, speeds_m_s: null }, cells: [], summary: summariseWindow([]), refined: null, inTime: null, paces: null };
 * JSON.parse(writeWindowJson(report)).format // → "legwork-window/1"
 */
export function writeWindowJson({ title, fields, craft, arrive, window, ...rest }: WindowReport): string {
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
    best: best(rest.summary.best),
    routes: rest.summary.routes.map(route),
    ...(rest.refined === null ? {} : { refined: refined(rest.refined) }),
    ...(rest.inTime === null ? {} : { inTime: inTime(rest.inTime) }),
    ...(rest.paces === null ? {} : { paces: rest.paces.map(paces) }),
    cells: rest.cells.map(cell),
  };
  return `${JSON.stringify(whole, refuseNotFinite, 2)}\n`;
}
