import { useSignal } from "@preact/signals";
import type { RefObject } from "preact";
import { useEffect, useRef } from "preact/hooks";

/** An element and its width in px, kept up to date; `fallback` until it is on the page. */
export function useWidth<E extends Element>(fallback: number): { ref: RefObject<E | null>; width: number } {
  const ref = useRef<E>(null);
  const width = useSignal(fallback);
  useEffect(() => {
    const element = ref.current;
    if (!element || typeof ResizeObserver === "undefined") return;
    const observer = new ResizeObserver(([entry]) => {
      if (entry && entry.contentRect.width > 0) width.value = entry.contentRect.width;
    });
    observer.observe(element);
    return () => observer.disconnect();
  }, [width]);
  return { ref, width: width.value };
}
