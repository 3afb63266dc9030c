import * as z from "zod/mini";
import { craftSchema } from "./craft-schema.ts";
import { planSchema } from "./plan-schema.ts";

/**
 * JSON Schema (draft 2020-12) of plan and craft files, generated from the schemas that read them, for editors that complete
 * and check as one types. It knows keys, kinds, units and signs; what holds between keys, and bounds other than 0, only the reader checks.
 */
export function planJsonSchema(): object {
  return z.toJSONSchema(planSchema, { io: "input" });
}

/** As {@link planJsonSchema}, of a craft file. */
export function craftJsonSchema(): object {
  return z.toJSONSchema(craftSchema, { io: "input" });
}
