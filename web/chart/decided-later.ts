import { effect } from "@preact/signals";
import type { Map as ChartMap } from "leaflet";
import type { PageState } from "../state/page-state.ts";

/** Loads what draws on the chart what is decided once there is anything of it: an answer, an alternate, or a question open. */
export function showDecidedLater(map: ChartMap, page: PageState): () => void {
  const { decisions, desk, store, view } = page;
  let isLoading = false;
  let isClosed = false;
  let close = (): void => undefined;
  const load = async (): Promise<void> => {
    try {
      const { showDecided } = await import("./decided-marks.ts");
      if (!isClosed) close = showDecided(map, page);
    } catch {
      isLoading = false;
      view.notice.value = "A part of the page could not be loaded; try again once there is a network.";
    }
  };
  const stop = effect(() => {
    const isWanted =
      decisions.decided.value !== null ||
      (store.plan.value.alternates ?? []).length > 0 ||
      desk.part.value !== "legs";
    if (!isWanted || isLoading) return;
    isLoading = true;
    void load();
  });
  return () => {
    isClosed = true;
    stop();
    close();
  };
}
