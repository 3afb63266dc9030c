import { InputError } from "../errors.ts";
import { writtenInstant } from "../instant.ts";

/** When to arrive, ms since 1970-01-01T00:00Z: at one time where both are equal, else between them; `null`: not too late is enough. */
export interface ArrivalWindow {
  readonly notBefore: number | null;
  readonly notAfter: number;
}

/** @throws InputError where the window ends before it begins */
export function checkArrival({ notBefore, notAfter }: ArrivalWindow): void {
  if (notBefore !== null && !(notBefore <= notAfter))
    throw new InputError(
      `an arrival's notBefore is not after its notAfter; found ${writtenInstant(notBefore)} and ${writtenInstant(notAfter)}`,
    );
}
