/** Longest message, characters, its line end not counted. */
const LONGEST = 1500;

/** A message on one line of standard error: no controls that a terminal would obey, at most 1,500 characters. */
export function messageLine(message: string): string {
  const line = `legwork: ${message}`
    .replace(/[\p{Cc}\p{Zl}\p{Zp}\u202A-\u202E\u2066-\u2069\s]+/gu, " ")
    .trim();
  const characters = Array.from(line);
  return `${characters.length <= LONGEST ? line : `${characters.slice(0, LONGEST - 1).join("")}…`}\n`;
}
