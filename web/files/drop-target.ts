import type { PageState } from "../state/page-state.ts";
import { takeFilesLater } from "./take-later.ts";

/** Lets files be dropped anywhere on the page. */
export function listenForDrops(page: PageState): void {
  const mark = (over: boolean): void => {
    document.documentElement.classList.toggle("dropping", over);
  };
  const hasFiles = (event: DragEvent): boolean => event.dataTransfer?.types.includes("Files") ?? false;
  window.addEventListener("dragover", (event) => {
    if (!hasFiles(event)) return;
    event.preventDefault();
    mark(true);
  });
  window.addEventListener("dragleave", (event) => {
    if (event.relatedTarget === null) mark(false);
  });
  window.addEventListener("drop", (event) => {
    if (!hasFiles(event)) return;
    event.preventDefault();
    mark(false);
    void takeFilesLater(page, [...(event.dataTransfer?.files ?? [])]);
  });
}
