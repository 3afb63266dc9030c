import { importCsv } from "./import-csv.ts";
import { importGeoJson } from "./import-geojson.ts";
import { importGpx } from "./import-gpx.ts";
import type { ImportedRoutes } from "./imported-routes.ts";

/**
 * Reads the routes of a GPX, GeoJSON or CSV file, told apart by what the text begins with.
 *
 * @throws InputError for the first fault, with its line or key
 *
 * @example
 * importRoutes("lat,lon\n50,-4\n51,-5\n", "east.csv").routes[0].name // → "east"
 */
export function importRoutes(text: string, file: string): ImportedRoutes {
  const begins = /^[\uFEFF\s]*([<{[])/.exec(text)?.[1];
  if (begins === "<") return importGpx(text, file);
  return begins === undefined ? importCsv(text, file) : importGeoJson(text, file);
}
