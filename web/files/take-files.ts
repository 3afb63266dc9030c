import type { FieldRole } from "../core.ts";
import { giveFiles } from "../shell/give-files.ts";
import { openPlan } from "../shell/open-plan.ts";
import { readFieldFile } from "../shell/read-field-file.ts";
import { keepFile } from "../state/keep-file.ts";
import type { PageState } from "../state/page-state.ts";
import type { FieldDocument } from "../state/plan-document.ts";
import { addField, setCraft } from "../state/plan-edits.ts";
import { importRoutes } from "../state/route-edits.ts";

const LARGEST_PLAN = 5_000_000;

/**
 * Takes the files that the user chose or dropped: a plan with the craft and fields that it names, an archive of them, a craft for
 * the plan on the page, fields to add to it, or routes.
 */
export async function takeFiles(page: PageState, files: readonly File[]): Promise<void> {
  const plan = files.find(({ name }) => name.endsWith(".plan.json"));
  if (plan !== undefined) {
    await takePlan(page, plan, files);
    return;
  }
  for (const file of files) await takeFile(page, file);
}

async function takeFile(page: PageState, file: File): Promise<void> {
  const name = file.name.toLowerCase();
  if (name.endsWith(".zip")) await takeArchive(page, file);
  else if (name.endsWith(".gpx") || name.endsWith(".geojson")) await takeRoutes(page, file);
  else if (name.endsWith(".json")) await takeJson(page, file);
  else {
    const { header, fault, isOtherKind } = await page.engine.preview(file, { role: "wind", file: file.name });
    if (isOtherKind) page.view.notice.value = fault;
    else if (/\.(csv|txt|tsv)$/.test(name)) await takeTable(page, file, header);
    else
      page.view.notice.value = `${file.name}: opened are plans, craft, fields (CSV), routes (GPX, GeoJSON, CSV) and archives`;
  }
}

async function takeArchive(page: PageState, file: File): Promise<void> {
  const answer = await page.engine.openArchive(file.name, file);
  if (!answer.ok) page.view.notice.value = answer.fault;
  else await openPlan(page, file.name, answer.plan.text, async (name) => answer.files.get(name) ?? null);
}

/** Adds the routes of a file to the plan, and chooses the first of them. */
async function takeRoutes(page: PageState, file: File): Promise<void> {
  const answer = await page.engine.readRoutes(file.name, file);
  if (!answer.ok) {
    page.view.notice.value = answer.fault;
    return;
  }
  const { routes, notes } = answer;
  const first = page.store.plan.peek().routes.length;
  const select = { route: first, waypoint: null };
  page.store.edit("Add routes from a file", (plan) => importRoutes(plan, routes), { select });
  const [place] = page.store.plan.peek().routes[first]?.waypoints ?? [];
  if (place !== undefined) page.view.opened.value += 1;
  const count = routes.length === 1 ? "1 route" : `${routes.length} routes`;
  page.view.announcement.value = `Added ${count} from ${file.name}`;
  if (notes.length > 0) page.view.notice.value = `${file.name}: ${notes.join("; ")}`;
}

/** A table is a field of the plan, or reads as a field or as waypoints; else the user says what it is. */
async function takeTable(page: PageState, file: File, header: readonly string[]): Promise<void> {
  const isKnown = (page.store.plan.value.fields ?? []).some(({ file: name }) => lastPart(name) === file.name);
  if (!isKnown && isWaypointTable(header)) await takeRoutes(page, file);
  else await takeField(page, file);
}

/** Whether a table has places but nothing that a field has beside them. */
function isWaypointTable(header: readonly string[]): boolean {
  const words = header.map((name) => name.replace(/\[.*/, "").trim().toLowerCase());
  const has = (...names: string[]): boolean => names.some((name) => words.includes(name));
  const isPlace = has("lat", "latitude") && has("lon", "long", "lng", "longitude");
  return isPlace && (has("name", "waypoint", "wp", "route", "stay", "path") || words.length <= 2);
}

async function takePlan(page: PageState, plan: File, files: readonly File[]): Promise<void> {
  if (isTooLarge(page, plan)) return;
  const byName = new Map(files.map((file) => [file.name, file]));
  await openPlan(page, plan.name, await plan.text(), async (name) => byName.get(lastPart(name)) ?? null);
}

/** A JSON file that is not named as a plan: a plan all the same, or a craft. */
async function takeJson(page: PageState, file: File): Promise<void> {
  if (isTooLarge(page, file)) return;
  const text = await file.text();
  if (text.includes('"legwork-plan/1"')) {
    await openPlan(page, file.name, text, async () => null);
    return;
  }
  if (/"type"\s*:\s*"(?:Feature|FeatureCollection|(?:Multi)?(?:LineString|Point))"/.test(text)) {
    await takeRoutes(page, file);
    return;
  }
  await keepFile(page, file.name, file);
  const files = new Map([[file.name, file]]);
  page.store.edit("Change craft", (plan) => setCraft(plan, { file: file.name }), { files });
  page.view.announcement.value = `The craft is now that of ${file.name}`;
}

async function takeField(page: PageState, file: File): Promise<void> {
  const known = (page.store.plan.value.fields ?? []).find(({ file: name }) => lastPart(name) === file.name);
  const field = known ?? (await roleOf(page, file)) ?? (await askField(page, file));
  if (field === null) return;
  await keepFile(page, field.file, file);
  const answer = await readFieldFile(page, field);
  if (!answer.ok) {
    if (!answer.cancelled) page.view.notice.value = answer.fault;
    giveFiles(page);
    return;
  }
  page.view.announcement.value = `Read ${file.name}`;
  const files = new Map([[field.file, file]]);
  if (known === undefined) page.store.edit("Add field", (plan) => addField(plan, field), { files });
  // The same references with other bytes behind one: as a plan of its own it is answered and decided anew.
  else page.store.edit("Replace field file", (plan) => ({ ...plan }), { files });
}

/** The field as a file with one possible reading gives it; `null` where the user must say what it is. */
async function roleOf({ engine }: PageState, file: File): Promise<FieldDocument | null> {
  const roles: readonly FieldRole[] = ["wind", "current"];
  const possible: FieldDocument[] = [];
  for (const role of roles) {
    const field = { role, file: file.name };
    if ((await engine.preview(file, field)).fault === null) possible.push(field);
  }
  return possible.length === 1 ? (possible[0] ?? null) : null;
}

/** Asks in the dialogue; `null` where the user thinks better of it. */
function askField({ asking }: PageState, content: File): Promise<FieldDocument | null> {
  return new Promise((resolve) => {
    asking.value = {
      content,
      answer(field) {
        asking.value = null;
        resolve(field);
      },
    };
  });
}

function isTooLarge({ view }: PageState, file: File): boolean {
  if (file.size <= LARGEST_PLAN) return false;
  view.notice.value = `${file.name} is larger than any plan or craft (${Math.round(file.size / 1e6)} MB)`;
  return true;
}

function lastPart(name: string): string {
  return name.split("/").at(-1) ?? name;
}
