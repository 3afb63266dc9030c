import { CanvasOverlay, type OverlayFrame } from "./canvas-overlay.ts";
import { cssColour } from "./css-colour.ts";
import type { Area } from "./field-areas.ts";
import { turnsToward } from "./longitude.ts";

/** Dashed outlines of the areas, in the colours of the fields' symbols. */
export function createCoverage(areas: () => readonly Area[]): CanvasOverlay {
  return new CanvasOverlay(
    (frame) => {
      for (const area of areas()) outline(frame, area);
    },
    "field",
    false,
  );
}

function outline({ context, map, place }: OverlayFrame, { role, south, north, west, east }: Area): void {
  const shift = turnsToward((west + east) / 2, map.getCenter().lng);
  const corner = place(north, west + shift);
  const far = place(south, east + shift);
  context.strokeStyle = cssColour(role === "wind" ? "--wind" : "--current");
  context.globalAlpha = 0.75;
  context.lineWidth = 1.2;
  // Two areas may share an edge: their dashes differ.
  context.setLineDash(role === "wind" ? [7, 4] : [2, 3]);
  context.strokeRect(corner.x, corner.y, far.x - corner.x, far.y - corner.y);
  context.setLineDash([]);
  context.globalAlpha = 1;
}
