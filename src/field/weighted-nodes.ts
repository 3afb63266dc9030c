import { POLAR_FRAME_LATITUDE } from "../constants.ts";
import type { AxisCell } from "./axis-cell.ts";
import { NODE_GIVEN, type Tile } from "./field.ts";

/** The cells of a tile's axes in which a point lies. */
export interface TileCell {
  readonly time: AxisCell;
  readonly level: AxisCell;
  readonly lat: AxisCell;
  readonly lon: AxisCell;
}

/** The weighted sum over the nodes around a point. Made once and used for many points, so that nothing is left behind. */
export class WeightedNodes {
  /** m/s, in the point's frame. */
  u = 0;
  v = 0;
  /** m/s; NaN where the tile has no gusts or a node that counts lacks it. */
  gust = 0;
  /** State of the least certain node that counts. */
  worst = NODE_GIVEN;

  /** Sums up the nodes around a point at a latitude and a longitude in degrees, of any turn. */
  sum(tile: Tile, cell: TileCell, lat: number, lon: number): void {
    const { time, level } = cell;
    this.u = 0;
    this.v = 0;
    this.gust = tile.gusts === null ? Number.NaN : 0;
    this.worst = NODE_GIVEN;
    for (let late = 0; late < 2; late++) {
      const timeWeight = late === 0 ? 1 - time.weight : time.weight;
      for (let high = 0; high < 2; high++) {
        const weight = timeWeight * (high === 0 ? 1 - level.weight : level.weight);
        if (weight > 0) this.addLayer(tile, cell, time.index + late, level.index + high, weight, lat, lon);
      }
    }
  }

  private addLayer(
    tile: Tile,
    cell: TileCell,
    slice: number,
    level: number,
    weight: number,
    lat: number,
    lon: number,
  ): void {
    for (let east = 0; east < 2; east++) {
      const lonWeight = weight * (east === 0 ? 1 - cell.lon.weight : cell.lon.weight);
      if (lonWeight === 0) continue;
      const i = cell.lon.index + east;
      const turn = frameTurn(lat, lon, tile.lon[i] as number);
      for (let north = 0; north < 2; north++) {
        const nodeWeight = lonWeight * (north === 0 ? 1 - cell.lat.weight : cell.lat.weight);
        if (nodeWeight === 0) continue;
        const node = (level * tile.lat.length + cell.lat.index + north) * tile.lon.length + i;
        this.addNode(tile, slice, node, nodeWeight, turn);
      }
    }
  }

  private addNode(tile: Tile, slice: number, node: number, weight: number, turn: number): void {
    const values = tile.slices[slice] as Float64Array;
    const u = values[2 * node] as number;
    const v = values[2 * node + 1] as number;
    if (turn === 0) {
      this.u += weight * u;
      this.v += weight * v;
    } else {
      const [sine, cosine] = [Math.sin(turn), Math.cos(turn)];
      this.u += weight * (u * cosine - v * sine);
      this.v += weight * (u * sine + v * cosine);
    }
    if (tile.gusts !== null) this.gust += weight * (tile.gusts[slice]?.[node] as number);
    this.worst = Math.max(this.worst, tile.masks[slice]?.[node] ?? NODE_GIVEN);
  }
}

/**
 * Angle, radians, by which a node's east and north are turned into a point's beyond 85° of latitude: about a pole they turn
 * with the meridian, by the longitude between.
 */
function frameTurn(lat: number, lon: number, nodeLon: number): number {
  return Math.abs(lat) > POLAR_FRAME_LATITUDE ? ((nodeLon - lon) * Math.sign(lat) * Math.PI) / 180 : 0;
}
