import { InputError, type Place } from "../errors.ts";

/** Does what a plan asks; an InputError that names no place is told of this one. */
export function toldOf<T>(place: Place, work: () => T): T {
  try {
    return work();
  } catch (error) {
    const isPlaceless = error instanceof InputError && Object.keys(error.place).length === 0;
    throw isPlaceless ? new InputError(error.sentence, place) : error;
  }
}
