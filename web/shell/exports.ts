import type { ReportFormat } from "../core.ts";
import type { PageState } from "../state/page-state.ts";
import { fileStem, saveFile } from "./plan-files.ts";

const KINDS: Record<ReportFormat, { readonly ending: string; readonly type: string }> = {
  table: { ending: "txt", type: "text/plain" },
  csv: { ending: "csv", type: "text/csv" },
  json: { ending: "estimate.json", type: "application/json" },
  geojson: { ending: "geojson", type: "application/geo+json" },
  gpx: { ending: "gpx", type: "application/gpx+xml" },
};

/** Hands the chosen route, in a format of the command line's and by the same code, to the browser to keep. */
export async function exportRoute(page: PageState, format: ReportFormat): Promise<void> {
  const text = await reportOfChosen(page, format);
  if (text === null) return;
  const { store, view } = page;
  const { title = "plan", routes } = store.plan.value;
  const { ending, type } = KINDS[format];
  const name = `${fileStem(`${title} ${routes[store.selection.value.route]?.name ?? ""}`)}.${ending}`;
  saveFile(name, text, type);
  view.announcement.value = `Saved ${name}`;
}

/** Puts the chosen route's leg table on the clipboard as text. */
export async function copyLegTable(page: PageState): Promise<void> {
  const text = await reportOfChosen(page, "table");
  if (text === null) return;
  try {
    await navigator.clipboard.writeText(text);
    page.view.announcement.value = "The leg table is on the clipboard";
  } catch {
    // A browser may refuse the clipboard; the text is then handed over as a file.
    saveFile("leg-table.txt", text, KINDS.table.type);
    page.view.announcement.value = "The clipboard is closed to this page: saved leg-table.txt instead";
  }
}

async function reportOfChosen(
  { engine, store, answers, view }: PageState,
  format: ReportFormat,
): Promise<string | null> {
  const { route: chosen } = store.selection.value;
  const { routes } = answers.answer.value;
  if (!routes[chosen]) return null;
  // Routes still being drawn are not in the estimate that the worker holds.
  const route = routes.slice(0, chosen).filter((before) => before !== null).length;
  return engine.report({ format, units: view.units.value, route });
}
