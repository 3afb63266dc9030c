import { useSignal } from "@preact/signals";
import type { ComponentChildren } from "preact";
import { useEffect, useRef } from "preact/hooks";

interface MenuProps {
  readonly name: string;
  readonly children?: ComponentChildren;
  /** What is on the sheet but need not be there before somebody turns to its button. */
  readonly late?: ComponentChildren;
}

/** A sheet that a button opens; Escape, a click elsewhere or a finished choice closes it. */
export function Menu({ name, children, late }: MenuProps) {
  const details = useRef<HTMLDetailsElement>(null);
  const sought = useSignal(false);
  const seek = (): void => {
    sought.value = true;
  };
  useEffect(() => {
    const closeOutside = (event: Event): void => {
      if (event.target instanceof Node && !details.current?.contains(event.target)) {
        details.current?.removeAttribute("open");
      }
    };
    document.addEventListener("pointerdown", closeOutside);
    document.addEventListener("focusin", closeOutside);
    return () => {
      document.removeEventListener("pointerdown", closeOutside);
      document.removeEventListener("focusin", closeOutside);
    };
  }, []);
  return (
    <details
      ref={details}
      class="menu"
      onToggle={seek}
      onPointerEnter={seek}
      onFocusCapture={seek}
      onClick={(event) => {
        if (event.target instanceof HTMLButtonElement) details.current?.removeAttribute("open");
      }}
      onKeyDown={(event) => {
        if (event.key !== "Escape") return;
        details.current?.removeAttribute("open");
        details.current?.querySelector("summary")?.focus();
      }}
    >
      <summary>{name}</summary>
      <div class="menu-sheet">
        {children}
        {sought.value && late}
      </div>
    </details>
  );
}
