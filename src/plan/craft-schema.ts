import type * as z from "zod";
import { airDensity, efficiency, powerSchema, RATE } from "./power-schema.ts";
import {
  bareNumber,
  lineOfText,
  NOT_NEGATIVE,
  objectOf,
  oneOf,
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
    speed: quantity(
      ["speed"],
      "speed",
      POSITIVE,
      "Speed through the medium where the pace names none.",
    ).optional(),
    power: powerSchema,
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
