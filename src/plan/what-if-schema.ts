import { bareNumber, lineOfText, NOT_NEGATIVE, objectOf, quantity } from "./schema-parts.ts";

/** A change of what the estimate rests on. */
export const whatIfSchema = objectOf(
  "a what-if",
  {
    name: lineOfText("name", "Name of the what-if; its changes in words unless given.").optional(),
    wind: bareNumber("wind", NOT_NEGATIVE, "Factor of the wind's speed and gusts.").optional(),
    current: bareNumber("current", NOT_NEGATIVE, "Factor of the current's speed.").optional(),
    veer: quantity(
      ["angle"],
      "veer",
      {},
      "Turns the wind clockwise, or anticlockwise where negative.",
    ).optional(),
    speed: quantity(["speed"], "speed", {}, 'Added to every speed ordered, as "-1 kn".').optional(),
    consumption: quantity(
      ["share"],
      "consumption",
      { above: -1 },
      "Share by which everything spent is more.",
    ).optional(),
    late: quantity(["time"], "late", {}, "Later departure; earlier where negative.").optional(),
  },
  "A change of what the estimate rests on, to see its consequences; several keys act together.",
);
