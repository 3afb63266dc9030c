/** What XML 1.0 (section 2.2, production 2) does not take as a character. */
const NOT_XML = /[^\t\n\r\u0020-\uD7FF\uE000-\uFFFD\u{10000}-\u{10FFFF}]/gu;

const ENTITY: Readonly<Record<string, string>> = {
  "&": "&amp;",
  "<": "&lt;",
  ">": "&gt;",
  '"': "&quot;",
  "'": "&apos;",
};

/** Text for an element or an attribute; a character that XML cannot carry becomes U+FFFD. */
export function xmlText(text: string): string {
  return text.replace(NOT_XML, "\uFFFD").replace(/[&<>"']/g, (character) => ENTITY[character] ?? character);
}

/** A number as xsd:decimal: no exponent, at most `decimals` places, no needless zeros. */
export function xmlDecimal(value: number, decimals: number): string {
  if (!Number.isFinite(value)) throw new Error(`a figure for XML is ${value}`);
  const text = value.toFixed(decimals);
  const short = text.includes(".") ? text.replace(/\.?0+$/, "") : text;
  return short === "-0" ? "0" : short;
}
