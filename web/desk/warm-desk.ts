import { preload } from "../shell/LazyPart.tsx";
import type { Engine } from "../state/page-state.ts";
import { loadWindow } from "../window/load-window.ts";
import { loadDesk } from "./load-desk.ts";

/** Loads what compares departures while nothing else is going on, so that it shows at once when it is asked for. */
export function warmDesk(engine: Engine): void {
  const warm = (): void => {
    const parts = [preload(loadDesk), preload(loadWindow), engine.loadDeciding()];
    // What fails now is loaded when it is asked for, and then says so.
    void Promise.allSettled(parts);
  };
  if ("requestIdleCallback" in window) window.requestIdleCallback(warm, { timeout: 5000 });
  else setTimeout(warm, 2000);
}
