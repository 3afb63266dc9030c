import { toldBelowField } from "../faults/told-by-label.ts";
import type { CraftDocument } from "../state/plan-document.ts";
import { InputError, type Pace, readCraftDocument, type StillPoint, stillCurve, stillPoint } from "./core.ts";
import type { CraftAnswer } from "./protocol.ts";

/**
 * Reads a craft as its form holds it, and what it spends in a still medium.
 *
 * @param pace the plan's, to be marked on the curve; `null` where none is known
 */
export function studyCraft(document: CraftDocument, pace: Pace | null): CraftAnswer {
  try {
    const craft = readCraftDocument(document);
    const curve = stillCurve(craft);
    const least =
      craft.speeds === null ? null : pointOf(() => stillPoint(craft, { hold: "least-energy" })).point;
    const limit = craft.limits.groundSpeed_m_s;
    return { ok: true, curve, least, limit, ...pointOf(() => pace && stillPoint(craft, pace)) };
  } catch (fault) {
    if (!(fault instanceof InputError)) throw fault;
    return { ok: false, key: fault.place.key ?? null, fault: toldBelowField(fault) };
  }
}

/** A pace that the craft cannot keep takes nothing from its curve. */
function pointOf(find: () => StillPoint | null): { point: StillPoint | null; paceFault: string | null } {
  try {
    return { point: find(), paceFault: null };
  } catch (fault) {
    if (!(fault instanceof InputError)) throw fault;
    return { point: null, paceFault: fault.message };
  }
}
