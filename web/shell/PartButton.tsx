import { useSignal } from "@preact/signals";
import type { ComponentChildren, FunctionComponent } from "preact";
import { useRef } from "preact/hooks";

interface PartButtonProps {
  readonly class?: string;
  readonly children: ComponentChildren;
  /** Loads what the button opens, when it is first asked for. */
  readonly load: () => Promise<FunctionComponent<{ readonly onClose: () => void }>>;
}

/** A button that opens a sheet with a part of the page that is loaded only then. */
export function PartButton({ load, children, ...rest }: PartButtonProps) {
  const opened = useSignal<{ readonly Part: FunctionComponent<{ readonly onClose: () => void }> } | null>(
    null,
  );
  const button = useRef<HTMLButtonElement>(null);
  const open = async (): Promise<void> => {
    opened.value = { Part: await load() };
  };
  const Part = opened.value?.Part;
  return (
    <>
      <button ref={button} type="button" class={rest.class} onClick={() => void open()}>
        {children}
      </button>
      {Part !== undefined && (
        <Part
          onClose={() => {
            opened.value = null;
            button.current?.focus();
          }}
        />
      )}
    </>
  );
}
