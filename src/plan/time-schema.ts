import * as z from "zod/mini";
import { readBy, sentence } from "./schema-parts.ts";
import { parseTime } from "./time.ts";

/** A date and time with its zone, turned into ms since 1970-01-01T00:00Z. */
export function time(name: string, description: string) {
  return readBy(
    z
      .string({
        error: (issue) =>
          sentence(
            name,
            'takes an ISO 8601 date and time with its zone, as "2027-05-04T06:00:00Z"',
            issue.input,
          ),
      })
      .check(z.meta({ description })),
    (text) => parseTime(text, name),
  );
}
