import type { FieldInspection, FieldRole } from "../core.ts";
import type { FieldDocument } from "../state/plan-document.ts";
import { CanvasOverlay, type OverlayFrame } from "./canvas-overlay.ts";
import { cssColour } from "./css-colour.ts";
import { turnsToward } from "./longitude.ts";

/** The area of a field file, degrees; `east` beyond 180 where it runs across the antimeridian. */
export interface Area {
  readonly role: FieldRole;
  readonly south: number;
  readonly north: number;
  readonly west: number;
  readonly east: number;
}

/** The areas of a plan's field files that have been read; one around the globe has no edge to draw. */
export function areasOf(
  fields: readonly FieldDocument[],
  inspections: Readonly<Record<string, FieldInspection>>,
): Area[] {
  return fields.flatMap(({ role, file }) => {
    const found = inspections[file];
    if (found === undefined || found.global) return [];
    const { latitude, longitude } = found;
    return [
      { role, south: latitude.first, north: latitude.last, west: longitude.first, east: longitude.last },
    ];
  });
}

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
