import { LIMITS, MODEL_FIELDS, pathText, SPEEDS, STORE, WINDAGE } from "../craft/craft-fields.ts";

/*
 * The labels of the page's fields by the keys of a plan, for what is wrong with a plan to be told where it can be put right. A key
 * without a field keeps its own name.
 */

/** What of a plan its labels need: routes and fields are called by their names. */
export interface NamedParts {
  readonly routes: readonly { readonly name?: string }[];
  readonly fields?: readonly { readonly role: string; readonly file: string }[];
}

type Labels = Readonly<Record<string, string>>;

const PLAN: Labels = {
  title: '"Title of the plan"',
  departure: '"Departure"',
  craft: '"Craft"',
  reserve: '"Reserve"',
  confidence: '"Reserve to hold with"',
  pace: '"Pace"',
  "pace.hold": '"Pace"',
  "pace.speed": '"Speed" of the pace',
  "pace.power": '"Power" of the pace',
  "pace.arrive": '"Arrive"',
  "pace.arrive.notBefore": '"Not before" of the arrival',
  "pace.arrive.notAfter": '"Not after" of the arrival',
  window: '"Departures"',
  "window.from": '"From" of the departures',
  "window.to": '"To" of the departures',
  "window.every": '"Every" of the departures',
  "window.speeds": '"Speeds" of the departures',
  "window.arriveBy": '"Arrive by" of the departures',
};

const WAYPOINT: Labels = {
  name: "Waypoint",
  lat: "Latitude",
  lon: "Longitude",
  path: "Path",
  speed: "Speed",
  stay: "Stay",
  height: "Height",
};

const ALTERNATE: Labels = { name: "Alternate", lat: "Latitude", lon: "Longitude", height: "Height" };

const WHAT_IF: Labels = {
  name: "Name",
  wind: "Wind ×",
  veer: "Wind veered",
  current: "Current ×",
  speed: "Speed +",
  consumption: "Use +",
  late: "Late",
};

const ERROR: Labels = { speed: "Deviation per component", length: "Correlated over", time: "and over" };

const FIELD: Labels = {
  role: "Field of",
  gaps: "Where a value is missing",
  beyond: "After the last valid time",
  outside: "Outside the area",
};

const ROW: Labels = { speed: "Speed", rate: "Rate" };

const CRAFT: Labels = {
  name: "Name",
  moves: "Moves through",
  power: "Model",
  "power.model": "Model",
  speeds: SPEEDS.title,
  store: STORE.title,
  windage: WINDAGE.title,
  limits: LIMITS.title,
  ...Object.fromEntries(
    [...Object.values(MODEL_FIELDS), ...[SPEEDS, STORE, WINDAGE, LIMITS].map(({ fields }) => fields)]
      .flat()
      .map(({ path, label }) => [pathText(path), label]),
  ),
};

/** The label of a field of the craft form by its key, as `power.rows[1].rate`; `null` where the form has none. */
export function craftLabel(key: string): string | null {
  const [, row, column = ""] = /^power\.rows\[(\d+)\]\.?(.*)$/.exec(key) ?? [];
  if (row !== undefined) return partLabel(column, ROW, `row ${Number(row) + 1}`);
  return key === "power.rows" ? "the rows" : quoted(CRAFT[key]);
}

/** How a key of a file that a plan names is called on the page: of a craft, or what a field's file is; `null` where it has no field. */
export function fileKeyLabel(key: string): string | null {
  return key === "role" ? quoted(FIELD[key]) : ofCraft(key);
}

/** How a place in a plan is called on the page, as `"Stay" of waypoint 2 of West about`; `null` where it has no field. */
export function fieldLabel(key: string, parts: NamedParts): string | null {
  const plain = PLAN[key.replace(/^window\.speeds\[\d+\]$/, "window.speeds")];
  if (plain !== undefined) return plain;
  const [, list = "", digits = "", rest = ""] = /^(\w+)\[(\d+)\]\.?(.*)$/.exec(key) ?? [];
  const at = Number(digits);
  if (list === "routes") return routeLabel(rest, nameOf(parts, at), at);
  if (list === "alternates") return partLabel(rest, ALTERNATE, `alternate ${at + 1}`);
  if (list === "whatIf") return partLabel(rest, WHAT_IF, `what-if ${at + 1}`);
  if (list === "fields") return fileLabel(rest, parts.fields?.[at]);
  return key.startsWith("craft.") ? ofCraft(key.slice(6)) : null;
}

function ofCraft(key: string): string | null {
  const label = craftLabel(key);
  return label === null ? null : `${label} of the craft`;
}

function routeLabel(rest: string, name: string, at: number): string | null {
  if (rest === "") return `route ${at + 1}`;
  if (rest === "name") return '"Name of the route"';
  if (rest === "waypoints") return `the waypoints of ${name}`;
  const [, waypoint, key = ""] = /^waypoints\[(\d+)\]\.?(.*)$/.exec(rest) ?? [];
  if (waypoint === undefined) return null;
  return partLabel(key, WAYPOINT, `waypoint ${Number(waypoint) + 1} of ${name}`);
}

function fileLabel(rest: string, field: { role: string; file: string } | undefined): string | null {
  if (field === undefined) return null;
  if (!rest.startsWith("error")) return rest === "" ? null : partLabel(rest, FIELD, field.file);
  return partLabel(rest.slice(6), ERROR, `the ${field.role}'s forecast error`);
}

/** A part itself where there is no key, else the label of its field. */
function partLabel(key: string, labels: Labels, part: string): string | null {
  if (key === "") return part;
  const label = quoted(labels[key]);
  return label === null ? null : `${label} of ${part}`;
}

function nameOf({ routes }: NamedParts, at: number): string {
  const name = routes[at]?.name;
  return typeof name === "string" && name.trim() !== "" ? name : `route ${at + 1}`;
}

function quoted(label: string | undefined): string | null {
  return label === undefined ? null : `"${label}"`;
}
