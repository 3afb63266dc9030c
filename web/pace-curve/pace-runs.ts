import type { WindowCell } from "../core.ts";

/** Neighbouring points of a curve that arrive, as runs: where a speed between does not complete the route the curve breaks. */
export function arrivingRuns(points: readonly WindowCell[]): WindowCell[][] {
  const runs: WindowCell[][] = [];
  let run: WindowCell[] = [];
  for (const point of points) {
    if (point.arrival !== null) {
      if (run.length === 0) runs.push(run);
      run.push(point);
    } else run = [];
  }
  return runs;
}

/** The nearest point in speed. */
export function nearestPoint(points: readonly WindowCell[], speed_m_s: number): WindowCell | null {
  const off = ({ speed_m_s: own }: WindowCell): number => Math.abs((own ?? 0) - speed_m_s);
  return points.reduce<WindowCell | null>(
    (best, point) => (best === null || off(point) < off(best) ? point : best),
    null,
  );
}
