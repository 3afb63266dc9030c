import * as z from "zod/mini";
import { objectOf, oneOf, optional, POSITIVE, quantity, sentence } from "./schema-parts.ts";
import { time } from "./time-schema.ts";

const speed = (description: string) => quantity(["speed"], "speed", POSITIVE, description);

/** What a pace that holds something says of an arrival beside it, and the other way round. */
const NOT_BOTH = 'a pace holds something or asks for an arrival, not both; found "hold" beside "arrive"';
const BESIDE_HOLD = { arrive: NOT_BOTH };
const BESIDE_ARRIVE = {
  hold: NOT_BOTH,
  speed: 'a pace that asks for an arrival finds its speed itself; found "speed" beside "arrive"',
};

const holding = z.discriminatedUnion(
  "hold",
  [
    objectOf(
      "a pace that holds the through-speed",
      {
        hold: oneOf("hold", ["through-speed"], "Hold the speed through the medium."),
        speed: optional(speed("Speed through the medium; the craft's own unless given.")),
      },
      "Hold the speed through the medium.",
      BESIDE_HOLD,
    ),
    objectOf(
      "a pace that holds the ground-speed",
      {
        hold: oneOf("hold", ["ground-speed"], "Hold the speed over the ground."),
        speed: optional(speed("Speed over the ground; the craft's own speed unless given.")),
      },
      "Hold the speed over the ground.",
      BESIDE_HOLD,
    ),
    objectOf(
      "a pace that holds the power",
      {
        hold: oneOf("hold", ["power"], "Hold the power, hotel load apart."),
        power: quantity(["power"], "power", POSITIVE, "The power to hold, hotel load apart."),
      },
      "Hold the power.",
      BESIDE_HOLD,
    ),
    objectOf(
      "a pace of least energy",
      {
        hold: oneOf(
          "hold",
          ["least-energy"],
          "At each point the speed of least energy for the ground made good.",
        ),
      },
      "The speed of least energy over the ground.",
      BESIDE_HOLD,
    ),
  ],
  {
    error: (issue) =>
      issue.code === "invalid_union"
        ? holdSentence((issue.input as { hold?: unknown } | undefined)?.hold)
        : sentence("pace", "is an object with the key hold or arrive", issue.input),
  },
);

function holdSentence(found: unknown): string {
  const rule = 'takes one of "through-speed", "ground-speed", "power", "least-energy"';
  return sentence("hold", found === undefined ? `${rule}, or "arrive" stands in its place` : rule, found);
}

const arrivalWindow = objectOf(
  "an arrival",
  {
    notBefore: optional(time("notBefore", "Earliest arrival wanted.")),
    notAfter: time("notAfter", "Latest arrival wanted."),
  },
  "An arrival between two times.",
);

const arriving = objectOf(
  "a pace that asks for an arrival",
  {
    arrive: z
      .union([time("arrive", "The arrival wanted."), arrivalWindow], {
        error: (issue) =>
          sentence(
            "arrive",
            'takes an ISO 8601 date and time with its zone, or { "notBefore", "notAfter" } of two',
            issue.input,
          ),
      })
      .check(z.meta({ description: "When to arrive." })),
  },
  "The constant through-speed that arrives when it should, within the craft's speeds.",
  BESIDE_ARRIVE,
);

/** The pace of a plan: one of four told apart by `hold`, or the arrival that it is to make. */
export const paceSchema = z
  .union([holding, arriving], {
    error: (issue) => sentence("pace", "is an object with the key hold or arrive", issue.input),
  })
  .check(z.meta({ description: "The rule by which the craft chooses its speed." }));
