import { checkArrival } from "../choose/arrival-window.ts";
import { speedRange } from "../choose/speed-range.ts";
import type { Craft, Pace, Reserve } from "../craft/craft.ts";
import { InputError } from "../errors.ts";
import { quoted } from "../found.ts";
import type { CraftDocument } from "./craft-schema.ts";
import { type Fault, firstIssue, placeOf } from "./first-issue.ts";
import { parseJson } from "./json-text.ts";
import type { FieldReference, OpenFile, Plan } from "./plan.ts";
import { type PlanDocument, type PlanParts, planSchema } from "./plan-schema.ts";
import { readAlternates } from "./read-alternates.ts";
import { checkOrderedSpeed, readCraft, readCraftDocument } from "./read-craft.ts";
import { readConfidence, readErrors } from "./read-errors.ts";
import { readRoutes } from "./read-routes.ts";
import { readWhatIfs } from "./read-what-ifs.ts";
import { windowOf } from "./read-window.ts";
import { readText } from "./text-file.ts";

type PaceParts = NonNullable<PlanParts["pace"]>;
type Arriving = Extract<PaceParts, { arrive: unknown }>;
type Holding = Exclude<PaceParts, Arriving>;

/** What reading a plan needs besides its text. */
export interface ReadPlanOptions {
  /** Name of the plan's file, for messages. */
  readonly file?: string;
  /** Opens the craft file that the plan names. */
  readonly open: OpenFile;
}

/**
 * Reads a plan's text, and the craft file that it names, into SI units with everything checked.
 *
 * Errors: an InputError for the first thing wrong with either, with its file and line or key; those of `open`.
 *
 * @example
 * const plan = JSON.stringify({
 *   format: "legwork-plan/1", departure: "2027-05-04T06:00:00Z",
 *   craft: {
 *     name: "Boat", moves: "water", speed: "5 m/s",
 *     power: { model: "constant", rate: "1 kW" }, store: { capacity: "10 kWh" },
 *   },
 *   fields: [{ role: "current", file: "stream.csv" }],
 *   routes: [{ name: "East", waypoints: [{ name: "A", lat: 0, lon: 0 }, { name: "B", lat: 0, lon: 1 }] }],
 * });
 * const { departure, fields } = await readPlan(plan, { open: async function* () {} });
 * [departure, fields[0].gaps] // → [1809410400000, "nearest"]
 */
export async function readPlan(text: string, options: ReadPlanOptions): Promise<Plan> {
  return readPlanDocument(parseJson(text, options.file), options);
}

/**
 * Reads a plan that is already an object, as a page edits it.
 *
 * @param document a PlanDocument, or anything that claims to be one; it stays as it is
 *
 * Errors: as {@link readPlan}.
 *
 * @example
 * const plan = {
 *   format: "legwork-plan/1", departure: "2027-05-04T06:00:00Z",
 *   craft: {
 *     name: "Boat", moves: "water", speed: "5 m/s",
 *     power: { model: "constant", rate: "1 kW" }, store: { capacity: "10 kWh" },
 *   },
 *   routes: [{ name: "East", waypoints: [{ name: "A", lat: 0, lon: 0 }, { name: "B", lat: 0, lon: 1 }] }],
 * };
 * const { pace } = await readPlanDocument(plan, { open: async function* () {} });
 * pace // → { hold: "through-speed", speed_m_s: 5 }
 */
export async function readPlanDocument(document: unknown, options: ReadPlanOptions): Promise<Plan> {
  const { file = "", open } = options;
  const result = planSchema.safeParse(document);
  if (!result.success) throw firstIssue(result.error.issues, document, file, []);
  const parts = result.data;
  // Read again from the document, where it stands as the user wrote it.
  const given = (document as PlanDocument).craft;
  const craft = await craftOf(given, file, open);
  return planOf(parts, craft, (path, sentence) => new InputError(sentence, placeOf(file, path)));
}

async function craftOf(
  given: CraftDocument | { file: string },
  file: string,
  open: OpenFile,
): Promise<Craft> {
  if (!("file" in given)) return readCraftDocument(given, file, ["craft"]);
  return readCraft(await readText(open(given.file), given.file), given.file);
}

function planOf(parts: PlanParts, craft: Craft, fault: Fault): Plan {
  const window = windowOf(parts, craft, fault);
  const pace = paceOf(parts, craft, fault);
  const fields = (parts.fields ?? []).map(fieldOf);
  const errors = readErrors(parts.fields ?? [], fault);
  return {
    title: parts.title ?? "",
    departure: parts.departure,
    craft,
    ...pace,
    ...(window === undefined ? {} : { window }),
    reserve: parts.reserve === undefined ? null : reserveOf(parts.reserve, craft, fault),
    ...(parts.confidence === undefined
      ? {}
      : { confidence: readConfidence(parts.confidence, errors, fault) }),
    fields,
    routes: readRoutes(parts, craft, fault),
    ...(errors.length === 0 ? {} : { errors }),
    ...(parts.whatIf === undefined
      ? {}
      : { whatIfs: readWhatIfs(parts.whatIf, { pace: pace.pace, fields }, fault) }),
    ...(parts.alternates === undefined ? {} : { alternates: readAlternates(parts.alternates, fault) }),
  };
}

function paceOf(parts: PlanParts, craft: Craft, fault: Fault): Pick<Plan, "pace" | "arrive"> {
  const pace = parts.pace ?? { hold: "through-speed" };
  return "arrive" in pace ? arrivalOf(pace.arrive, craft, fault) : { pace: holdOf(pace, craft, fault) };
}

function arrivalOf(asked: Arriving["arrive"], craft: Craft, fault: Fault): Pick<Plan, "pace" | "arrive"> {
  const arrive =
    typeof asked === "number"
      ? { notBefore: asked, notAfter: asked }
      : { notBefore: asked.notBefore ?? null, notAfter: asked.notAfter };
  try {
    checkArrival(arrive);
    const { max } = speedRange(craft);
    const speed_m_s = craft.speed_m_s ?? max;
    return { pace: { hold: "through-speed", speed_m_s }, arrive };
  } catch (error) {
    throw error instanceof InputError ? fault(["pace", "arrive"], error.message) : error;
  }
}

function holdOf(pace: Holding, craft: Craft, fault: Fault): Pace {
  if (pace.hold === "power") {
    checkSpeeds(pace.hold, craft, fault);
    if (craft.power.model === "constant")
      throw fault(
        ["pace", "hold"],
        'no speed follows from a power that is the same at every speed; found the constant model beside "power"',
      );
    if (craft.storePerJoule === null)
      throw fault(
        ["pace", "hold"],
        `the pace "power" needs a specificConsumption in the craft's store where the power model is a rate of fuel; found none`,
      );
    return { hold: "power", power_W: pace.power.value };
  }
  if (pace.hold === "least-energy") {
    checkSpeeds(pace.hold, craft, fault);
    return { hold: "least-energy" };
  }
  const speed_m_s = pace.speed?.value ?? craft.speed_m_s;
  if (speed_m_s === null)
    throw fault(
      ["pace", "speed"],
      `a speed is given in the pace or in the craft, as "12 kn"; found nothing in either`,
    );
  if (pace.hold === "through-speed" && pace.speed !== undefined)
    checkOrderedSpeed(pace.speed, craft.power, (text) => fault(["pace", "speed"], text));
  return { hold: pace.hold, speed_m_s };
}

function checkSpeeds(hold: string, craft: Craft, fault: Fault): void {
  if (craft.speeds !== null) return;
  throw fault(
    ["pace", "hold"],
    `the pace ${quoted(hold)} needs the craft's speeds, as { "min": "3 kn", "max": "14 kn" }, beside the ${craft.power.model} model; found none`,
  );
}

const AMOUNT = { J: "energy", kg: "mass", L: "volume" } as const;
const AMOUNT_EXAMPLE = { J: "15 kWh", kg: "500 kg", L: "20 L" } as const;

function reserveOf(reserve: NonNullable<PlanParts["reserve"]>, craft: Craft, fault: Fault): Reserve {
  const { value, dimension, text } = reserve;
  if (dimension === "time") return { kind: "time", time_s: value };
  if (dimension === "share") {
    if (value > 1)
      throw fault(["reserve"], `a reserve is at most 100 % of the usable store; found ${quoted(text)}`);
    return { kind: "share", share: value };
  }
  const kind = AMOUNT[craft.store.unit];
  if (dimension !== kind)
    throw fault(
      ["reserve"],
      `a reserve is a share, a time, or an amount of the store's kind, ${kind}, as "${AMOUNT_EXAMPLE[craft.store.unit]}"; found ${quoted(text)}`,
    );
  return { kind: "amount", amount: value };
}

function fieldOf(field: NonNullable<PlanParts["fields"]>[number]): FieldReference {
  const columns = Object.entries(field.columns ?? {}).filter(
    (entry): entry is [string, string] => entry[1] !== undefined,
  );
  return {
    role: field.role,
    file: field.file,
    columns: Object.fromEntries(columns),
    gaps: field.gaps ?? "nearest",
    beyond: field.beyond ?? "stop",
    outside: field.outside ?? "stop",
    ...(field.member === undefined ? {} : { member: field.member }),
  };
}
