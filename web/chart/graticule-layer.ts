import { CanvasOverlay, type OverlayFrame } from "./canvas-overlay.ts";
import { cssColour } from "./css-colour.ts";
import { graticuleLabel, graticuleLines, graticuleStep } from "./graticule.ts";

const GAP = 96;

/** Meridians and parallels with their labels along the left and the upper edge. */
export function createGraticule(): CanvasOverlay {
  return new CanvasOverlay(drawGraticule, "graticule", true);
}

function drawGraticule({ context, map, width, height, place }: OverlayFrame): void {
  const bounds = map.getBounds();
  const middle = map.getCenter();
  const pxPerLon = width / (bounds.getEast() - bounds.getWest());
  // On Mercator a degree of latitude is longer than one of longitude by the secant.
  const pxPerLat = pxPerLon / Math.cos((middle.lat * Math.PI) / 180);
  const lonStep = graticuleStep(pxPerLon, GAP);
  const latStep = graticuleStep(pxPerLat, GAP * 0.8);
  const meridians = graticuleLines(bounds.getWest(), bounds.getEast(), lonStep);
  const parallels = graticuleLines(
    Math.max(bounds.getSouth(), -85),
    Math.min(bounds.getNorth(), 85),
    latStep,
  );

  context.strokeStyle = cssColour("--graticule");
  context.lineWidth = 1;
  context.beginPath();
  for (const lon of meridians) {
    const x = Math.round(place(middle.lat, lon).x) + 0.5;
    context.moveTo(x, 0);
    context.lineTo(x, height);
  }
  for (const lat of parallels) {
    const y = Math.round(place(lat, middle.lng).y) + 0.5;
    context.moveTo(0, y);
    context.lineTo(width, y);
  }
  context.stroke();

  context.font = "11px system-ui, sans-serif";
  context.fillStyle = cssColour("--chart-ink");
  context.strokeStyle = cssColour("--sea");
  context.lineWidth = 3;
  context.lineJoin = "round";
  const label = (text: string, x: number, y: number): void => {
    context.strokeText(text, x, y);
    context.fillText(text, x, y);
  };
  context.textAlign = "center";
  for (const lon of meridians) {
    const { x } = place(middle.lat, lon);
    if (x > 60 && x < width - 30) label(graticuleLabel(lon, lonStep, "lon"), x, 13);
  }
  context.textAlign = "right";
  for (const lat of parallels) {
    const { y } = place(lat, middle.lng);
    if (y > 24 && y < height - 30) label(graticuleLabel(lat, latStep, "lat"), width - 5, y - 4);
  }
}
