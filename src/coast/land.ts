import type { Feature, FeatureCollection, Polygon } from "geojson";
import { feature } from "topojson-client";
import { CELL, COLUMNS, cellAt, type Land, ROWS, SOUTH, WEST } from "./land-cells.ts";
import { slicedRing, unrolledRing } from "./ring.ts";

/** A TopoJSON topology with an object named `land`, as Natural Earth's land is published in world-atlas. */
export interface LandTopology {
  readonly type: "Topology";
  readonly arcs: readonly unknown[];
  readonly objects: { readonly land: object };
}

/**
 * Decodes a topology's land and cuts it into cells.
 *
 * Natural Earth's 1:10m land has no lakes in it: an inland water counts as land, except where it is drawn as sea. Its coast
 * is a median 0.7 km off, and a tenth of it by more than 4.5 km: good for a hint, never for a clearance.
 *
 * @param topology for example the parsed `land-10m.json` of the package world-atlas; it is not changed or kept
 * @throws TypeError where the topology has no land
 *
 * @example
 * prepareLand({ type: "Topology", arcs: [[[1, 1], [2, 1], [2, 2], [1, 1]]], objects: { land: { type: "Polygon", arcs: [[0]] } } }).ringPolygon.length // → 3
 */
export function prepareLand(topology: LandTopology): Land {
  const cells = new Map<number, RingPart[]>();
  for (const [number, rings] of polygons(feature(topology, topology.objects.land)).entries()) {
    if (isPlaceholder(rings)) continue;
    for (const ring of rings) addRing(cells, number, unrolledRing(ring));
  }
  return packed(cells);
}

/** Natural Earth draws an island of a kilometre where there is none, about 0° N 0° E, to catch positions that were left out. */
function isPlaceholder(polygon: Polygon["coordinates"]): boolean {
  return polygon.every((ring) => ring.every(([lon = 0, lat = 0]) => Math.hypot(lon, lat) < 0.01));
}

function polygons(land: Feature | FeatureCollection): Polygon["coordinates"][] {
  const features = land.type === "FeatureCollection" ? land.features : [land];
  return features.flatMap(({ geometry }) => {
    if (geometry.type === "Polygon") return [geometry.coordinates];
    return geometry.type === "MultiPolygon" ? geometry.coordinates : [];
  });
}

/** What one cell has of a ring of a polygon. */
interface RingPart {
  readonly polygon: number;
  readonly ring: number[];
}

function addRing(cells: Map<number, RingPart[]>, polygon: number, ring: readonly number[]): void {
  for (const [column, strip] of slicedRing(ring, 0, WEST, CELL)) {
    const turn = 360 * Math.floor(column / COLUMNS);
    for (const [row, part] of slicedRing(strip, 1, SOUTH, CELL)) {
      if (part.length < 6) continue;
      for (let i = 0; turn !== 0 && i < part.length; i += 2) part[i] = (part[i] ?? 0) - turn;
      const cell = cellAt(column, row);
      const parts = cells.get(cell);
      if (parts === undefined) cells.set(cell, [{ polygon, ring: part }]);
      else parts.push({ polygon, ring: part });
    }
  }
}

/** Typed arrays in place of a few hundred thousand small ones. */
function packed(cells: ReadonlyMap<number, readonly RingPart[]>): Land {
  let rings = 0;
  let numbers = 0;
  for (const parts of cells.values()) {
    rings += parts.length;
    for (const part of parts) numbers += part.ring.length;
  }
  const land: Land = {
    ringRange: new Int32Array(2 * COLUMNS * ROWS),
    ringStart: new Int32Array(rings + 1),
    ringPolygon: new Int32Array(rings),
    xy: new Float64Array(numbers),
  };
  let at = 0;
  let count = 0;
  for (const [cell, parts] of cells) {
    land.ringRange[2 * cell] = count;
    for (const { polygon, ring } of parts) {
      land.xy.set(ring, at);
      at += ring.length;
      land.ringPolygon[count] = polygon;
      count += 1;
      land.ringStart[count] = at;
    }
    land.ringRange[2 * cell + 1] = count;
  }
  return land;
}
