import type * as z from "zod/mini";
import { airDensity, efficiency, powerSchema, RATE } from "./power-schema.ts";
import {
  bareNumber,
  lineOfText,
  NOT_NEGATIVE,
  objectOf,
  oneOf,
  optional,
  POSITIVE,
  POSITIVE_SHARE,
  quantity,
} from "./schema-parts.ts";

const windage = objectOf(
  "windage",
  {
    frontalArea: quantity(["area"], "frontal area", POSITIVE, "Frontal area above the water."),
    dragCoefficient: bareNumber("drag coefficient", POSITIVE, "Drag coefficient of that area."),
    efficiency: efficiency("propulsive"),
    airDensity: optional(airDensity),
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
    usable: optional(
      quantity(["share"], "usable", POSITIVE_SHARE, "Share of the capacity; 100 % unless given."),
    ),
    specificConsumption: optional(
      quantity(
        ["specific consumption"],
        "specific consumption",
        POSITIVE,
        "Fuel for the energy at the shaft.",
      ),
    ),
    density: optional(quantity(["density"], "density", POSITIVE, "Density of the fuel.")),
  },
  "Fuel or battery aboard.",
);

const limits = objectOf(
  "limits",
  {
    wind: optional(quantity(["speed"], "wind", POSITIVE, "Greatest wind.")),
    gust: optional(quantity(["speed"], "gust", POSITIVE, "Greatest gust.")),
    groundSpeed: optional(quantity(["speed"], "ground speed", POSITIVE, "Least speed over the ground.")),
    opposedWind: optional(
      quantity(
        ["speed"],
        "opposed wind",
        NOT_NEGATIVE,
        "Wind from which on wind against current is told; 8 m/s unless given.",
      ),
    ),
    opposedCurrent: optional(
      quantity(
        ["speed"],
        "opposed current",
        NOT_NEGATIVE,
        "Current from which on wind against current is told; 0.5 m/s unless given.",
      ),
    ),
  },
  "Limits of the craft and of its crew.",
);

/** A craft file, or the craft inside a plan. */
export const craftSchema = objectOf(
  "a craft",
  {
    $schema: optional(lineOfText("$schema", "Address of this schema, for editors.")),
    name: lineOfText("name", "Name of the craft."),
    moves: oneOf("moves", ["water", "air"], "The medium that the craft moves through."),
    speed: optional(
      quantity(["speed"], "speed", POSITIVE, "Speed through the medium where the pace names none."),
    ),
    power: powerSchema,
    windage: optional(windage),
    speeds: optional(
      objectOf(
        "speeds",
        {
          min: quantity(["speed"], "least speed", NOT_NEGATIVE, "Least speed through the medium."),
          max: quantity(["speed"], "greatest speed", POSITIVE, "Greatest speed through the medium."),
        },
        "Range from which a speed is chosen, by the paces power, least-energy and arrive and where paces are compared.",
      ),
    ),
    hotel: optional(
      quantity(RATE, "hotel", NOT_NEGATIVE, "What is spent all the time, under way and staying."),
    ),
    store,
    limits: optional(limits),
  },
  "A craft: how it moves, what it spends, what it carries.",
);

/** A craft as its file holds it: quantities are texts with their units. */
export type CraftDocument = z.input<typeof craftSchema>;

/** A craft after the schema: quantities read, nothing yet checked against one another. */
export type CraftParts = z.output<typeof craftSchema>;
