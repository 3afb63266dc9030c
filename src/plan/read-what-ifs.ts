import { type WhatIf, whatIfText } from "../choose/what-if.ts";
import type { FieldRole } from "../field/field.ts";
import { quoted } from "../found.ts";
import type { Fault } from "./first-issue.ts";
import type { Plan } from "./plan.ts";
import type { PlanParts } from "./plan-schema.ts";

type WhatIfParts = NonNullable<PlanParts["whatIf"]>[number];

/**
 * The what-ifs of a plan; one without a name is called by its changes.
 *
 * Errors: two of one name, one that changes nothing, a wind or a current that the plan has no field of, a speed that the pace
 * does not hold.
 */
export function readWhatIfs(
  parts: NonNullable<PlanParts["whatIf"]>,
  plan: Pick<Plan, "pace" | "fields">,
  fault: Fault,
): readonly WhatIf[] {
  const names = new Map<string, number>();
  return parts.map((part, n) => {
    checkKeys(part, plan, (key, text) => fault(["whatIf", n, ...(key === "" ? [] : [key])], text));
    const whatIf = whatIfOf(part);
    const earlier = names.get(whatIf.name);
    if (earlier !== undefined)
      throw fault(
        ["whatIf", n],
        `what-ifs have different names; found ${quoted(whatIf.name)}, the name of whatIf[${earlier}]`,
      );
    names.set(whatIf.name, n);
    return whatIf;
  });
}

function checkKeys(
  part: WhatIfParts,
  { pace, fields }: Pick<Plan, "pace" | "fields">,
  fault: (key: string, text: string) => Error,
): void {
  const { name: _, ...changes } = part;
  if (Object.values(changes).every((change) => change === undefined))
    throw fault("", 'a what-if changes something, as { "wind": 1.2 }; found no change');
  const needed: readonly (readonly [keyof WhatIfParts, FieldRole])[] = [
    ["wind", "wind"],
    ["veer", "wind"],
    ["current", "current"],
  ];
  for (const [key, role] of needed) {
    if (part[key] !== undefined && !fields.some((field) => field.role === role))
      throw fault(key, `a change of the ${role} needs a field of it in the plan; found none`);
  }
  if (part.speed !== undefined && pace.hold !== "through-speed" && pace.hold !== "ground-speed")
    throw fault(
      "speed",
      `the pace ${quoted(pace.hold)} chooses the speed itself, so a what-if names none; found ${quoted(part.speed.text)}`,
    );
}

function whatIfOf({ name, wind, current, veer, speed, consumption, late }: WhatIfParts): WhatIf {
  const change = {
    wind: wind ?? 1,
    current: current ?? 1,
    veer_deg: veer?.value ?? 0,
    speed_m_s: speed?.value ?? 0,
    consumption: consumption?.value ?? 0,
    late_s: late?.value ?? 0,
  };
  return { name: name ?? whatIfText(change), ...change };
}
