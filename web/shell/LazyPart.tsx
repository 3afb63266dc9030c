import { useSignal } from "@preact/signals";
import type { FunctionComponent } from "preact";
import { useEffect } from "preact/hooks";
import type { PageState } from "../state/page-state.ts";

type Part = FunctionComponent<{ readonly page: PageState }>;

interface LazyPartProps {
  readonly page: PageState;
  /** Always the same function, so that a part is loaded once. */
  readonly load: () => Promise<Part>;
}

/** A part of the page that is loaded when it is first shown. */
export function LazyPart({ page, load }: LazyPartProps) {
  const loaded = useSignal<{ readonly load: LazyPartProps["load"]; readonly Part: Part } | null>(null);
  useEffect(() => {
    let current = true;
    load().then(
      (Part) => {
        if (current) loaded.value = { load, Part };
      },
      () => {
        page.view.notice.value = "A part of the page could not be loaded; try again once there is a network.";
      },
    );
    return () => {
      current = false;
    };
  }, [load, loaded, page]);
  if (loaded.value === null || loaded.value.load !== load) return null;
  const { Part } = loaded.value;
  return <Part page={page} />;
}
