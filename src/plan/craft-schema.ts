import * as z from "zod";
import {
  bareNumber,
  lineOfText,
  listOf,
  NOT_NEGATIVE,
  objectOf,
  oneOf,
  POSITIVE,
  POSITIVE_SHARE,
  quantity,
  sentence,
} from "./schema-parts.ts";

const RATE = ["power", "fuel rate by mass", "fuel rate by volume"] as const;

const airDensity = quantity(
  ["density"],
  "air density",
  POSITIVE,
  "Density of the air; 1.225 kg/m3 unless given.",
);
const efficiency = (of: string) => quantity(["share"], "efficiency", POSITIVE_SHARE, `Efficiency, ${of}.`);
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
    exponent: bareNumber("exponent", { above: 0, atMost: 10 }, "Power of the speed; 3 unless given.").optional(),
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
    airDensity: airDensity.optional(),
    efficiency: efficiency("from store to rotor; 100 % unless given").optional(),
    mass: quantity(["mass"], "mass", POSITIVE, "Mass, needed where a route climbs.").optional(),
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
    airDensity: airDensity.optional(),
  },
  "Fixed-wing power from a parabolic drag polar.",
);

const constantModel = objectOf(
  "a constant power model",
  { model: oneOf("model", ["constant"], "The same rate at every speed."), rate },
  "The same rate at every speed.",
);

const MODELS = '"table", "cube", "rotor", "wing", "constant"';

const power = z
  .discriminatedUnion("model", [tableModel, cubeModel, rotorModel, wingModel, constantModel], {
    error: (issue) =>
      issue.code === "invalid_union"
        ? sentence("model", `takes one of ${MODELS}`, (issue.input as { model?: unknown } | undefined)?.model)
        : sentence("power", "is an object with a model", issue.input),
  })
  .meta({ description: "What the craft spends as a function of its speed through the medium." });

const windage = objectOf(
  "windage",
  {
    frontalArea: quantity(["area"], "frontal area", POSITIVE, "Frontal area above the water."),
    dragCoefficient: bareNumber("drag coefficient", POSITIVE, "Drag coefficient of that area."),
    efficiency: efficiency("propulsive"),
    airDensity: airDensity.optional(),
  },
  "Added resistance of the wind, for a craft in water.",
);

const store = objectOf(
  "a store",
  {
    capacity: quantity(
      ["energy", "mass", "volume"],
      "capacity",
      POSITIVE,
      "Energy, or mass or volume of fuel.",
    ),
    usable: quantity(
      ["share"],
      "usable share",
      POSITIVE_SHARE,
      "Share of the capacity; 100 % unless given.",
    ).optional(),
    specificConsumption: quantity(
      ["specific consumption"],
      "specific consumption",
      POSITIVE,
      "Fuel for the energy at the shaft.",
    ).optional(),
    density: quantity(["density"], "density", POSITIVE, "Density of the fuel.").optional(),
  },
  "Fuel or battery aboard.",
);

const limits = objectOf(
  "limits",
  {
    wind: quantity(["speed"], "wind limit", POSITIVE, "Greatest wind.").optional(),
    gust: quantity(["speed"], "gust limit", POSITIVE, "Greatest gust.").optional(),
    groundSpeed: quantity(
      ["speed"],
      "ground speed limit",
      POSITIVE,
      "Least speed over the ground.",
    ).optional(),
    opposedWind: quantity(
      ["speed"],
      "opposed wind",
      NOT_NEGATIVE,
      "Wind from which on wind against current is told; 8 m/s unless given.",
    ).optional(),
    opposedCurrent: quantity(
      ["speed"],
      "opposed current",
      NOT_NEGATIVE,
      "Current from which on wind against current is told; 0.5 m/s unless given.",
    ).optional(),
  },
  "Limits of the craft and of its crew.",
);

/** A craft file, or the craft inside a plan. */
export const craftSchema = objectOf(
  "a craft",
  {
    $schema: lineOfText("$schema", "Address of this schema, for editors.").optional(),
    name: lineOfText("name", "Name of the craft."),
    moves: oneOf("moves", ["water", "air"], "The medium that the craft moves through."),
    speed: speed("Speed through the medium where the pace names none.").optional(),
    power,
    windage: windage.optional(),
    speeds: objectOf(
      "speeds",
      {
        min: quantity(["speed"], "least speed", NOT_NEGATIVE, "Least speed through the medium."),
        max: quantity(["speed"], "greatest speed", POSITIVE, "Greatest speed through the medium."),
      },
      "Range of speeds for the paces power and least-energy.",
    ).optional(),
    hotel: quantity(
      RATE,
      "hotel load",
      NOT_NEGATIVE,
      "What is spent all the time, under way and staying.",
    ).optional(),
    store,
    limits: limits.optional(),
  },
  "A craft: how it moves, what it spends, what it carries.",
);

/** A craft as its file holds it: quantities are texts with their units. */
export type CraftDocument = z.input<typeof craftSchema>;

/** A craft after the schema: quantities read, nothing yet checked against one another. */
export type CraftParts = z.output<typeof craftSchema>;
