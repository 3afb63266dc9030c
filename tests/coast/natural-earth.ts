import { readFileSync } from "node:fs";
import { createRequire } from "node:module";
import type { LandTopology } from "../../src/coast/land.ts";

/** Natural Earth 1:10m land as the package world-atlas brings it. */
export function naturalEarth(): LandTopology {
  const path = createRequire(import.meta.url).resolve("world-atlas/land-10m.json");
  return JSON.parse(readFileSync(path, "utf8")) as LandTopology;
}
