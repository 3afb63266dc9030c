import type { Tile } from "../field/field.ts";
import { type Flow, levelShare } from "./flow.ts";
import { LEVEL_BETWEEN, type PanelCells } from "./panels.ts";
import type { Stations } from "./stations.ts";

const RADIANS = Math.PI / 180;
/** Where the corners of the next slice start in {@link Flow.corners}. */
const NEXT_SLICE = 16;

/** Fills the along- and cross-track components of a resolved flow at every station of the panel. */
export function project(flow: Flow, panel: number, polar: boolean, stations: Stations): void {
  if (flow.tile < 0) {
    flow.along.fill(0);
    flow.alongChange.fill(0);
    flow.cross.fill(0);
    flow.crossChange.fill(0);
    return;
  }
  const tile = flow.field.tiles[flow.tile] as Tile;
  const cells = flow.cells[flow.tile] as PanelCells;
  const between = cells.levelState[panel] === LEVEL_BETWEEN;
  const column = cells.column[panel] as number;
  const row = cells.row[panel] as number;
  const turn = cells.turn[panel] as number;
  const west = tile.lon[column] as number;
  const perLon = tile.lon.length === 1 ? 0 : 1 / ((tile.lon[column + 1] as number) - west);
  const south = tile.lat[row] as number;
  const perLat = tile.lat.length === 1 ? 0 : 1 / ((tile.lat[row + 1] as number) - south);
  const { shareEast, shareNorth } = flow;
  for (let i = 0; i < stations.at.length; i += 1) {
    shareEast[i] = ((stations.lon[i] as number) + turn - west) * perLon;
    shareNorth[i] = ((stations.lat[i] as number) - south) * perLat;
  }
  if (between || polar) projectAny(flow, panel, polar, between, stations, west - turn, perLon);
  else projectPlain(flow, stations);
}

/** One level, away from the poles: nearly every panel. */
function projectPlain(flow: Flow, stations: Stations): void {
  const { along, cross, alongChange, crossChange } = flow;
  projectSlice(flow, 0, stations, along, cross);
  if (flow.nextSlice === flow.slice) {
    alongChange.fill(0);
    crossChange.fill(0);
    return;
  }
  projectSlice(flow, NEXT_SLICE, stations, alongChange, crossChange);
  for (let i = 0; i < stations.at.length; i += 1) {
    alongChange[i] = (alongChange[i] as number) - (along[i] as number);
    crossChange[i] = (crossChange[i] as number) - (cross[i] as number);
  }
}

/** Components at one slice, as `atSlice` has them, with the corners taken out once for all stations. */
function projectSlice(
  { corners, shareEast, shareNorth }: Flow,
  offset: number,
  { sin, cos }: Stations,
  along: Float64Array,
  cross: Float64Array,
): void {
  const westU = corners[offset] as number;
  const westUNorth = corners[offset + 1] as number;
  const eastU = corners[offset + 2] as number;
  const eastUNorth = corners[offset + 3] as number;
  const westV = corners[offset + 4] as number;
  const westVNorth = corners[offset + 5] as number;
  const eastV = corners[offset + 6] as number;
  const eastVNorth = corners[offset + 7] as number;
  for (let i = 0; i < sin.length; i += 1) {
    const fx = shareEast[i] as number;
    const fy = shareNorth[i] as number;
    const uWest = westU + fy * westUNorth;
    const vWest = westV + fy * westVNorth;
    const u = uWest + fx * (eastU + fy * eastUNorth - uWest);
    const v = vWest + fx * (eastV + fy * eastVNorth - vWest);
    const east = sin[i] as number;
    const north = cos[i] as number;
    along[i] = u * east + v * north;
    cross[i] = u * north - v * east;
  }
}

/** Between two levels, or beyond 85° of latitude. */
function projectAny(
  flow: Flow,
  panel: number,
  polar: boolean,
  between: boolean,
  stations: Stations,
  west: number,
  perLon: number,
): void {
  const tile = flow.field.tiles[flow.tile] as Tile;
  const cells = flow.cells[flow.tile] as PanelCells;
  const steady = flow.nextSlice === flow.slice;
  for (let i = 0; i < stations.at.length; i += 1) {
    const fx = flow.shareEast[i] as number;
    const fy = flow.shareNorth[i] as number;
    const fh = between ? levelShare(flow, tile, cells, panel, stations.share[i] as number) : 0;
    const sin = stations.sin[i] as number;
    const cos = stations.cos[i] as number;
    const pole = polar ? Math.sign(stations.lat[i] as number) : 0;
    const eastOfWest = (stations.lon[i] as number) - west;
    atSlice(flow, 0, fx, fy, fh, between, pole, eastOfWest, perLon);
    const along = flow.u * sin + flow.v * cos;
    const cross = flow.u * cos - flow.v * sin;
    flow.along[i] = along;
    flow.cross[i] = cross;
    flow.alongChange[i] = 0;
    flow.crossChange[i] = 0;
    if (steady) continue;
    atSlice(flow, NEXT_SLICE, fx, fy, fh, between, pole, eastOfWest, perLon);
    flow.alongChange[i] = flow.u * sin + flow.v * cos - along;
    flow.crossChange[i] = flow.u * cos - flow.v * sin - cross;
  }
}

/**
 * Components at one slice: linear in latitude on both meridians of the cell, linear in height, then linear in longitude.
 * Beyond 85° the vectors of each meridian are first turned into the point's own frame by Δ = (λ_corner - λ_point) · sign φ:
 * u' = u cos Δ - v sin Δ, v' = u sin Δ + v cos Δ.
 */
function atSlice(
  flow: Flow,
  offset: number,
  fx: number,
  fy: number,
  fh: number,
  between: boolean,
  pole: number,
  eastOfWest: number,
  perLon: number,
): void {
  const c = flow.corners;
  let westU = (c[offset] as number) + fy * (c[offset + 1] as number);
  let eastU = (c[offset + 2] as number) + fy * (c[offset + 3] as number);
  let westV = (c[offset + 4] as number) + fy * (c[offset + 5] as number);
  let eastV = (c[offset + 6] as number) + fy * (c[offset + 7] as number);
  if (between) {
    westU += fh * ((c[offset + 8] as number) + fy * (c[offset + 9] as number) - westU);
    eastU += fh * ((c[offset + 10] as number) + fy * (c[offset + 11] as number) - eastU);
    westV += fh * ((c[offset + 12] as number) + fy * (c[offset + 13] as number) - westV);
    eastV += fh * ((c[offset + 14] as number) + fy * (c[offset + 15] as number) - eastV);
  }
  if (pole !== 0) {
    const west = -eastOfWest * pole * RADIANS;
    const east = perLon === 0 ? west : (1 / perLon - eastOfWest) * pole * RADIANS;
    [westU, westV] = turned(westU, westV, west);
    [eastU, eastV] = turned(eastU, eastV, east);
  }
  flow.u = westU + fx * (eastU - westU);
  flow.v = westV + fx * (eastV - westV);
}

function turned(u: number, v: number, angle: number): [number, number] {
  const cos = Math.cos(angle);
  const sin = Math.sin(angle);
  return [u * cos - v * sin, u * sin + v * cos];
}
