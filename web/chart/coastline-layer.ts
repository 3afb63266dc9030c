import * as L from "leaflet";
import { COAST_EXTENT, type CoastDetail, type CoastTile } from "../worker/protocol.ts";
import { cssColour } from "./css-colour.ts";

/** From this zoom on the finer coast is drawn: at 1:10m a pixel is then below the coast's own error. */
const FINE_FROM_ZOOM = 6;
const TILE = 256;

export type TileSource = (z: number, x: number, y: number, detail: CoastDetail) => Promise<CoastTile>;

/** Land and coastline as canvas tiles that the worker cuts. */
export class CoastlineLayer extends L.GridLayer {
  private readonly source: TileSource;
  private readonly wantFine: () => void;

  constructor(source: TileSource, wantFine: () => void, options: L.GridLayerOptions) {
    super(options);
    this.source = source;
    this.wantFine = wantFine;
  }

  /** Draws all tiles anew. Leaflet's own redraw takes a zoom between two levels for a level of tiles. */
  refresh(): void {
    const map = this._map;
    if (map) this.remove().addTo(map);
  }

  protected override createTile(coords: L.Coords, done: L.DoneCallback): HTMLElement {
    const scale = window.devicePixelRatio;
    const canvas = document.createElement("canvas");
    canvas.width = TILE * scale;
    canvas.height = TILE * scale;
    const fine = coords.z >= FINE_FROM_ZOOM;
    if (fine) this.wantFine();
    this.source(coords.z, coords.x, coords.y, fine ? "10m" : "50m").then(
      (tile) => {
        drawTile(canvas, tile);
        done(undefined, canvas);
      },
      (fault: unknown) => done(fault instanceof Error ? fault : new Error(String(fault)), canvas),
    );
    return canvas;
  }
}

function drawTile(canvas: HTMLCanvasElement, tile: CoastTile): void {
  const context = canvas.getContext("2d");
  if (!context || tile.ends.length === 0) return;
  const scale = canvas.width / COAST_EXTENT;
  context.setTransform(scale, 0, 0, scale, 0, 0);
  context.fillStyle = cssColour("--land");
  context.strokeStyle = cssColour("--coast");
  context.lineWidth = (window.devicePixelRatio * 0.9) / scale;
  context.lineJoin = "round";
  const land = landPath(tile);
  context.fill(land, "evenodd");
  context.stroke(land);
}

function landPath({ points, ends }: CoastTile): Path2D {
  const path = new Path2D();
  let at = 0;
  for (const end of ends) {
    path.moveTo(points[2 * at] ?? 0, points[2 * at + 1] ?? 0);
    for (at += 1; at < end; at += 1) path.lineTo(points[2 * at] ?? 0, points[2 * at + 1] ?? 0);
    path.closePath();
  }
  return path;
}
