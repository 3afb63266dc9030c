import type { Keeping } from "../keeping/keep-plan.ts";
import type { PageState } from "../state/page-state.ts";

/** Offers a newer version of the page; it is brought in only once the plan is safe on the device. */
export function offerNewer({ view }: PageState, { flush }: Keeping, useIt: () => void): void {
  view.newer.value = async () => {
    if (await flush()) useIt();
    else view.notice.value = "This device could not keep the plan: save it to a file, then reload the page.";
  };
}

/** Says that a newer version of the page is there, and brings it in when the user asks for it. */
export function NewerVersion({ page: { view } }: { readonly page: PageState }) {
  const useIt = view.newer.value;
  if (useIt === null) return null;
  return (
    <div class="notice newer" role="status">
      A newer version of Legwork is on this device. The plan stays as it is.
      <span class="tools">
        <button type="button" class="primary" onClick={() => void useIt()}>
          Use it now
        </button>
        <button
          type="button"
          onClick={() => {
            view.newer.value = null;
          }}
        >
          Later
        </button>
      </span>
    </div>
  );
}
