import type * as L from "leaflet";
import { type FieldRole, LATTICE_COVERED, LATTICE_GAP } from "../core.ts";
import { roundLimit, SPEED_CLASSES, speedClass, speedColour } from "../format/palette.ts";
import { shownUnit } from "../format/units.ts";
import type { Lattice, LatticeQuestion } from "../worker/protocol.ts";
import { CanvasOverlay, type OverlayFrame } from "./canvas-overlay.ts";
import { cssColour } from "./css-colour.ts";
import { currentArrow } from "./current-arrow.ts";
import { graticuleStep } from "./graticule.ts";
import { type FlowSymbol, windBarb } from "./wind-barb.ts";

const BARB_LENGTH = 26;
const BARB_GAP = 68;
const ARROW_GAP = 50;
const ARROW_LENGTH = 30;
const SHADE_CELL = 6;
/** A small cross where the grid has no value. */
const GAP: FlowSymbol = {
  strokes: [
    [
      [-3, -3],
      [3, 3],
    ],
    [
      [-3, 3],
      [3, -3],
    ],
  ],
  fills: [],
  calm: null,
};

/** What a field's symbols or shading need to know of the map's view. */
export function latticeFor(
  map: L.Map,
  role: FieldRole,
  instant: number,
  height_m: number | null,
  shading: boolean,
): LatticeQuestion {
  const bounds = map.getBounds().pad(0.1);
  const pxPerLon = map.getSize().x / (map.getBounds().getEast() - map.getBounds().getWest());
  const narrow = Math.cos((map.getCenter().lat * Math.PI) / 180);
  const gap = role === "wind" ? BARB_GAP : ARROW_GAP;
  // Symbols stand on round positions, so that they stay where they are while the chart moves.
  const stepLon = shading ? SHADE_CELL / pxPerLon : latticeStep(pxPerLon, gap);
  const stepLat = shading ? (SHADE_CELL / pxPerLon) * narrow : latticeStep(pxPerLon / narrow, gap);
  return {
    role,
    instant,
    height_m,
    south: Math.max(bounds.getSouth(), -85),
    north: Math.min(bounds.getNorth(), 85),
    west: bounds.getWest(),
    east: bounds.getEast(),
    stepLat,
    stepLon,
    // Symbols stand off the graticule, and arrows off the barbs, so that none is taken for a part of another.
    phase: role === "wind" ? 0.25 : 0.75,
  };
}

/** The round step, or a half or quarter of it, that comes nearest above the gap. */
function latticeStep(pxPerDegree: number, gap: number): number {
  const step = graticuleStep(pxPerDegree, gap);
  const parts = [4, 2, 1].find((part) => (step * pxPerDegree) / part >= gap) ?? 1;
  return step / parts;
}

/** Symbols of a field: barbs for wind, arrows for current. */
export function createSymbols(lattice: () => Lattice | null, role: FieldRole): CanvasOverlay {
  return new CanvasOverlay((frame) => drawSymbols(frame, lattice(), role), "field", false);
}

function drawSymbols(frame: OverlayFrame, lattice: Lattice | null, role: FieldRole): void {
  if (lattice === null) return;
  const { context, place } = frame;
  const colour = cssColour(role === "wind" ? "--wind" : "--current");
  context.strokeStyle = colour;
  context.fillStyle = colour;
  context.lineWidth = role === "wind" ? 1.2 : 1.4;
  context.lineCap = "round";
  const strongest = latticeLimit(lattice, 1);
  for (let at = 0; at < lattice.lat.length; at += 1) {
    const lat = lattice.lat[at] ?? 0;
    const u = lattice.east_m_s[at] ?? 0;
    const v = lattice.north_m_s[at] ?? 0;
    const { x, y } = place(lat, lattice.lon[at] ?? 0);
    const state = lattice.state[at];
    // What was not given stands back behind what was.
    context.globalAlpha = state === LATTICE_COVERED ? 1 : 0.5;
    if (state === LATTICE_GAP) drawSymbol(context, GAP, x, y);
    else drawSymbol(context, role === "wind" ? barbOf(u, v, lat) : arrowOf(u, v, strongest), x, y);
  }
}

function barbOf(u: number, v: number, lat: number): FlowSymbol {
  const knot = shownUnit("sea", "speed").si;
  const from = (Math.atan2(-u, -v) * 180) / Math.PI;
  return windBarb(Math.hypot(u, v) / knot, from, lat < 0, BARB_LENGTH);
}

function arrowOf(u: number, v: number, strongest: number): FlowSymbol {
  const share = strongest === 0 ? 0 : Math.hypot(u, v) / strongest;
  return currentArrow((Math.atan2(u, v) * 180) / Math.PI, ARROW_LENGTH * Math.sqrt(share));
}

function drawSymbol(context: CanvasRenderingContext2D, symbol: FlowSymbol, x: number, y: number): void {
  context.beginPath();
  for (const stroke of symbol.strokes) {
    stroke.forEach(([dx, dy], at) => {
      if (at === 0) context.moveTo(x + dx, y + dy);
      else context.lineTo(x + dx, y + dy);
    });
  }
  if (symbol.calm !== null) {
    context.moveTo(x + symbol.calm, y);
    context.arc(x, y, symbol.calm, 0, 2 * Math.PI);
  }
  context.stroke();
  for (const fill of symbol.fills) {
    context.beginPath();
    for (const [dx, dy] of fill) context.lineTo(x + dx, y + dy);
    context.closePath();
    context.fill();
  }
}

/** The speed that the scale of shading and arrows ends at, m/s. */
export function latticeLimit({ east_m_s, north_m_s }: Lattice, unit: number): number {
  let most = 0;
  for (let at = 0; at < east_m_s.length; at += 1) {
    most = Math.max(most, Math.hypot(east_m_s[at] ?? 0, north_m_s[at] ?? 0));
  }
  return roundLimit(most, unit);
}

/** Speeds of a field with the lattice that they stand on, and where their scale ends. */
export interface Shaded {
  readonly lattice: Lattice;
  readonly step: LatticeQuestion;
  readonly limit_m_s: number;
}

/** Cells coloured by speed. */
export function createShading(lattice: () => Shaded | null): CanvasOverlay {
  return new CanvasOverlay((frame) => drawShading(frame, lattice()), "shading", false);
}

function drawShading(frame: OverlayFrame, shaded: Shaded | null): void {
  if (shaded === null) return;
  const { context, place } = frame;
  const { lattice, step, limit_m_s: limit } = shaded;
  const colours = Array.from({ length: SPEED_CLASSES }, (_, at) => speedColour(at));
  const none = cssColour("--edge");
  for (let at = 0; at < lattice.lat.length; at += 1) {
    const lat = lattice.lat[at] ?? 0;
    const lon = lattice.lon[at] ?? 0;
    const corner = place(lat + step.stepLat / 2, lon - step.stepLon / 2);
    const far = place(lat - step.stepLat / 2, lon + step.stepLon / 2);
    const speed = Math.hypot(lattice.east_m_s[at] ?? 0, lattice.north_m_s[at] ?? 0);
    context.fillStyle = lattice.state[at] === LATTICE_GAP ? none : (colours[speedClass(speed, limit)] ?? "");
    const x = Math.floor(corner.x);
    const y = Math.floor(corner.y);
    context.fillRect(x, y, Math.ceil(far.x) - x, Math.ceil(far.y) - y);
  }
}
