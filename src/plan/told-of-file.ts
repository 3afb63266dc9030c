import { InputError } from "../errors.ts";

/** Does what a plan asks; an InputError that names no place is told of the plan's file. */
export function toldOfFile<T>(file: string, work: () => T): T {
  try {
    return work();
  } catch (error) {
    const isPlaceless = error instanceof InputError && Object.keys(error.place).length === 0;
    throw isPlaceless ? new InputError(error.message, { file }) : error;
  }
}
