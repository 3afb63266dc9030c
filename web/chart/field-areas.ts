import type { FieldInspection, FieldRole } from "../core.ts";
import type { FieldDocument } from "../state/plan-document.ts";

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
