import type { PageState } from "./page-state.ts";

/** Gives a file to the worker under the name that plans use, in place of any of that name. */
export async function keepFile(
  { engine, files, craftNames }: PageState,
  name: string,
  content: Blob,
): Promise<void> {
  files.set(name, content);
  await engine.keepFile(name, content);
  if (!name.endsWith(".json")) return;
  const craft = nameIn(await content.text());
  if (craft !== null) craftNames.value = { ...craftNames.peek(), [name]: craft };
}

/** The name in a craft file's text, for display; what else is wrong with it the estimate says. */
function nameIn(text: string): string | null {
  try {
    const value: unknown = JSON.parse(text);
    const named = typeof value === "object" && value !== null && "name" in value;
    return named && typeof value.name === "string" ? value.name : null;
  } catch {
    return null;
  }
}
