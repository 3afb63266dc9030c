import { bareNumber, lineOfText, NOT_NEGATIVE, objectOf, optional, quantity } from "./schema-parts.ts";

/** A change of what the estimate rests on. */
export const whatIfSchema = objectOf(
  "a what-if",
  {
    name: optional(lineOfText("name", "Name of the what-if; its changes in words unless given.")),
    wind: optional(bareNumber("wind", NOT_NEGATIVE, "Factor of the wind's speed and gusts.")),
    current: optional(bareNumber("current", NOT_NEGATIVE, "Factor of the current's speed.")),
    veer: optional(
      quantity(["angle"], "veer", {}, "Turns the wind clockwise, or anticlockwise where negative."),
    ),
    speed: optional(quantity(["speed"], "speed", {}, 'Added to every speed ordered, as "-1 kn".')),
    consumption: optional(
      quantity(["share"], "consumption", { above: -1 }, "Share by which everything spent is more."),
    ),
    late: optional(quantity(["time"], "late", {}, "Later departure; earlier where negative.")),
  },
  "A change of what the estimate rests on, to see its consequences; several keys act together.",
);
