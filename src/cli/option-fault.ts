import { InputError } from "./core.ts";

/** What a request calls a part → the option that gives it. */
const OPTIONS: ReadonlyMap<string, string> = new Map([
  ["departure", "--departure"],
  ["routes", "--route"],
  ["from", "--from"],
  ["to", "--to"],
  ["every", "--every"],
  ["speeds", "--speeds"],
  ["arriveBy", "--arrive-by"],
]);

/** Throws a fault in parts of a request, which is told of no file, with the options that they came from; any other as it is. */
export function tellOfOption(fault: unknown): never {
  if (!(fault instanceof InputError) || fault.place.file !== undefined) throw fault;
  const options = (fault.place.key ?? "").split(", ").map((part) => OPTIONS.get(part));
  throw options.includes(undefined) ? fault : new InputError(fault.sentence, { key: options.join(", ") });
}
