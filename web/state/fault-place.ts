import { createContext } from "preact";
import { useContext } from "preact/hooks";

/** The key of the plan at fault, as `whatIf[0].wind`; `null` where none is. */
export const FaultPlace = createContext<string | null>(null);

/** The element that says what is wrong with the plan. */
export const PLAN_FAULT = "plan-fault";

/** Marks a field as invalid: where its key of the plan is at fault, or an element of its own says so. */
export function useFault(at?: string, faultId?: string): object {
  const place = useContext(FaultPlace);
  const isHere = at !== undefined && (place === at || place?.startsWith(`${at}[`));
  const told = faultId ?? (isHere ? PLAN_FAULT : undefined);
  return told === undefined ? {} : { "aria-invalid": true, "aria-describedby": told };
}
