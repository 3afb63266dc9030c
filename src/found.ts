const LONGEST_FOUND = 60;

/**
 * What stood where something else was wanted, for the end of an error's sentence: one line, at most about 60 characters.
 *
 * @param value anything that JSON can hold; `undefined` where there was nothing
 * @example
 * foundText("12 kts") // → '"12 kts"'
 * foundText([1, 2]) // → "a list"
 */
export function foundText(value: unknown): string {
  if (value === undefined) return "nothing";
  if (Array.isArray(value)) return value.length === 0 ? "an empty list" : "a list";
  if (typeof value === "string") return quoted(value);
  if (typeof value === "object" && value !== null) return "an object";
  return String(value);
}

/** A text in double quotes on one line: control characters and line separators escaped, the middle left out where it is long. */
export function quoted(text: string): string {
  const whole = Array.from(text.slice(0, 4 * LONGEST_FOUND));
  const long = whole.length > LONGEST_FOUND;
  const shown = long ? `${whole.slice(0, LONGEST_FOUND - 1).join("")}…` : text;
  return JSON.stringify(shown).replace(
    /[\u007f-\u009f\u2028\u2029\u202a-\u202e\u2066-\u2069]/g,
    escapeCharacter,
  );
}

function escapeCharacter(character: string): string {
  return `\\u${character.charCodeAt(0).toString(16).padStart(4, "0")}`;
}
