import type { PageState } from "../state/page-state.ts";
import type { CraftDocument } from "../state/plan-document.ts";

/** The craft of the plan, from its file where the plan names one; `null` where there is none that is a craft. */
export async function craftOf({ store }: PageState): Promise<CraftDocument | null> {
  const { craft } = store.plan.peek();
  if (!("file" in craft && typeof craft.file === "string")) return craft;
  const content = store.files.peek().get(craft.file);
  return content === undefined ? null : craftInText(await content.text());
}

/** A craft file's object; what is wrong inside it the core says. */
export function craftInText(text: string): CraftDocument | null {
  try {
    const value: unknown = JSON.parse(text);
    return typeof value === "object" && value !== null && !Array.isArray(value) ? { ...value } : null;
  } catch {
    return null;
  }
}
