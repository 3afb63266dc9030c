import { localInput, zoneText } from "../format/time-text.ts";
import type { ArrivalDocument, PaceDocument, PlanDocument } from "../state/plan-document.ts";

/** The rules of pace in words, in the order in which they are offered. */
export const PACES: readonly (readonly [PaceDocument["hold"], string])[] = [
  ["through-speed", "hold speed through the medium"],
  ["ground-speed", "hold ground speed"],
  ["power", "hold power"],
  ["least-energy", "least energy"],
];

export function paceText(pace: NonNullable<PlanDocument["pace"]> = { hold: "through-speed" }): string {
  if ("arrive" in pace) return arrivalText(pace);
  const rule = PACES.find(([hold]) => hold === pace.hold)?.[1] ?? pace.hold;
  const amount = pace.speed ?? pace.power;
  return amount === undefined ? rule : `${rule}, ${amount}`;
}

function arrivalText({ arrive }: ArrivalDocument): string {
  if (typeof arrive === "string") return `arrive at ${arrive}`;
  const { notBefore, notAfter } = arrive;
  return notBefore === undefined ? `arrive by ${notAfter}` : `arrive between ${notBefore} and ${notAfter}`;
}

/** The craft's own name, else its file's. `names`: those found in craft files, by the file. */
export function craftName(craft: PlanDocument["craft"], names: Readonly<Record<string, string>>): string {
  if ("name" in craft && typeof craft.name === "string") return craft.name;
  if ("file" in craft && typeof craft.file === "string") return names[craft.file] ?? craft.file;
  return "not named";
}

/** An instant with its year and zone, as a filed paper needs it; a text that is no time as it stands. */
export function instantText(text: string, zone: string): string {
  const instant = Date.parse(text);
  if (Number.isNaN(instant)) return text;
  return `${localInput(instant, zone).replace("T", " ")} ${zoneText(instant, zone)}`;
}
