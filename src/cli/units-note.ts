import type { Units } from "./core.ts";
import { messageLine } from "./message.ts";

/** Says on standard error that units change nothing where the format is not the table: the other formats are SI by contract. */
export function noteUnits(units: Units | undefined, format: string): void {
  if (units === undefined || format === "table") return;
  process.stderr.write(messageLine(`--units is for the table alone; ${format} is in its own units`));
}
