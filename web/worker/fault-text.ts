import type { NamedParts } from "../faults/field-labels.ts";
import type { InputError } from "./core.ts";

const NO_NAMES: NamedParts = { routes: [] };

/** A fault as the page tells it. What knows the labels is loaded with the first fault that names a place. */
export async function faultText(fault: InputError, plan = NO_NAMES): Promise<string> {
  if (fault.place.key === undefined) return fault.message;
  const told = await import("../faults/told-by-label.ts").catch(() => null);
  return told === null ? fault.message : told.toldByLabel(fault, plan);
}
