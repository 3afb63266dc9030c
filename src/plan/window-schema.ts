import { listOf, objectOf, optional, POSITIVE, quantity } from "./schema-parts.ts";
import { time } from "./time-schema.ts";

/** Departures to compare. */
export const windowSchema = objectOf(
  "a window",
  {
    from: time("from", "First departure."),
    to: time("to", "Last departure."),
    every: quantity(["time"], "every", POSITIVE, "Step from one departure to the next."),
    speeds: optional(
      listOf(
        "speeds",
        quantity(["speed"], "speed", POSITIVE, "A speed to try."),
        1,
        "speed",
        "Speeds to try in place of the pace's.",
      ),
    ),
    arriveBy: optional(time("arriveBy", "An arrival to keep: the latest departure for it is looked for.")),
  },
  "Departures to compare, and speeds.",
);
