import type { Craft, Pace } from "../craft/craft.ts";
import { InputError } from "../errors.ts";
import type { EstimateInput } from "../estimate/estimate.ts";
import { speedText } from "../estimate/finding-text.ts";
import { fieldsInUse, type PreparedRoute } from "../estimate/prepare.ts";
import { routeOutcomes } from "../estimate/route-outcomes.ts";
import { arrivalCell } from "./arrival-cell.ts";
import { arrivalTestsAt } from "./arrival-trials.ts";
import type { ArrivalWindow } from "./arrival-window.ts";
import { checkWindow, type DepartureWindow, windowDepartures } from "./departure-window.ts";
import type { Sweep } from "./sweep.ts";
import type { UncertaintyAsked } from "./uncertain-estimate.ts";
import { cellOf, paceAt, type WindowCell, windowCell } from "./window-cell.ts";

/**
 * What a window of departures is worked out for, from what an estimate rests on; the fields that do not act on the craft are left out.
 *
 * @param prepared by `prepareRoutes`, from the same input
 * @param arrive the arrival that the pace asks for; `null`, where its pace says how fast, unless given
 * @param asked what the speeds found for a span of times have to hold in, where one does; left out, nothing
 *
 * @example
 * const craft = readCraft('{ "name": "Boat", "moves": "water", "power": { "model": "cube", "reference": { "speed": "5 m/s", "power": "20 kW" } }, "speeds": { "min": "2 m/s", "max": "8 m/s" }, "store": { "capacity": "100 kWh" } }', "boat.craft.json");
 * const waypoint = (name, lon) => ({ name, lat: 0, lon, path: "rhumb", speed_m_s: null, height_m: null, stay_s: 0 });
 * const routes = [{ name: "East", waypoints: [waypoint("A", 0), waypoint("B", 1)] }];
 * const input = { title: "", departure: 0, craft, pace: { hold: "through-speed", speed_m_s: 5 }, reserve: null, fields: [], routes, land: null };
 * makeSweep(prepareRoutes(input), input).prepared.length // → 1
 */
export function makeSweep(
  prepared: readonly PreparedRoute[],
  { craft, departure, pace, reserve, fields }: EstimateInput,
  arrive: ArrivalWindow | null = null,
  asked: UncertaintyAsked | null = null,
): Sweep {
  const conditions = { departure, craft, pace, reserve, fields: fieldsInUse(craft, fields) };
  const sweep = { prepared, conditions, arrive };
  return { ...sweep, testsAt: asked && arrivalTestsAt(sweep, asked) };
}

/**
 * Every route × departure × speed, one by one in the order departure, route, speed: ask for as many as are wanted; they are worked
 * out 256 departures at a time. Each equals a lone estimate to the last bit.
 *
 * A speed takes the place of the pace's speed; a leg that names its own keeps it. Where the pace asks for an arrival and
 * the window names no speeds, each cell is at the speed found for it, as `estimateArriving` is.
 *
 * @throws InputError for a window that {@link checkWindow} refuses, speeds beside a pace that holds none, or a speed
 *   outside the craft's power model
 *
 * @example
 * const craft = readCraft('{ "name": "Boat", "moves": "water", "power": { "model": "cube", "reference": { "speed": "5 m/s", "power": "20 kW" } }, "speeds": { "min": "2 m/s", "max": "8 m/s" }, "store": { "capacity": "100 kWh" } }', "boat.craft.json");
 * const waypoint = (name, lon) => ({ name, lat: 0, lon, path: "rhumb", speed_m_s: null, height_m: null, stay_s: 0 });
 * const routes = [{ name: "East", waypoints: [waypoint("A", 0), waypoint("B", 1)] }];
 * const input = { title: "", departure: 0, craft, pace: { hold: "through-speed", speed_m_s: 5 }, reserve: null, fields: [], routes, land: null };
 * const sweep = makeSweep(prepareRoutes(input), input);
 * const window = { from: 0, to: 3600000, every_s: 1800, speeds_m_s: [4, 5] };
 * [...windowCells(sweep, window)].length // → 6
 */
export function windowCells(sweep: Sweep, window: DepartureWindow): Generator<WindowCell, void, undefined> {
  checkWindow(window, sweep.prepared.length);
  checkSpeeds(sweep, window.speeds_m_s);
  return cells(sweep, window);
}

/** Departures that are worked out together: enough to share what depends on the place alone, and few to wait for. */
const TOGETHER = 256;

function* cells(sweep: Sweep, window: DepartureWindow): Generator<WindowCell, void, undefined> {
  const speeds = window.speeds_m_s ?? [null];
  const departures = windowDepartures(window);
  for (let first = 0; first < departures.length; first += TOGETHER) {
    const some = departures.slice(first, first + TOGETHER);
    const columns = sweep.prepared.flatMap((prepared) =>
      speeds.map((speed) => sweepCells(sweep, prepared, some, speed)),
    );
    for (let n = 0; n < some.length; n += 1) for (const column of columns) yield column[n] as WindowCell;
  }
}

/**
 * One cell of a sweep; `speed` in m/s, `null` for the plan's own pace.
 *
 * @example
 * const craft = readCraft('{ "name": "Boat", "moves": "water", "power": { "model": "cube", "reference": { "speed": "5 m/s", "power": "20 kW" } }, "speeds": { "min": "2 m/s", "max": "8 m/s" }, "store": { "capacity": "100 kWh" } }', "boat.craft.json");
 * const waypoint = (name, lon) => ({ name, lat: 0, lon, path: "rhumb", speed_m_s: null, height_m: null, stay_s: 0 });
 * const routes = [{ name: "East", waypoints: [waypoint("A", 0), waypoint("B", 1)] }];
 * const input = { title: "", departure: 0, craft, pace: { hold: "through-speed", speed_m_s: 5 }, reserve: null, fields: [], routes, land: null };
 * const sweep = makeSweep(prepareRoutes(input), input);
 * sweepCell(sweep, sweep.prepared[0], 0, null).passage_s.toFixed(3) // → "22263.898"
 */
export function sweepCell(
  { conditions, arrive, testsAt }: Sweep,
  prepared: PreparedRoute,
  departure: number,
  speed: number | null,
): WindowCell {
  if (arrive !== null && speed === null)
    return arrivalCell(prepared, { ...conditions, departure }, arrive, testsAt);
  return windowCell(prepared, conditions, departure, speed);
}

/**
 * The cells of a route at one speed and several departures, each as {@link sweepCell} has it, in a part of the time.
 *
 * @param departures ms since 1970-01-01T00:00Z
 * @param speed m/s, `null` for the plan's own pace
 *
 * @example
 * const craft = readCraft('{ "name": "Boat", "moves": "water", "power": { "model": "cube", "reference": { "speed": "5 m/s", "power": "20 kW" } }, "speeds": { "min": "2 m/s", "max": "8 m/s" }, "store": { "capacity": "100 kWh" } }', "boat.craft.json");
 * const waypoint = (name, lon) => ({ name, lat: 0, lon, path: "rhumb", speed_m_s: null, height_m: null, stay_s: 0 });
 * const routes = [{ name: "East", waypoints: [waypoint("A", 0), waypoint("B", 1)] }];
 * const input = { title: "", departure: 0, craft, pace: { hold: "through-speed", speed_m_s: 5 }, reserve: null, fields: [], routes, land: null };
 * const sweep = makeSweep(prepareRoutes(input), input);
 * sweepCells(sweep, sweep.prepared[0], [0, 3600000], null).map(({ arrival }) => arrival.slice(0, 16)) // → ["1970-01-01T06:11", "1970-01-01T07:11"]
 */
export function sweepCells(
  sweep: Sweep,
  prepared: PreparedRoute,
  departures: readonly number[],
  speed: number | null,
): WindowCell[] {
  if (sweep.arrive !== null && speed === null)
    return departures.map((departure) => sweepCell(sweep, prepared, departure, speed));
  const { conditions } = sweep;
  const pace = paceAt(conditions.pace, speed);
  return routeOutcomes(prepared, { ...conditions, pace }, departures).map((outcome, n) =>
    cellOf(prepared, departures[n] as number, speed, outcome),
  );
}

function checkSpeeds({ conditions }: Sweep, speeds: readonly number[] | null): void {
  for (const speed of speeds ?? []) checkSpeed(conditions.craft, conditions.pace, speed);
}

/** @throws InputError where a window does not try a speed: the pace chooses its own, or the craft's power model lacks it */
export function checkSpeed({ power, name }: Craft, pace: Pace, speed: number): void {
  const { hold } = paceAt(pace, speed);
  if (!(speed > 0) || (hold === "through-speed" && !(speed >= power.min && speed <= power.max)))
    throw new InputError(
      `a speed of a window lies within the power model of ${name}, ${speedText(power.min)} to ${speedText(power.max)}; found ${speedText(speed)}`,
    );
}
