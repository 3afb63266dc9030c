import * as z from "zod";
import { objectOf, oneOf, POSITIVE, quantity, sentence } from "./schema-parts.ts";

const speed = (description: string) => quantity(["speed"], "speed", POSITIVE, description);

/** The pace of a plan: one of four, told apart by `hold`. */
export const paceSchema = z
  .discriminatedUnion(
    "hold",
    [
      objectOf(
        "a pace that holds the through-speed",
        {
          hold: oneOf("hold", ["through-speed"], "Hold the speed through the medium."),
          speed: speed("Speed through the medium; the craft's own unless given.").optional(),
        },
        "Hold the speed through the medium.",
      ),
      objectOf(
        "a pace that holds the ground-speed",
        {
          hold: oneOf("hold", ["ground-speed"], "Hold the speed over the ground."),
          speed: speed("Speed over the ground; the craft's own speed unless given.").optional(),
        },
        "Hold the speed over the ground.",
      ),
      objectOf(
        "a pace that holds the power",
        {
          hold: oneOf("hold", ["power"], "Hold the power, hotel load apart."),
          power: quantity(["power"], "power", POSITIVE, "The power to hold, hotel load apart."),
        },
        "Hold the power.",
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
      ),
    ],
    {
      error: (issue) =>
        issue.code === "invalid_union"
          ? sentence(
              "hold",
              'takes one of "through-speed", "ground-speed", "power", "least-energy"',
              (issue.input as { hold?: unknown } | undefined)?.hold,
            )
          : sentence("pace", "is an object with the key hold", issue.input),
    },
  )
  .meta({ description: "The rule by which the craft chooses its speed." });
