/** A bare number that was typed as a number; anything else stays the user's own text, for the core to read. */
export function asWritten(text: string): number | string {
  const value = Number(text);
  return text.trim() !== "" && Number.isFinite(value) ? value : text;
}
