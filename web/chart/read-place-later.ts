import type { Signal } from "@preact/signals";
import type { Map as ChartMap } from "leaflet";
import type { PageState } from "../state/page-state.ts";
import type { ReadPlace } from "./read-place.ts";

/** What tells that somebody turns to the chart. */
const SIGNS = ["pointermove", "pointerdown", "focusin"] as const;

/** Loads what reads the chart when it is first pointed at, or the keyboard comes to it. */
export function followPlaceLater(
  map: ChartMap,
  page: PageState,
  place: Signal<ReadPlace | null>,
): () => void {
  const host = map.getContainer();
  let isClosed = false;
  let close = (): void => undefined;
  const wait = (): void => {
    for (const sign of SIGNS) host.addEventListener(sign, load, { capture: true, once: true });
  };
  const stop = (): void => {
    for (const sign of SIGNS) host.removeEventListener(sign, load, true);
  };
  const load = async (event: Event): Promise<void> => {
    stop();
    try {
      const { followPlace } = await import("./read-place.ts");
      if (!isClosed) close = followPlace(map, page, place, event);
    } catch {
      // The next sign tries again.
      wait();
    }
  };
  wait();
  return () => {
    isClosed = true;
    stop();
    close();
  };
}
