import type { MultiPolygon, Polygon, Position } from "geojson";
import GeoJSONVT from "geojson-vt";
import { feature } from "topojson-client";
import { unrolledRing } from "./core.ts";
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
  const index = new GeoJSONVT(planarLand(topology), {
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

/**
 * The land in a plane of continuous longitude: the packed rings step across the antimeridian, which the tile cutter, working in
 * a plane, would take for a line around the world. It brings back by itself what lies beyond ±180°.
 */
function planarLand(topology: LandTopology): MultiPolygon {
  const found = feature(topology, topology.objects.land);
  const features = found.type === "FeatureCollection" ? found.features : [found];
  const polygons = features.flatMap(({ geometry }) => {
    if (geometry.type === "Polygon") return [geometry.coordinates];
    return geometry.type === "MultiPolygon" ? geometry.coordinates : [];
  });
  return { type: "MultiPolygon", coordinates: polygons.map(planarPolygon) };
}

/** The outer ring on the turn around Greenwich, and its holes on the turn that puts them inside it. */
function planarPolygon([outer = [], ...holes]: Polygon["coordinates"]): Polygon["coordinates"] {
  const shell = onTurn(unrolledRing(outer), 0);
  const middle = middleOf(shell);
  return [shell, ...holes.map((hole) => onTurn(unrolledRing(hole), middle))];
}

/** A flat ring as positions, closed, shifted by whole turns so that its middle is nearest to a longitude. */
function onTurn(flat: readonly number[], near: number): Position[] {
  const ring: Position[] = [];
  for (let at = 0; at + 1 < flat.length; at += 2) ring.push([flat[at] ?? 0, flat[at + 1] ?? 0]);
  const [first] = ring;
  const last = ring.at(-1);
  if (first && last && (first[0] !== last[0] || first[1] !== last[1])) ring.push([...first]);
  const turn = 360 * Math.round((near - middleOf(ring)) / 360);
  return turn === 0 ? ring : ring.map(([lon = 0, lat = 0]) => [lon + turn, lat]);
}

function middleOf(ring: readonly Position[]): number {
  let west = Number.POSITIVE_INFINITY;
  let east = Number.NEGATIVE_INFINITY;
  for (const [lon = 0] of ring) {
    west = Math.min(west, lon);
    east = Math.max(east, lon);
  }
  return (west + east) / 2;
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
