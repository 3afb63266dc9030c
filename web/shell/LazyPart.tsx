import { useSignal } from "@preact/signals";
import type { FunctionComponent } from "preact";
import { useLayoutEffect } from "preact/hooks";
import type { PageState } from "../state/page-state.ts";

interface PartProps {
  readonly page: PageState;
}

/** Always the same function for a part, so that it is loaded once. */
type Load<Props extends PartProps> = () => Promise<FunctionComponent<Props>>;

const loaded = new WeakMap<object, unknown>();

/** Loads a part before it is shown, so that it then shows at once. */
export async function preload<Props extends PartProps>(load: Load<Props>): Promise<void> {
  loaded.set(load, await load());
}

/** A part of the page that is loaded when it is first shown; what it is given besides is handed on to it. */
export function LazyPart<Props extends PartProps>({
  load,
  ...props
}: Props & { readonly load: Load<Props> }) {
  const { page } = props;
  const shown = useSignal<Load<Props> | null>(null);
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
  const Part = loaded.get(load) as FunctionComponent<Props> | undefined;
  return Part === undefined ? null : <Part {...(props as unknown as Props)} />;
}
