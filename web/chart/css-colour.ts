/** A custom property's value as the page's theme has it now. */
export function cssColour(property: string): string {
  return getComputedStyle(document.documentElement).getPropertyValue(property).trim();
}
