import { isoTime } from "../estimate/leg-result.ts";
import type { ArrivalSolution } from "../estimate/result.ts";
import type { SpeedTrials } from "./speed-trials.ts";

/** What a speed comes to that arrives. @param departure ms since 1970-01-01T00:00Z */
export function solutionAt(trials: SpeedTrials, speed: number, departure: number): ArrivalSolution {
  const passage = trials.passage(speed);
  const { use, remaining, status } = trials.at(speed);
  if (passage === null || use === null || remaining === null) throw new Error("a solution does not arrive");
  return { speed_m_s: speed, arrival: isoTime(departure + 1000 * passage), use, remaining, status };
}
