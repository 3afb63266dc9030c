import { timeOf } from "../format/time-text.ts";
import { setArrival } from "../state/decide-edits.ts";
import type { PageState } from "../state/page-state.ts";

const TEN_MINUTES = 600_000;
const SIX_HOURS = 6 * 3_600_000;

/** Asks for the arrival that the chosen route makes now, on the next ten minutes, as something to begin from. */
export function askArrival({ store, answers }: PageState): void {
  const plan = store.plan.peek();
  const arrival = answers.answer.peek().routes[store.selection.peek().route]?.arrival ?? null;
  const departure = Date.parse(plan.departure);
  const near = arrival === null ? departure + SIX_HOURS : Date.parse(arrival);
  if (Number.isNaN(near)) return;
  const asked = timeOf(Math.ceil(near / TEN_MINUTES) * TEN_MINUTES);
  store.edit("Ask for an arrival", (old) => setArrival(old, asked));
}
