import type { Field } from "./core.ts";

/** The heights at which the fields have levels, m above the surface, ascending, each once. */
export function levelsOf(fields: readonly Field[]): number[] {
  const heights = fields.flatMap(({ tiles }) => tiles.flatMap(({ height }) => [...(height ?? [])]));
  return [...new Set(heights)].sort((a, b) => a - b);
}
