import { keepFile } from "../state/keep-file.ts";
import type { PageState } from "../state/page-state.ts";
import type { UnitsPreset } from "../state/page-view.ts";
import type { PlanDocument } from "../state/plan-document.ts";
import { readFieldFile } from "./read-field-file.ts";

/**
 * Opens a plan's text with the files that it names. `find` gives a file by the plan's name for it, or `null` where the user has
 * yet to give it; the estimate then says which one it misses.
 *
 * @returns whether it was a plan
 */
export async function openPlan(
  page: PageState,
  name: string,
  text: string,
  find: (file: string) => Promise<Blob | null>,
): Promise<boolean> {
  const plan = planOf(text);
  if (plan === null) {
    page.view.notice.value = `${name} is no plan file: the "format" of one is "legwork-plan/1"`;
    return false;
  }
  const { craft, fields = [] } = plan;
  const files = new Map<string, Blob>();
  const keep = async (file: string): Promise<boolean> => {
    const content = await find(file);
    if (content === null) {
      if (page.store.files.peek().has(file) && page.view.notice.peek() === null)
        page.view.notice.value = `${file} did not come with ${name}: the file of that name that was here is used`;
      return false;
    }
    files.set(file, content);
    await keepFile(page, file, content);
    return true;
  };
  if ("file" in craft && typeof craft.file === "string") await keep(craft.file);
  for (const field of fields) {
    if (!(await keep(field.file))) continue;
    const answer = await readFieldFile(page, field);
    if (!answer.ok && !answer.cancelled) page.view.notice.value = answer.fault;
  }
  page.view.instant.value = null;
  page.view.level.value = null;
  if (!page.view.unitsChosen.peek()) page.view.units.value = await unitsOf(page, craft);
  page.answers.forget();
  const isReplacing = page.store.unsaved.peek() && page.store.plan.peek().routes.length > 0;
  if (isReplacing && page.view.notice.peek() === null) {
    page.view.notice.value =
      "The plan that was here is in no file: Undo brings it back, until the page is left.";
  }
  // There is nothing to go back to where nothing was.
  if (page.store.plan.peek().routes.length === 0) page.store.restart(plan, files);
  else page.store.open(plan, `Open ${name}`, files);
  page.view.opened.value += 1;
  page.view.announcement.value = `Opened ${name}`;
  return true;
}

/** The units that the command line writes its table in for the same craft. */
async function unitsOf({ files, view }: PageState, craft: PlanDocument["craft"]): Promise<UnitsPreset> {
  if (!("file" in craft) || typeof craft.file !== "string")
    return "moves" in craft && craft.moves === "air" ? "air" : "sea";
  const file = files.get(craft.file);
  if (file === undefined) return view.units.peek();
  try {
    const value: unknown = JSON.parse(await file.text());
    const moves = typeof value === "object" && value !== null ? Reflect.get(value, "moves") : undefined;
    return moves === "air" ? "air" : "sea";
  } catch {
    // What is wrong with the craft the estimate says.
    return view.units.peek();
  }
}

function planOf(text: string): PlanDocument | null {
  let value: unknown;
  try {
    value = JSON.parse(text);
  } catch {
    return null;
  }
  return isPlan(value) ? value : null;
}

/** Enough of a plan to be shown and mended; the estimate says what else is wrong with it. */
function isPlan(value: unknown): value is PlanDocument {
  if (typeof value !== "object" || value === null) return false;
  const { format, routes, craft, departure } = value as Record<string, unknown>;
  const isRoute = (route: unknown): boolean =>
    typeof route === "object" &&
    route !== null &&
    "name" in route &&
    typeof route.name === "string" &&
    "waypoints" in route &&
    Array.isArray(route.waypoints) &&
    route.waypoints.every((waypoint: unknown) => typeof waypoint === "object" && waypoint !== null);
  return (
    format === "legwork-plan/1" &&
    typeof departure === "string" &&
    typeof craft === "object" &&
    craft !== null &&
    Array.isArray(routes) &&
    routes.every(isRoute)
  );
}
