import type {
  EqualTimePoint,
  Goal,
  GoalSeries,
  ReachStretch,
  RoutePlace,
  TurnBack,
  TurnBackSamples,
  TurnLimit,
} from "../choose/turn-back-result.ts";

/** A place with its keys in the order of the format. */
export function placeJson(value: RoutePlace): RoutePlace {
  return {
    leg: value.leg,
    at_m: value.at_m,
    distance_m: value.distance_m,
    lat: value.lat,
    lon: value.lon,
    time_s: value.time_s,
    time: value.time,
  };
}

const placeOrNone = (value: RoutePlace | null): RoutePlace | null => value && placeJson(value);

const goalJson = ({ kind, name, lat, lon }: Goal): Goal => ({ kind, name, lat, lon });

function limitJson(value: TurnLimit): TurnLimit {
  return {
    goal: value.goal,
    last: placeOrNone(value.last),
    beyond: value.beyond,
    notKnownFrom: placeOrNone(value.notKnownFrom),
    reason: value.reason,
  };
}

function equalTimeJson({ between, place, time_s }: EqualTimePoint): EqualTimePoint {
  return { between: [between[0], between[1]], place: placeJson(place), time_s };
}

function stretchJson({ reach, reason, from, to }: ReachStretch): ReachStretch {
  return { reach, reason, from: placeJson(from), to: placeJson(to) };
}

function seriesJson(value: GoalSeries): GoalSeries {
  return {
    reach: value.reach,
    time_s: value.time_s,
    use: value.use,
    margin: value.margin,
    stops: value.stops,
    limit: value.limit,
  };
}

function samplesJson(value: TurnBackSamples): TurnBackSamples {
  return {
    leg: value.leg,
    at_m: value.at_m,
    distance_m: value.distance_m,
    lat: value.lat,
    lon: value.lon,
    time_s: value.time_s,
    use: value.use,
    remaining: value.remaining,
    goals: value.goals.map(seriesJson),
  };
}

/** What turning back comes to, with its keys in the order of the format. */
export function turnBackJson(value: TurnBack): TurnBack {
  return {
    goals: value.goals.map(goalJson),
    end: placeJson(value.end),
    limits: value.limits.map(limitJson),
    equalTime: value.equalTime.map(equalTimeJson),
    nowhere: value.nowhere.map(stretchJson),
    stretches: value.stretches.map((own) => own.map(stretchJson)),
    samples: samplesJson(value.samples),
  };
}
