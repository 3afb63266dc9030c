import { type GapPolicy, NODE_FILLED, NODE_GIVEN, NODE_MISSING } from "./field.ts";
import type { GridFile } from "./grid-file.ts";

/** Grid steps along either axis within which a missing node takes a value. */
const REACH = 2;

/** Steps to other nodes, nearest first; of equals the more southern, then the more western. */
const STEPS: readonly (readonly [east: number, north: number])[] = stepsByDistance();

/**
 * Applies a gap policy to a grid's missing nodes: they become filled (`nearest`, `zero`) or stay missing (`stop`; `nearest`
 * where no valid node is at most two steps away on either axis).
 *
 * `nearest` takes the value of the valid node of the same time and level with the least Δi² + Δj² in grid steps; of equals
 * the more southern, then the more western; around the globe where the grid is global. Gusts are left as they are: a
 * missing gust stays NaN.
 *
 * The grid's slices are taken over and changed in place (a copy would double the memory); the masks are new. A policy can
 * be applied again in place of another: filled nodes count as missing.
 *
 * @example
 * const lon = Float64Array.of(-5, -4);
 * const lat = Float64Array.of(50);
 * const nodes = { lon, lat, height: null, times: null, slices: [Float64Array.of(3, 4, 0, 0)], gusts: null, masks: [Uint8Array.of(0, 2)] };
 * const grid = { file: "wind.csv", role: "wind", ...nodes, global: false, ignoredColumns: [], notes: [], bytes: 0 };
 * [...applyGapPolicy(grid, "nearest").slices[0]] // → [3, 4, 3, 4]
 */
export function applyGapPolicy(grid: GridFile, policy: GapPolicy): GridFile {
  const plans = new Map<Uint8Array, FillPlan>();
  const masks = grid.masks.map((mask, time) => {
    if (mask === null) return null;
    const plan = plans.get(mask) ?? planOf(mask, grid, policy);
    plans.set(mask, plan);
    fill(grid.slices[time] as Float64Array, plan);
    return plan.mask;
  });
  return { ...grid, masks };
}

interface FillPlan {
  readonly mask: Uint8Array;
  /** Nodes that were missing, and for each the node whose value it takes, or -1 for zero. */
  readonly targets: Int32Array;
  readonly sources: Int32Array;
}

function planOf(mask: Uint8Array, grid: GridFile, policy: GapPolicy): FillPlan {
  const targets = missingNodes(mask);
  const sources = new Int32Array(targets.length).fill(-1);
  const planned = new Uint8Array(mask.length);
  for (const [index, target] of targets.entries()) {
    const source = policy === "nearest" ? nearestGiven(mask, grid, target) : -1;
    sources[index] = source;
    const isFilled = policy === "zero" || source >= 0;
    planned[target] = isFilled ? NODE_FILLED : NODE_MISSING;
  }
  return { mask: planned, targets, sources };
}

function missingNodes(mask: Uint8Array): Int32Array {
  const nodes = new Int32Array(mask.length);
  let count = 0;
  for (let node = 0; node < mask.length; node++) if (mask[node] !== NODE_GIVEN) nodes[count++] = node;
  return nodes.slice(0, count);
}

/** The given node that a missing one takes its value from, or -1. */
function nearestGiven(mask: Uint8Array, { lon, lat, global }: GridFile, node: number): number {
  const columns = lon.length;
  // A global grid has its first meridian again at the end: the steps go around the others.
  const meridians = global ? columns - 1 : columns;
  const row = Math.floor(node / columns);
  const i = (node % columns) % meridians;
  const j = row % lat.length;
  for (const [east, north] of STEPS) {
    if (j + north < 0 || j + north >= lat.length) continue;
    const turned = global ? (i + east + meridians * REACH) % meridians : i + east;
    if (turned < 0 || turned >= meridians) continue;
    const source = (row + north) * columns + turned;
    if (mask[source] === NODE_GIVEN) return source;
  }
  return -1;
}

function fill(values: Float64Array, { targets, sources }: FillPlan): void {
  for (const [index, target] of targets.entries()) {
    const source = sources[index] as number;
    values[2 * target] = source < 0 ? 0 : (values[2 * source] as number);
    values[2 * target + 1] = source < 0 ? 0 : (values[2 * source + 1] as number);
  }
}

function stepsByDistance(): (readonly [number, number])[] {
  const steps: (readonly [number, number])[] = [];
  for (let north = -REACH; north <= REACH; north++) {
    for (let east = -REACH; east <= REACH; east++) if (north !== 0 || east !== 0) steps.push([east, north]);
  }
  // The sort is stable, so that among equals the order of the loops stands: south first, then west.
  return steps.sort(([e1, n1], [e2, n2]) => e1 * e1 + n1 * n1 - (e2 * e2 + n2 * n2));
}
