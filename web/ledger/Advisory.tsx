import { useSignal } from "@preact/signals";
import { ADVISORY } from "../core.ts";

/** The advisory where one decides: whole on a wide screen and on paper; its first lines on a phone, and whole when asked. */
export function Advisory() {
  const open = useSignal(false);
  return (
    <div class="advisory" data-open={open.value ? "" : undefined}>
      <p>{ADVISORY}</p>
      <button
        type="button"
        aria-expanded={open.value}
        onClick={() => {
          open.value = !open.value;
        }}
      >
        {open.value ? "Read less" : "Read all"}
      </button>
    </div>
  );
}
