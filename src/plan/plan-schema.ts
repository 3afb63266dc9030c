import * as z from "zod/mini";
import { columnNames } from "../field/column-names.ts";
import { craftSchema } from "./craft-schema.ts";
import { errorSchema } from "./error-schema.ts";
import { paceSchema } from "./pace-schema.ts";
import { parseCoordinate } from "./position.ts";
import {
  fileName,
  lineOfText,
  listOf,
  NOT_NEGATIVE,
  objectOf,
  oneOf,
  optional,
  POSITIVE,
  quantity,
  readBy,
  sentence,
  UNSURE_SHARE,
  wholeNumber,
} from "./schema-parts.ts";
import { time } from "./time-schema.ts";
import { whatIfSchema } from "./what-if-schema.ts";
import { windowSchema } from "./window-schema.ts";

const RANGE = { lat: { minimum: -90, maximum: 90 }, lon: { minimum: -180, maximum: 360 } };

const coordinate = (axis: "lat" | "lon", description: string) => {
  const rule =
    axis === "lat" ? `takes degrees, as 50.358 or "50°21.5'N"` : `takes degrees, as -4.151 or "4°09.05'W"`;
  return readBy(
    z
      .union([z.number(), z.string()], {
        error: (issue) => sentence(axis === "lat" ? "latitude" : "longitude", rule, issue.input),
      })
      // For numbers; a text has figures at least.
      .check(z.meta({ ...RANGE[axis], pattern: "\\d", description })),
    (value) => parseCoordinate(value, axis),
  );
};

const path = oneOf(
  "path",
  ["geodesic", "rhumb"],
  "Shortest line, or line of constant course; geodesic unless given.",
);

const waypoint = objectOf(
  "a waypoint",
  {
    name: optional(lineOfText("name", "Name of the waypoint.")),
    lat: coordinate("lat", "Latitude: degrees, north positive, or a text as 50°21.5'N."),
    lon: coordinate("lon", "Longitude: degrees, east positive, or a text as 4°09'03\"W."),
    path: optional(path),
    speed: optional(quantity(["speed"], "speed", POSITIVE, "Speed of the leg that arrives here.")),
    height: optional(quantity(["length"], "height", NOT_NEGATIVE, "Height above the surface here.")),
    stay: optional(
      quantity(["time"], "stay", { above: 0, atMost: 1e9 }, "Time spent here before the next leg."),
    ),
  },
  "A waypoint; path, speed and height belong to the leg that arrives at it.",
);

const route = objectOf(
  "a route",
  {
    name: optional(lineOfText("name", "Name of the route.")),
    path: optional(path),
    waypoints: listOf(
      "waypoints",
      waypoint,
      2,
      "waypoints",
      "The waypoints in order, none equal to the one before it.",
    ),
  },
  "A route.",
);

const alternate = objectOf(
  "an alternate",
  {
    name: optional(lineOfText("name", "Name of the alternate.")),
    lat: coordinate("lat", "Latitude: degrees, north positive, or a text as 50°21.5'N."),
    lon: coordinate("lon", "Longitude: degrees, east positive, or a text as 4°09'03\"W."),
    height: optional(
      quantity(
        ["length"],
        "height",
        NOT_NEGATIVE,
        "Height above the surface there; that of the place of turning off unless given.",
      ),
    ),
  },
  "A place to go to in place of the destination.",
);

const COLUMN_NAMES = [
  ...new Set([...columnNames("wind").values(), ...columnNames("current").values()].flat()),
];

const columns = objectOf(
  "a column mapping",
  Object.fromEntries(
    COLUMN_NAMES.map((name) => [
      name,
      optional(lineOfText("a header", `Header of the column that holds ${name}.`)),
    ]),
  ),
  "Name of an axis or quantity, and the header that it has in the file.",
);

const field = objectOf(
  "a field",
  {
    role: oneOf("role", ["wind", "current"], "What the field is."),
    file: fileName("Name of a CSV file, relative to the plan."),
    columns: optional(columns),
    gaps: optional(
      oneOf("gaps", ["nearest", "zero", "stop"], "What a missing value does; nearest unless given."),
    ),
    beyond: optional(oneOf("beyond", ["stop", "hold"], "After the last valid time; stop unless given.")),
    outside: optional(oneOf("outside", ["stop", "zero"], "Outside the grid's area; stop unless given.")),
    error: optional(errorSchema),
    member: optional(wholeNumber("member", "Number of the ensemble's member that the file is.")),
  },
  "A file of gridded wind or current.",
);

const craftReference = objectOf(
  "a craft reference",
  { file: fileName("Name of a craft file, relative to the plan.") },
  "A craft in a file of its own.",
);

/** A plan file. */
export const planSchema = objectOf(
  "a plan",
  {
    $schema: optional(lineOfText("$schema", "Address of this schema, for editors.")),
    format: oneOf("format", ["legwork-plan/1"], "Format and version of the file."),
    title: optional(lineOfText("title", "Title of the plan.", true)),
    departure: time("departure", "Date and time of departure, ISO 8601 with its zone."),
    craft: z
      .union([craftReference, craftSchema], {
        error: (issue) => sentence("craft", "is an object: { file } or the craft itself", issue.input),
      })
      .check(z.meta({ description: "The craft: its file, or the craft itself." })),
    pace: optional(paceSchema),
    window: optional(windowSchema),
    reserve: optional(
      quantity(
        ["share", "energy", "mass", "volume", "time"],
        "reserve",
        NOT_NEGATIVE,
        "A share of the usable store, an amount in its kind, or a time at the final leg's rate under way.",
      ),
    ),
    confidence: optional(
      quantity(
        ["share"],
        "confidence",
        UNSURE_SHARE,
        "Probability with which the reserve has to hold under the stated errors of the fields; below 100 %.",
      ),
    ),
    fields: optional(
      listOf("fields", field, 0, "fields", "Files of wind and current; the earlier wins where two overlap."),
    ),
    routes: listOf("routes", route, 1, "route", "The candidate routes."),
    whatIf: optional(
      listOf(
        "whatIf",
        whatIfSchema,
        0,
        "what-ifs",
        "Changes whose consequences are estimated beside each route.",
      ),
    ),
    alternates: optional(
      listOf(
        "alternates",
        alternate,
        0,
        "alternates",
        "Places to turn off to; with any, the estimate says how far each route can still turn back.",
      ),
    ),
  },
  "A plan: departure, craft, pace, fields and candidate routes.",
);

/** A plan as its file holds it: quantities, times and positions as the user wrote them. */
export type PlanDocument = z.input<typeof planSchema>;

/** A plan after the schema: quantities read, nothing yet checked against one another. */
export type PlanParts = z.output<typeof planSchema>;
