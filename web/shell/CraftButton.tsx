import { useSignal } from "@preact/signals";
import type { FunctionComponent } from "preact";
import { useRef } from "preact/hooks";
import type { PageState } from "../state/page-state.ts";

type Dialog = FunctionComponent<{ readonly page: PageState; readonly onClose: () => void }>;

/** The craft's name, which opens its form. The form is loaded when it is first asked for. */
export function CraftButton({ page, name }: { readonly page: PageState; readonly name: string }) {
  const dialog = useSignal<{ readonly Part: Dialog } | null>(null);
  const button = useRef<HTMLButtonElement>(null);
  const open = async (): Promise<void> => {
    const { CraftDialog } = await import("../craft/CraftDialog.tsx");
    dialog.value = { Part: CraftDialog };
  };
  const Part = dialog.value?.Part;
  return (
    <>
      <button ref={button} type="button" class="craft-name" onClick={() => void open()}>
        {name}
        <span class="unseen">, change the craft</span>
      </button>
      {Part !== undefined && (
        <Part
          page={page}
          onClose={() => {
            dialog.value = null;
            button.current?.focus();
          }}
        />
      )}
    </>
  );
}
