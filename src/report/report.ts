import type { Craft } from "../craft/craft.ts";
import { writeCsv } from "./csv.ts";
import { writeGeoJson } from "./geojson.ts";
import { writeGpx } from "./gpx.ts";
import type { ReportInput, Units } from "./input.ts";
import { writeJson } from "./json.ts";
import { writeTable } from "./table.ts";

/** What an estimate can be written as. */
export type ReportFormat = "table" | "csv" | "json" | "geojson" | "gpx";

/**
 * The table's units for a craft: those of its trade.
 *
 * @example
 * unitsFor({ moves: "air" }) // → "air"
 */
export function unitsFor({ moves }: Pick<Craft, "moves">): Units {
  return moves === "air" ? "air" : "sea";
}

/**
 * An estimate as text.
 *
 * @param units the table's, by the craft unless given; they change no other format
 *
 * @example
 * writeReport({ estimate: { format: "legwork-estimate/1", advisory: "", plan: { title: "Two marks" }, fields: [], routes: [] }, routes: [], craft: { name: "Tender", moves: "water" }, pace: { hold: "least-energy" } }, "csv").slice(0, 12) // → "route,status"
 */
export function writeReport(
  input: ReportInput,
  format: ReportFormat,
  units: Units = unitsFor(input.craft),
): string {
  switch (format) {
    case "table":
      return writeTable(input, units);
    case "csv":
      return writeCsv(input);
    case "json":
      return writeJson(input.estimate);
    case "geojson":
      return writeGeoJson(input);
    case "gpx":
      return writeGpx(input);
  }
}
