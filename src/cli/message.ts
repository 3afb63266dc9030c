/** Longest message, characters, its line end not counted. */
const LONGEST = 1500;

/** Text on one line, without controls that a terminal would obey. */
export function oneLine(text: string): string {
  return text.replace(/[\p{Cc}\p{Zl}\p{Zp}\u202A-\u202E\u2066-\u2069\s]+/gu, " ").trim();
}

/** A message on one line of standard error, at most 1,500 characters. */
export function messageLine(message: string): string {
  const line = oneLine(`legwork: ${message}`);
  if (line.length <= LONGEST) return `${line}\n`;
  // A surrogate pair is not cut in two.
  return `${line.slice(0, LONGEST - 1).replace(/[\uD800-\uDBFF]$/, "")}…\n`;
}
