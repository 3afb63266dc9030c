import { useSignal } from "@preact/signals";
import type { ComponentChildren } from "preact";
import { useEffect, useRef } from "preact/hooks";

/** A sheet that a button opens; Escape, a click elsewhere or a finished choice closes it. What is on it is made when it is first opened. */
export function Menu({ name, children }: { readonly name: string; readonly children: ComponentChildren }) {
  const details = useRef<HTMLDetailsElement>(null);
  const opened = useSignal(false);
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
      onToggle={({ currentTarget: { open } }) => {
        if (open) opened.value = true;
      }}
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
      <div class="menu-sheet">{opened.value && children}</div>
    </details>
  );
}
