/** Where in the user's input a fault stands. Every part is optional; the message shows those that are set. */
export interface Place {
  readonly file?: string;
  /** 1-based line of a text file. */
  readonly line?: number;
  /** Path of a key, as `routes[0].waypoints[2].lat`. */
  readonly key?: string;
}

/**
 * A fault in what the user gave: one sentence that names the quantity, the rule, what was found and where.
 * Doors print its message and stop with status 2; every other error is a defect and keeps its stack.
 */
export class InputError extends Error {
  override readonly name = "InputError";
  readonly place: Place;
  /** The message without its place. */
  readonly sentence: string;

  /** @param sentence without a final full stop, as `latitude is in -90..90; found 91` */
  constructor(sentence: string, place: Place = {}) {
    super(placed(sentence, place));
    this.place = place;
    this.sentence = sentence;
  }

  /** What the sentence says of the place's key itself, as ` is above 0; found "0 s"`; `null` where it speaks of something else. */
  get predicate(): string | null {
    return predicateOf(this.sentence, this.place.key ?? "");
  }
}

/** A sentence after its place; one about the key itself has the key's whole path for its subject, so that no word comes twice. */
function placed(sentence: string, { file, line, key = "" }: Place): string {
  const predicate = predicateOf(sentence, key);
  const parts = [file, line === undefined ? undefined : `line ${line}`, predicate === null ? key : undefined];
  const shown = parts.filter((part) => part !== undefined && part !== "");
  const before = shown.length === 0 ? "" : `${shown.join(", ")}: `;
  return before + (predicate === null ? sentence : key + predicate);
}

/** What a sentence says of a key, called by its name or its words (`airDensity`, air density); `null` where it speaks of something else. */
function predicateOf(sentence: string, key: string): string | null {
  const name = key.slice(key.lastIndexOf(".") + 1);
  const words = name.replace(/[A-Z]/g, (letter) => ` ${letter.toLowerCase()}`);
  const subject = [name, words].find((each) => each !== "" && sentence.startsWith(`${each} `));
  const predicate = subject === undefined ? "" : sentence.slice(subject.length);
  return /^ (?:takes|is|has|needs|belongs) /.test(predicate) ? predicate : null;
}
