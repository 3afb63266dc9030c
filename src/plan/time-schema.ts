import * as z from "zod/mini";
import { readBy, sentence } from "./schema-parts.ts";
import { parseTime } from "./time.ts";

/** What is read as a time but for a day that its month has not, for JSON schemas. */
const PATTERN = [
  "^\\s*\\d{4}-(?:0[1-9]|1[0-2])-(?:0[1-9]|[12]\\d|3[01])",
  "[Tt](?:[01]\\d|2[0-3]):[0-5]\\d(?::[0-5]\\d(?:[.,]\\d+)?)?",
  "(?:[Zz]|[+-](?:[01]\\d|2[0-3])(?::?[0-5]\\d)?)\\s*$",
].join("");

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
      .check(z.meta({ pattern: PATTERN, description })),
    (text) => parseTime(text, name),
  );
}
