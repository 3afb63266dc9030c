import type { Field, PreparedRoute } from "./core.ts";

/** The heights at which the fields have levels, m above the surface, ascending, each once. */
export function levelsOf(fields: readonly Field[]): number[] {
  const heights = fields.flatMap(({ tiles }) => tiles.flatMap(({ height }) => [...(height ?? [])]));
  return [...new Set(heights)].sort((a, b) => a - b);
}

/** The level nearest to where the routes run, by the distance at each height; the lowest for routes without heights. */
export function levelOfRoutes(levels: readonly number[], routes: readonly PreparedRoute[]): number | null {
  const [lowest = 0] = levels;
  const legs = routes.flatMap((route) =>
    route.legs.map(({ heights: { from, to }, track: { length } }) => ({
      height: ((from ?? lowest) + (to ?? lowest)) / 2,
      length,
    })),
  );
  const off = (level: number): number =>
    legs.reduce((sum, { height, length }) => sum + length * Math.abs(height - level), 0);
  return levels.reduce<number | null>(
    (best, level) => (best === null || off(level) < off(best) ? level : best),
    null,
  );
}
