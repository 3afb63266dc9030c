/*
 * Text that a stranger wrote (titles, names, file names) set into a report: on one line, of known width, unable to
 * move what stands beside it.
 */

/** Controls, separators of lines, and format characters without a glyph; joiners stay, since scripts and emoji need them. */
const UNPRINTABLE =
  /[\p{Cc}\p{Zl}\p{Zp}\u00AD\u200B\u200E\u200F\u202A-\u202E\u2060-\u206F\uFEFF\u{E0000}-\u{E007F}]+/gu;
/** Halves of a surrogate pair that stand alone. */
const LONE_SURROGATE = /[\uD800-\uDFFF]/gu;
/** Scripts written from right to left: UAX #9, classes R and AL. */
const RIGHT_TO_LEFT = /[\u0590-\u08FF\uFB1D-\uFDFF\uFE70-\uFEFF\u{10800}-\u{10FFF}\u{1E800}-\u{1EFFF}]/u;
/** East Asian Wide and Fullwidth (UAX #11), by block, and emoji. */
const WIDE =
  /[\u1100-\u115F\u2329\u232A\u2E80-\u303E\u3041-\uA4CF\uA960-\uA97C\uAC00-\uD7A3\uF900-\uFAFF\uFE10-\uFE19\uFE30-\uFE6F\uFF00-\uFF60\uFFE0-\uFFE6\u{16FE0}-\u{18AFF}\u{1AFF0}-\u{1B2FF}\u{1F100}-\u{1F1FF}\u{1F200}-\u{1FAFF}\u{20000}-\u{3FFFD}]|\p{Emoji_Presentation}|\uFE0F/u;
const ZERO_WIDTH = /^[\p{Mn}\p{Me}\p{Cf}]+$/u;
const PRINTABLE_ASCII = /^[ -~]*$/;

/** The text on one line: controls and characters that change the direction of writing become a space, lone surrogates U+FFFD. */
export function plainText(text: string): string {
  return PRINTABLE_ASCII.test(text)
    ? text.trim()
    : text.replace(UNPRINTABLE, " ").replace(LONE_SURROGATE, "\uFFFD").replace(/ +/g, " ").trim();
}

/**
 * The text isolated (UAX #9, FSI and PDI) where it holds a script written from right to left, so that the figures beside it
 * keep their order.
 */
export function isolated(text: string): string {
  return RIGHT_TO_LEFT.test(text) ? `\u2068${text}\u2069` : text;
}

function characters(text: string): string[] {
  return Array.from(
    new Intl.Segmenter("en", { granularity: "grapheme" }).segment(text),
    (part) => part.segment,
  );
}

function characterWidth(character: string): number {
  if (ZERO_WIDTH.test(character)) return 0;
  return WIDE.test(character) ? 2 : 1;
}

/** Columns that the text takes in a terminal: 2 for wide characters and emoji, 0 for marks that combine. */
export function displayWidth(text: string): number {
  if (PRINTABLE_ASCII.test(text)) return text.length;
  return characters(text).reduce((width, character) => width + characterWidth(character), 0);
}

/** The text, cut with "…" where it is wider than `width` columns. */
export function clipped(text: string, width: number): string {
  if (displayWidth(text) <= width) return text;
  let kept = "";
  let used = 0;
  for (const character of characters(text)) {
    const next = characterWidth(character);
    if (used + next > width - 1) break;
    kept += character;
    used += next;
  }
  return `${kept.trimEnd()}…`;
}

/** The text with spaces before it up to `width` columns. */
export function rightAligned(text: string, width: number): string {
  return " ".repeat(Math.max(0, width - displayWidth(text))) + text;
}

/** The text with spaces after it up to `width` columns. */
export function leftAligned(text: string, width: number): string {
  return text + " ".repeat(Math.max(0, width - displayWidth(text)));
}

function pieces(word: string, width: number): string[] {
  if (displayWidth(word) <= width) return [word];
  const result: string[] = [];
  let piece = "";
  for (const character of characters(word)) {
    if (displayWidth(piece) + characterWidth(character) > width) {
      result.push(piece);
      piece = "";
    }
    piece += character;
  }
  return [...result, piece];
}

/** Lines of at most `width` columns: the first begins with `first`, the others with as many spaces. A word too long is cut. */
export function wrapped(text: string, width: number, first = ""): string[] {
  const indent = displayWidth(first);
  const room = width - indent;
  const lines: string[] = [];
  let line = "";
  for (const word of text.split(" ").flatMap((part) => pieces(part, room))) {
    const longer = line === "" ? word : `${line} ${word}`;
    if (displayWidth(longer) > room) {
      lines.push(line);
      line = word;
    } else line = longer;
  }
  lines.push(line);
  return lines.map((part, index) => ((index === 0 ? first : " ".repeat(indent)) + part).trimEnd());
}
