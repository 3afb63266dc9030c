import type { Alternate } from "../choose/alternate.ts";
import { quoted } from "../found.ts";
import type { Fault } from "./first-issue.ts";
import type { PlanParts } from "./plan-schema.ts";

/**
 * The alternates of a plan; one without a name is called `Alternate n`, counted from 1.
 *
 * Errors: two alternates of one name.
 */
export function readAlternates(
  parts: NonNullable<PlanParts["alternates"]>,
  fault: Fault,
): readonly Alternate[] {
  const names = new Map<string, number>();
  return parts.map(({ name: given, lat, lon, height }, a) => {
    const name = given ?? `Alternate ${a + 1}`;
    const earlier = names.get(name);
    if (earlier !== undefined)
      throw fault(
        ["alternates", a, "name"],
        `alternates have different names; found ${quoted(name)}, the name of alternates[${earlier}]`,
      );
    names.set(name, a);
    return { name, lat, lon, height_m: height?.value ?? null };
  });
}
