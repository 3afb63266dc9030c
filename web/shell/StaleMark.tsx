import { isStale } from "../state/answers.ts";
import type { PageState } from "../state/page-state.ts";

/** Says that the figures below are of the plan as it was before a fault; nothing while they are the plan's. */
export function StaleMark({ page: { answers } }: { readonly page: PageState }) {
  return isStale(answers.answer.value) ? <strong class="stale-mark">from before the fault</strong> : null;
}
