/* The parts that the page uses of packages that ship no types of their own. */

declare module "topojson-client" {
  import type { Feature, FeatureCollection } from "geojson";
  export function feature(topology: unknown, object: unknown): FeatureCollection | Feature;
}

/** Gives every layer its tooltip methods. */
declare module "leaflet/src/layer/Tooltip.js";

declare module "leaflet/src/layer/tile/TileLayer.js" {
  export const tileLayer: typeof import("leaflet").tileLayer;
}

declare module "leaflet/src/map/handler/Map.BoxZoom.js" {
  export const BoxZoom: typeof import("leaflet").Handler;
}

declare module "leaflet/src/map/handler/Map.TouchZoom.js" {
  export const TouchZoom: typeof import("leaflet").Handler;
}
