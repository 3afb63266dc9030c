import type { NamedParts } from "../faults/field-labels.ts";
import type { InputError } from "./core.ts";

/** A fault as the page tells it. What knows the labels is loaded with the first fault that names a place. */
export async function faultText(fault: InputError, plan?: NamedParts): Promise<string> {
  if (fault.place.key === undefined) return fault.message;
  const told = await import("../faults/told-by-label.ts").catch(() => null);
  return told === null ? fault.message : told.toldByLabel(fault, plan);
}
