import type { Conditions } from "../estimate/conditions.ts";
import type { PreparedRoute } from "../estimate/prepare.ts";
import type { Alternate } from "./alternate.ts";
import { requireClimb } from "./turn-back-climb.ts";
import { equalTimePoints } from "./turn-back-equal-time.ts";
import { Journeys } from "./turn-back-journey.ts";
import { anyLimit, nowhereStretches, reachStretches, turnLimit } from "./turn-back-reach.ts";
import type { GoalSeries, TurnBack, TurnBackSamples, TurnLimit } from "./turn-back-result.ts";
import { spotsAlong } from "./turn-back-spots.ts";
import { RouteWalk, type Spot } from "./turn-back-walk.ts";

/**
 * Turning back and turning off along a route: from every place of it, leaving at the moment of being there, the time and use to return
 * along the track to the start, to go on to the destination and to go straight (geodesic) to each alternate, at the
 * route's pace and without any stay; and, from what would be left above the reserve, how far along the route each is
 * reachable, where two are equally far in time, and where none is reachable.
 *
 * The way back takes each leg's own path and ordered speed; heights run linearly. A reserve of time is counted at the
 * final leg's rate of the journey at hand. Places with a margin of zero or equal times are roots of the true functions,
 * bracketed to a micrometre; edges of what is known or possible to a metre. They are looked for between samples: every waypoint,
 * before and after its stay, and at least 60 even places, closer where a figure comes near zero; what leaves no trace at
 * any of them is not seen.
 *
 * @param prepared the route on the fields in use
 * @throws InputError where the pace has no speed on the route even with every field at zero, or the way back climbs and the
 * craft's rotor model has no mass
 *
 * @example
 * const craft = readCraft('{ "name": "Boat", "moves": "water", "power": { "model": "constant", "rate": "1 kW" }, "store": { "capacity": "10 kWh" } }', "boat.craft.json");
 * const waypoint = (name, lon) => ({ name, lat: 0, lon, path: "rhumb", speed_m_s: null, height_m: null, stay_s: 0 });
 * const prepared = prepareRoute({ name: "East", waypoints: [waypoint("A", 0), waypoint("B", 3)] }, []);
 * const conditions = { departure: 0, craft, pace: { hold: "through-speed", speed_m_s: 5 }, reserve: null, fields: [] };
 * turnBack(prepared, conditions).limits[0].last.distance_m.toFixed(3) // → "90000.000"
 */
export function turnBack(
  prepared: PreparedRoute,
  conditions: Conditions,
  alternates: readonly Alternate[] = [],
): TurnBack {
  requireClimb(prepared.route, conditions.craft, alternates);
  const walk = new RouteWalk(prepared, conditions);
  const journeys = new Journeys(walk, alternates);
  const { goals } = journeys;
  const spots = spotsAlong(walk, journeys);
  const stretches = goals.map((_, goal) => reachStretches(walk, journeys, spots, goal));
  const away = goals.flatMap(({ kind }, goal) => (kind === "destination" ? [] : [goal]));
  const limits = away.map((goal): TurnLimit => turnLimit(goal, stretches[goal] ?? []));
  const any = anyLimit(
    limits,
    away.map((goal) => stretches[goal] ?? []),
  );
  return {
    goals,
    end: walk.end.place,
    samples: samplesAt(spots, journeys),
    limits: alternates.length > 0 ? [...limits, any] : limits,
    equalTime: equalTimePoints(walk, journeys, spots),
    stretches,
    nowhere: nowhereStretches(stretches),
  };
}

function samplesAt(spots: readonly Spot[], journeys: Journeys): TurnBackSamples {
  const { goals } = journeys;
  return {
    leg: spots.map(({ place }) => place.leg),
    at_m: spots.map(({ place }) => place.at_m),
    distance_m: spots.map(({ place }) => place.distance_m),
    lat: spots.map(({ place }) => place.lat),
    lon: spots.map(({ place }) => place.lon),
    time_s: spots.map(({ place }) => place.time_s),
    use: spots.map(({ used }) => used),
    remaining: spots.map(({ remaining }) => remaining),
    goals: goals.map((_, goal) => seriesOf(spots, journeys, goal)),
  };
}

function seriesOf(spots: readonly Spot[], journeys: Journeys, goal: number): GoalSeries {
  const all = spots.map((spot) => journeys.to(goal, spot));
  return {
    reach: all.map(({ reach }) => reach),
    time_s: all.map(({ time }) => time),
    use: all.map(({ use }) => use),
    margin: all.map(({ margin }) => margin),
    stops: all.map(({ stop }) => stop),
    limit: all.map(({ limit }) => limit),
  };
}
