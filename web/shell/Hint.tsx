import type { PageState } from "../state/page-state.ts";

/** Three steps for a first visit, beside the demo that it begins with; once dismissed they stay away. */
export function Hint({ page: { view } }: { readonly page: PageState }) {
  if (view.hintSeen.value) return null;
  return (
    <aside class="hint" aria-label="First steps">
      <ol>
        <li>Compare the routes in the ledger; the first plan is invented.</li>
        <li>Drag a waypoint on the chart: every figure follows.</li>
        <li>Drop your own field files, set the craft, and print the leg table.</li>
      </ol>
      <button
        type="button"
        onClick={() => {
          view.hintSeen.value = true;
        }}
      >
        Dismiss
      </button>
    </aside>
  );
}
