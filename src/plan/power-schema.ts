import * as z from "zod/mini";
import {
  bareNumber,
  listOf,
  NOT_NEGATIVE,
  objectOf,
  oneOf,
  optional,
  POSITIVE,
  POSITIVE_SHARE,
  quantity,
  sentence,
} from "./schema-parts.ts";

/** What a rate may be. */
export const RATE = ["power", "fuel rate by mass", "fuel rate by volume"] as const;

/** Density of the air around the craft. */
export const airDensity = quantity(
  ["density"],
  "air density",
  POSITIVE,
  "Density of the air; 1.225 kg/m3 unless given.",
);
/** An efficiency, and what it is of. */
export const efficiency = (of: string) =>
  quantity(["share"], "efficiency", POSITIVE_SHARE, `Efficiency, ${of}.`);
const speed = (description: string) => quantity(["speed"], "speed", POSITIVE, description);
const rate = quantity(
  RATE,
  "rate",
  NOT_NEGATIVE,
  "What is spent at this speed: power, or fuel in kg/h, t/d or L/h.",
);

const tableModel = objectOf(
  "a table power model",
  {
    model: oneOf(
      "model",
      ["table"],
      "Measured rows, monotone piecewise cubic between them, no value outside.",
    ),
    rows: listOf(
      "rows",
      objectOf(
        "a row of a power table",
        {
          speed: quantity(["speed"], "speed", NOT_NEGATIVE, "Speed through the medium."),
          rate,
        },
        "One measured point of the speed-power curve.",
      ),
      2,
      "rows",
      "Rows of different speeds, their rates all of one kind.",
    ),
  },
  "Speed-power table.",
);

const cubeModel = objectOf(
  "a cube power model",
  {
    model: oneOf("model", ["cube"], "A power law through one point."),
    reference: objectOf(
      "a reference",
      {
        speed: speed("Speed of the known point."),
        power: quantity(["power"], "power", POSITIVE, "Power there."),
      },
      "The known point of the curve.",
    ),
    exponent: optional(
      bareNumber("exponent", { above: 0, atMost: 10 }, "Power of the speed; 3 unless given."),
    ),
  },
  "Power as a power of the speed.",
);

const rotorModel = objectOf(
  "a rotor power model",
  {
    model: oneOf("model", ["rotor"], "A rotary-wing craft."),
    bladeProfilePower: quantity(
      ["power"],
      "blade profile power",
      NOT_NEGATIVE,
      "Blade profile power in hover.",
    ),
    inducedPower: quantity(["power"], "induced power", POSITIVE, "Induced power in hover."),
    tipSpeed: quantity(["speed"], "tip speed", POSITIVE, "Speed of the blade tip."),
    hoverInducedSpeed: quantity(["speed"], "hover induced speed", POSITIVE, "Mean induced speed in hover."),
    fuselageDragRatio: bareNumber("fuselage drag ratio", NOT_NEGATIVE, "Fuselage drag ratio."),
    solidity: bareNumber("solidity", POSITIVE, "Rotor solidity."),
    discArea: quantity(["area"], "disc area", POSITIVE, "Rotor disc area."),
    airDensity: optional(airDensity),
    efficiency: optional(efficiency("from store to rotor; 100 % unless given")),
    mass: optional(quantity(["mass"], "mass", POSITIVE, "Mass, needed where a route climbs.")),
  },
  "Rotary-wing power in forward flight.",
);

const wingModel = objectOf(
  "a wing power model",
  {
    model: oneOf("model", ["wing"], "A fixed-wing craft."),
    mass: quantity(["mass"], "mass", POSITIVE, "Mass."),
    wingArea: quantity(["area"], "wing area", POSITIVE, "Wing area."),
    zeroLiftDrag: bareNumber("zero-lift drag", POSITIVE, "Zero-lift drag coefficient."),
    inducedFactor: bareNumber("induced factor", POSITIVE, "Factor k of the drag polar."),
    efficiency: efficiency("from store to air"),
    airDensity: optional(airDensity),
  },
  "Fixed-wing power from a parabolic drag polar.",
);

const constantModel = objectOf(
  "a constant power model",
  { model: oneOf("model", ["constant"], "The same rate at every speed."), rate },
  "The same rate at every speed.",
);

const MODELS = '"table", "cube", "rotor", "wing", "constant"';

/** The power model of a craft: one of five, told apart by `model`. */
export const powerSchema = z
  .discriminatedUnion("model", [tableModel, cubeModel, rotorModel, wingModel, constantModel], {
    error: (issue) =>
      issue.code === "invalid_union"
        ? sentence("model", `takes one of ${MODELS}`, (issue.input as { model?: unknown } | undefined)?.model)
        : sentence("power", "is an object with a model", issue.input),
  })
  .check(z.meta({ description: "What the craft spends as a function of its speed through the medium." }));
