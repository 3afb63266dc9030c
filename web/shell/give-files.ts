import { keepFile } from "../state/keep-file.ts";
import type { PageState } from "../state/page-state.ts";
import { readFieldFile } from "./read-field-file.ts";

/**
 * Gives the worker those of the plan's files that it has others for: a name stands for another file after an undo, and after a file
 * that was not taken. Whatever is asked of the worker next rests on them.
 */
export function giveFiles(page: PageState): void {
  const { fields = [] } = page.store.plan.peek();
  for (const [name, content] of page.store.files.value) {
    if (page.files.get(name) === content) continue;
    void keepFile(page, name, content);
    for (const field of fields) if (field.file === name) void readFieldFile(page, field);
  }
}
