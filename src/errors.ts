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

  /** @param sentence without a final full stop, as `latitude is in -90..90; found 91` */
  constructor(sentence: string, place: Place = {}) {
    super(`${placeText(place)}${sentence}`);
    this.place = place;
  }
}

function placeText({ file, line, key }: Place): string {
  const parts = [file, line === undefined ? undefined : `line ${line}`, key];
  const shown = parts.filter((part) => part !== undefined && part !== "");
  return shown.length === 0 ? "" : `${shown.join(", ")}: `;
}
