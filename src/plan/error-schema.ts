import { objectOf, POSITIVE, quantity } from "./schema-parts.ts";

/** The stated error of a field. */
export const errorSchema = objectOf(
  "an error",
  {
    speed: quantity(["speed"], "speed", POSITIVE, "Standard deviation of each component."),
    length: quantity(["length"], "length", POSITIVE, "Correlation length of the error."),
    time: quantity(["time"], "time", POSITIVE, "Correlation time of the error."),
  },
  "How wrong the forecast may be: standard deviation per component, exponential correlation in place and time.",
);
