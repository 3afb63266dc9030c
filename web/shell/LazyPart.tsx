import { useSignal } from "@preact/signals";
import type { FunctionComponent } from "preact";
import { useLayoutEffect } from "preact/hooks";
import type { PageState } from "../state/page-state.ts";

type Part = FunctionComponent<{ readonly page: PageState }>;
/** Always the same function for a part, so that it is loaded once. */
type Load = () => Promise<Part>;

interface LazyPartProps {
  readonly page: PageState;
  readonly load: Load;
}

const loaded = new WeakMap<Load, Part>();

/** Loads a part before it is shown, so that it then shows at once. */
export async function preload(load: Load): Promise<void> {
  loaded.set(load, await load());
}

/** A part of the page that is loaded when it is first shown. */
export function LazyPart({ page, load }: LazyPartProps) {
  const shown = useSignal<Load | null>(null);
  useLayoutEffect(() => {
    if (loaded.has(load)) return;
    let current = true;
    preload(load).then(
      () => {
        if (current) shown.value = load;
      },
      () => {
        page.view.notice.value = "A part of the page could not be loaded; try again once there is a network.";
      },
    );
    return () => {
      current = false;
    };
  }, [load, shown, page]);
  // Read for what it tells: that the part has come.
  void shown.value;
  const Part = loaded.get(load);
  return Part === undefined ? null : <Part page={page} />;
}
