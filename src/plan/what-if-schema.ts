import { type Bounds, bareNumber, lineOfText, objectOf, optional, quantity } from "./schema-parts.ts";

/*
 * Beyond these a change is a slip of the pen (120 for 1.2, a time in the wrong unit) or a plan of its own, rather than something
 * that may happen to this one.
 */
const FACTOR: Bounds = { atLeast: 0, atMost: 10 };
const TURN_DEG = 360;
const MOST_SPEED_M_S = 100;
const MOST_CONSUMPTION = 9;
const YEAR_S = 365 * 86400;

function eitherWay(most: number): Bounds {
  return { atLeast: -most, atMost: most };
}

/** A change of what the estimate rests on. */
export const whatIfSchema = objectOf(
  "a what-if",
  {
    name: optional(lineOfText("name", "Name of the what-if; its changes in words unless given.")),
    wind: optional(bareNumber("wind", FACTOR, "Factor of the wind's speed and gusts, 0 to 10.")),
    current: optional(bareNumber("current", FACTOR, "Factor of the current's speed, 0 to 10.")),
    veer: optional(
      quantity(
        ["angle"],
        "veer",
        eitherWay(TURN_DEG),
        "Turns the wind clockwise, or anticlockwise where negative; at most 360 deg either way.",
      ),
    ),
    speed: optional(
      quantity(
        ["speed"],
        "speed",
        eitherWay(MOST_SPEED_M_S),
        'Added to every speed ordered, as "-1 kn"; at most 100 m/s either way.',
      ),
    ),
    consumption: optional(
      quantity(
        ["share"],
        "consumption",
        { above: -1, atMost: MOST_CONSUMPTION },
        "Share by which everything spent is more, above -100 % and at most 900 %.",
      ),
    ),
    late: optional(
      quantity(
        ["time"],
        "late",
        eitherWay(YEAR_S),
        "Later departure; earlier where negative. At most 8760 h, a year, either way.",
      ),
    ),
  },
  "A change of what the estimate rests on, to see its consequences; several keys act together.",
);
