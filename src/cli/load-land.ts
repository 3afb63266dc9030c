import { readFile } from "node:fs/promises";
import { type Land, type LandTopology, prepareLand } from "./core.ts";

/** The coarse land that the build puts beside the command. */
export async function loadLand(): Promise<Land> {
  // From dist/chunks/, where this module is built to.
  const file = new URL("../coastline/land-10m.json", import.meta.url);
  const topology = JSON.parse(await readFile(file, "utf8")) as LandTopology;
  return prepareLand(topology);
}
