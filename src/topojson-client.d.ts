/** The part of topojson-client 3 used here, which publishes no types of its own. */
declare module "topojson-client" {
  import type { Feature, FeatureCollection } from "geojson";
  /** Decodes the shared, delta-encoded arcs of an object of a topology into plain positions, degrees. */
  export function feature(topology: unknown, object: unknown): FeatureCollection | Feature;
}
