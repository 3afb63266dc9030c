import type { AxisInspection, FieldInspection, RangeInspection } from "../field/inspect.ts";
import { TABLE_WIDTH } from "./columns.ts";
import { plainText, wrapped } from "./plain-text.ts";
import { instantText } from "./time-text.ts";

const LABEL_WIDTH = 11;

/** Seven significant digits without needless zeros: an axis printed to the centimetre. */
function figure(value: number): string {
  return String(Number(value.toPrecision(7)));
}

function duration(seconds: number): string {
  if (seconds % 3600 === 0) return `${seconds / 3600} h`;
  return seconds % 60 === 0 ? `${seconds / 60} min` : `${figure(seconds)} s`;
}

function spacing(step: AxisInspection["step"], unit: string, write: (value: number) => string): string {
  if (step === null) return "";
  if (step.regular) return `, every ${write(step.max)}${unit}`;
  return `, steps of ${write(step.min)}${unit} to ${write(step.max)}${unit}`;
}

function axis({ count, first, last, step }: AxisInspection, unit: string): string {
  const span = count === 1 ? figure(first) : `${figure(first)} to ${figure(last)}`;
  return `${count}: ${span} ${unit}${spacing(step, ` ${unit}`, figure)}`;
}

function times(time: FieldInspection["time"]): string {
  if (time === null) return "none: a steady field";
  if (time.count === 1) return `1: ${instantText(time.first, "minute")}`;
  const first = instantText(time.first, "minute").replace(" UTC", "");
  const last = instantText(time.last, "minute");
  return `${time.count}: ${first} to ${last}${spacing(time.step, "", duration)}`;
}

function bytes(count: number): string {
  if (count < 1e3) return `${count} B`;
  return count < 1e6 ? `${(count / 1e3).toFixed(1)} kB` : `${(count / 1e6).toFixed(1)} MB`;
}

function range(found: RangeInspection | null): string {
  return found === null ? "none" : `${found.min.toFixed(2)} to ${found.max.toFixed(2)} m/s`;
}

/** Rounded down, so that only a field without a gap has 100 %. */
function percent(share: number): string {
  return `${(Math.floor(share * 1000) / 10).toFixed(1)} %`;
}

/** `50: 0 to 49`, or the numbers themselves where some between are left out. */
function membersText(members: readonly number[]): string {
  const first = members[0] as number;
  const last = members[members.length - 1] as number;
  const isWhole = last - first + 1 === members.length;
  return `${members.length}: ${isWhole && members.length > 2 ? `${first} to ${last}` : members.join(", ")}`;
}

/**
 * What a field file holds, as text of at most 80 columns with a final line end. Speeds in m/s, the way the medium moves.
 *
 * @example
 * async function* open() {
 *   yield new TextEncoder().encode("lat,lon,u,v\n50,-5,3,4\n50,-4,0,0\n");
 * }
 * writeInspection(await inspectField(open, { file: "wind.csv" })).split("\n")[2] // → "Longitude: 2: -5 to -4 deg, every 1 deg"
 */
export function writeInspection(field: FieldInspection): string {
  const gaps =
    field.missing === 0 ? "no gaps" : `${field.missing} missing, coverage ${percent(field.coverage)}`;
  const entries: [label: string, text: string][] = [
    ["File", `${plainText(field.file)}, ${bytes(field.fileBytes)}; ${bytes(field.memoryBytes)} in memory`],
    ["Field", `read as ${field.role}`],
    ["Longitude", `${axis(field.longitude, "deg")}${field.global ? ", around the globe" : ""}`],
    ["Latitude", axis(field.latitude, "deg")],
  ];
  if (field.height !== null) entries.push(["Height", axis(field.height, "m")]);
  entries.push(["Times", times(field.time)]);
  if (field.members !== undefined) entries.push(["Members", membersText(field.members)]);
  entries.push([
    "Nodes",
    `${field.nodes} over all ${field.members === undefined ? "" : "members and "}times, ${gaps}`,
  ]);
  entries.push(["Speed", range(field.speed)]);
  entries.push(["Eastward", range(field.eastward)], ["Northward", range(field.northward)]);
  if (field.gust !== null) entries.push(["Gusts", range(field.gust)]);
  if (field.ignoredColumns.length > 0) {
    entries.push([
      "Ignored",
      `columns ${field.ignoredColumns.map((name) => `"${plainText(name)}"`).join(", ")}`,
    ]);
  }
  for (const note of field.notes) entries.push(["Note", plainText(note)]);
  return entries
    .flatMap(([label, text]) => wrapped(text, TABLE_WIDTH, `${label}:`.padEnd(LABEL_WIDTH)))
    .map((line) => `${line}\n`)
    .join("");
}
