import type { Map as ChartMap } from "leaflet";
import type { PageState } from "../state/page-state.ts";
import { showSensitivity } from "./sensitivity-stroke.ts";
import { showTurnBack } from "./turn-back-marks.ts";
import "./turn-back-marks.css";

/** What is decided, on the chart: where to turn back, and where a wrong forecast tells most. */
export function showDecided(map: ChartMap, page: PageState): () => void {
  const closers = [showTurnBack(map, page), showSensitivity(map, page)];
  return () => {
    for (const close of closers) close();
  };
}
