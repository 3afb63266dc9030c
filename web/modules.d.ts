/* The parts that the page uses of packages that ship no types of their own. */

declare module "topojson-client" {
  import type { Feature, FeatureCollection } from "geojson";
  export function feature(topology: unknown, object: unknown): FeatureCollection | Feature;
}

declare module "leaflet/src/layer/tile/TileLayer.js" {
  export const tileLayer: typeof import("leaflet").tileLayer;
}
