import { preload } from "../shell/LazyPart.tsx";
import type { Engine } from "../state/page-state.ts";
import { loadWindow } from "../window/load-window.ts";
import { loadDesk } from "./load-desk.ts";

/** What tells that somebody has begun to use the page. */
const SIGNS = ["pointermove", "pointerdown", "keydown", "scroll"] as const;

/**
 * Loads what compares departures once the page is being used and nothing else is going on, so that it shows at once when it is
 * asked for; a visit that only looks at the first plan is spared it.
 */
export function warmDesk(engine: Engine): void {
  const warm = (): void => {
    const parts = [preload(loadDesk), preload(loadWindow), engine.loadDeciding()];
    // What fails now is loaded when it is asked for, and then says so.
    void Promise.allSettled(parts);
  };
  const begin = (): void => {
    for (const sign of SIGNS) window.removeEventListener(sign, begin, true);
    if ("requestIdleCallback" in window) window.requestIdleCallback(warm, { timeout: 5000 });
    else setTimeout(warm, 2000);
  };
  for (const sign of SIGNS) window.addEventListener(sign, begin, { capture: true, passive: true });
}
