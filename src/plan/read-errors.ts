import type { ForecastError } from "../choose/forecast-error.ts";
import type { Fault } from "./first-issue.ts";
import type { PlanParts } from "./plan-schema.ts";

/**
 * The probability with which a plan's reserve has to hold.
 *
 * Errors: a plan that states no error, under which nothing would be tested.
 */
export function readConfidence(
  confidence: NonNullable<PlanParts["confidence"]>,
  errors: readonly ForecastError[],
  fault: Fault,
): number {
  if (errors.length === 0)
    throw fault(
      ["confidence"],
      'a confidence is held against the error of a field, as { "speed": "1.5 m/s", "length": "150 km", "time": "6 h" }; found no field with one',
    );
  return confidence.value;
}

/**
 * The stated errors of a plan's fields, one a role at most: the files of a role are one field, so that what one of them says holds
 * for all.
 *
 * Errors: two files of one role that say different errors.
 */
export function readErrors(fields: NonNullable<PlanParts["fields"]>, fault: Fault): readonly ForecastError[] {
  const errors: ForecastError[] = [];
  for (const [index, { role, error }] of fields.entries()) {
    if (error === undefined) continue;
    const read = {
      role,
      speed_m_s: error.speed.value,
      length_m: error.length.value,
      time_s: error.time.value,
    };
    const other = errors.find((each) => each.role === role);
    if (other === undefined) errors.push(read);
    else if (JSON.stringify(other) !== JSON.stringify(read))
      throw fault(
        ["fields", index, "error"],
        `the ${role} files are one field with one error; found another than that of an earlier file`,
      );
  }
  return errors;
}
