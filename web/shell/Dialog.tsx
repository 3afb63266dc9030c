import type { ComponentChildren } from "preact";
import { useEffect, useId, useRef } from "preact/hooks";
import "./dialog.css";

interface DialogProps {
  readonly title: string;
  readonly children: ComponentChildren;
  readonly onClose: () => void;
}

/** A sheet over the page; Escape, its button or a click beside it closes it, and the focus goes back to where it was. */
export function Dialog({ title, children, onClose }: DialogProps) {
  const dialog = useRef<HTMLDialogElement>(null);
  const titleId = useId();
  useEffect(() => {
    const before = document.activeElement;
    dialog.current?.showModal?.();
    return () => {
      if (before instanceof HTMLElement) before.focus();
    };
  }, []);
  return (
    // biome-ignore lint/a11y/useKeyWithClickEvents: Escape closes a dialog of itself
    <dialog
      ref={dialog}
      class="sheet"
      aria-labelledby={titleId}
      onClose={onClose}
      onClick={({ target }) => {
        if (target === dialog.current) dialog.current?.close();
      }}
    >
      <div class="sheet-body">
        <header>
          <h2 id={titleId}>{title}</h2>
          <button type="button" class="primary" onClick={() => dialog.current?.close()}>
            Done
          </button>
        </header>
        {children}
      </div>
    </dialog>
  );
}
