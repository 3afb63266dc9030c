import type { SureWindow } from "../core.ts";
import type { Engine } from "../state/page-state.ts";
import type { SureQuestion } from "../worker/protocol.ts";

/** How long a worker tries before it looks up. */
const BUDGET_MS = 40;

/** How sure the bests are, or the core's sentence about a what-if that cannot be tried. */
interface Tried {
  readonly sure: SureWindow | null;
  readonly sureFault: string | null;
}

/**
 * Has the bests of a window put to the test, piece by piece.
 *
 * @param wanted whether anybody still waits for it
 * @returns `null` once it is no longer wanted
 */
export async function tryBests(
  hand: Pick<Engine, "windowSure">,
  ticket: number,
  question: SureQuestion,
  wanted: () => boolean,
): Promise<Tried | null> {
  for (let asked: SureQuestion | null = question; wanted(); asked = null) {
    const slice = await hand.windowSure(ticket, asked, BUDGET_MS);
    if (slice === null || !wanted()) return null;
    if (!slice.ok) return { sure: null, sureFault: slice.fault };
    if (slice.sure !== null) return { sure: slice.sure, sureFault: null };
  }
  return null;
}
