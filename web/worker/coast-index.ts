import GeoJSONVT from "geojson-vt";
import { feature } from "topojson-client";
import { COAST_EXTENT, type CoastDetail, type CoastTile } from "./protocol.ts";

/** The finest level that tiles are cut at; the chart zooms no further. */
export const COAST_MAX_ZOOM = 16;

interface LandTopology {
  readonly objects: { readonly land: unknown };
}

/** Cuts tiles of coastline from a topology of land (as world-atlas packs Natural Earth's). */
export interface CoastIndex {
  tile(z: number, x: number, y: number): CoastTile;
}

/** @throws Error where the topology holds no `land` */
export function indexCoast(topology: unknown, detail: CoastDetail): CoastIndex {
  if (!isLand(topology)) throw new Error(`no land in the ${detail} coastline`);
  const index = new GeoJSONVT(feature(topology, topology.objects.land), {
    maxZoom: COAST_MAX_ZOOM,
    indexMaxZoom: 4,
    tolerance: 2,
    extent: COAST_EXTENT,
    buffer: 64,
  });
  return {
    tile: (z, x, y) => packRings(index.getTileRaw(z, x, y)?.features ?? [], detail),
  };
}

function isLand(topology: unknown): topology is LandTopology {
  if (typeof topology !== "object" || topology === null || !("objects" in topology)) return false;
  const { objects } = topology;
  return typeof objects === "object" && objects !== null && "land" in objects;
}

type Ring = Int16Array | Int32Array;

function packRings(
  features: readonly { type: number; geometry?: Ring | Ring[] }[],
  detail: CoastDetail,
): CoastTile {
  const rings = features.flatMap(({ type, geometry }) =>
    type === 3 && Array.isArray(geometry) ? geometry : [],
  );
  const points = new Int16Array(rings.reduce((sum, ring) => sum + ring.length, 0));
  const ends = new Int32Array(rings.length);
  let filled = 0;
  rings.forEach((ring, at) => {
    points.set(ring, filled);
    filled += ring.length;
    ends[at] = filled / 2;
  });
  return { points, ends, detail };
}
