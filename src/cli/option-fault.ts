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

/** How a core without options speaks of parts that are given next to the plan. */
const BESIDE = "in the plan or beside it";

/** Throws a fault in parts of a request, which is told of no file, with the options that they came from; any other as it is. */
export function tellOfOption(fault: unknown): never {
  if (!(fault instanceof InputError)) throw fault;
  const { sentence, place } = fault;
  if (sentence.includes(BESIDE))
    throw new InputError(sentence.replace(BESIDE, "in the plan or as --from, --to and --every"), place);
  if (place.file !== undefined) throw fault;
  const options = (place.key ?? "").split(", ").map((part) => OPTIONS.get(part));
  throw options.includes(undefined) ? fault : new InputError(sentence, { key: options.join(", ") });
}
