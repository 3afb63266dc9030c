import { InputError } from "../errors.ts";
import { quoted } from "../found.ts";

/** Deepest nesting that is read; a plan needs seven. It keeps a hostile text from exhausting the stack. */
const DEEPEST = 64;

const BLANK = /[ \t\n\r]*/y;
const NUMBER = /-?(?:0|[1-9]\d*)(?:\.\d+)?(?:[eE][+-]?\d+)?/y;
/** Every code point from the blank on, but for the double quote and the backslash. */
const PLAIN_TEXT = /[ !#-[\]-\u{10ffff}]*/uy;
const WORD = /[^\s,:[\]{}"]{1,20}/uy;
const ESCAPES: Readonly<Record<string, string>> = {
  '"': '"',
  "\\": "\\",
  "/": "/",
  b: "\b",
  f: "\f",
  n: "\n",
  r: "\r",
  t: "\t",
};

/**
 * Reads JSON text (RFC 8259). Stricter than `JSON.parse` in two things, a key given twice in an object and a number
 * that would be infinite, and the same in every browser in telling where a fault stands. A byte order mark before the text
 * is left out.
 *
 * @throws InputError with the line, and the column counted from 1 in UTF-16 units, of the first fault
 */
export function parseJson(text: string, file = ""): unknown {
  return new JsonReader(text, file).document();
}

class JsonReader {
  private readonly text: string;
  private readonly file: string;
  private at: number;
  private depth = 0;

  constructor(text: string, file: string) {
    this.text = text;
    this.file = file;
    this.at = text.startsWith("\ufeff") ? 1 : 0;
  }

  document(): unknown {
    const value = this.value();
    this.match(BLANK);
    if (this.at < this.text.length) throw this.fault("the text ends after its value");
    return value;
  }

  private value(): unknown {
    this.match(BLANK);
    const first = this.text[this.at];
    if (first === "{") return this.nested(() => this.object());
    if (first === "[") return this.nested(() => this.list());
    if (first === '"') return this.string();
    for (const [word, value] of [
      ["true", true],
      ["false", false],
      ["null", null],
    ] as const) {
      if (this.text.startsWith(word, this.at)) {
        this.at += word.length;
        return value;
      }
    }
    const number = this.match(NUMBER);
    if (number === "") throw this.fault("a value stands here");
    return this.number(number);
  }

  private number(digits: string): number {
    const value = Number(digits);
    if (Number.isFinite(value)) return value;
    this.at -= digits.length;
    throw this.fault("a number is below 1.8e308");
  }

  private nested<T>(read: () => T): T {
    if (++this.depth > DEEPEST) throw this.fault(`lists and objects are nested at most ${DEEPEST} deep`);
    this.at++;
    const value = read();
    this.depth--;
    return value;
  }

  private object(): Record<string, unknown> {
    const result: Record<string, unknown> = {};
    this.items("}", () => {
      const start = this.at;
      if (this.text[this.at] !== '"') throw this.fault("a key in double quotes stands here");
      const key = this.string();
      if (Object.hasOwn(result, key)) {
        this.at = start;
        throw this.fault(`a key stands once in its object, and ${quoted(key)} stands twice`);
      }
      this.match(BLANK);
      if (this.text[this.at] !== ":") throw this.fault(`a colon follows the key ${quoted(key)}`);
      this.at++;
      // Not `result[key] =`: the key `__proto__` would change the object's prototype and be lost.
      Object.defineProperty(result, key, {
        value: this.value(),
        enumerable: true,
        configurable: true,
        writable: true,
      });
    });
    return result;
  }

  private list(): unknown[] {
    const result: unknown[] = [];
    this.items("]", () => {
      result.push(this.value());
    });
    return result;
  }

  /** Items with commas between them up to the closing mark. */
  private items(close: "}" | "]", read: () => void): void {
    this.match(BLANK);
    if (this.text[this.at] === close) {
      this.at++;
      return;
    }
    for (;;) {
      this.match(BLANK);
      read();
      this.match(BLANK);
      const mark = this.text[this.at];
      if (mark === close) break;
      if (mark !== ",") throw this.fault(`a comma or ${close} stands here`);
      this.at++;
      this.match(BLANK);
      if (this.text[this.at] === close) throw this.fault(`no comma stands before ${close}`);
    }
    this.at++;
  }

  private string(): string {
    this.at++;
    let result = "";
    for (;;) {
      result += this.match(PLAIN_TEXT);
      const mark = this.text[this.at];
      if (mark === '"') break;
      if (mark !== "\\") throw this.fault("a text ends with a double quote on its own line");
      result += this.escape();
    }
    this.at++;
    return result;
  }

  private escape(): string {
    const letter = this.text[this.at + 1] ?? "";
    const plain = ESCAPES[letter];
    if (plain !== undefined) {
      this.at += 2;
      return plain;
    }
    const digits = /^u([0-9a-fA-F]{4})/.exec(this.text.slice(this.at + 1, this.at + 6))?.[1];
    if (digits === undefined) throw this.fault('a backslash escapes one of " \\ / b f n r t u0000');
    this.at += 6;
    return String.fromCharCode(Number.parseInt(digits, 16));
  }

  private match(pattern: RegExp): string {
    pattern.lastIndex = this.at;
    const found = pattern.exec(this.text)?.[0] ?? "";
    this.at += found.length;
    return found;
  }

  private fault(rule: string): InputError {
    const before = this.text.slice(0, this.at).split(/\r\n|\n|\r/);
    const column = (before.at(-1)?.length ?? 0) + 1;
    WORD.lastIndex = this.at;
    const word = WORD.exec(this.text)?.[0] ?? this.text[this.at];
    const found = word === undefined ? "the end of the text" : quoted(word);
    const place = { line: before.length, ...(this.file === "" ? {} : { file: this.file }) };
    return new InputError(`the text is not JSON: ${rule}; found ${found} at column ${column}`, place);
  }
}
