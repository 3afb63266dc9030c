import type { Land, LandFinder, LandTopology } from "./core.ts";

/** The fine coast as land to hold routes against, made when first asked for. */
export interface LandShelf {
  readonly ready: () => Land | null;
  /** What tells a route's stretches over that land. */
  readonly finder: () => LandFinder | null;
  load(): Promise<void>;
}

export function createLandShelf(topology: () => Promise<LandTopology>): LandShelf {
  let land: Land | null = null;
  let finder: LandFinder | null = null;
  let loading: Promise<void> | null = null;
  return {
    ready: () => land,
    finder: () => finder,
    load() {
      loading ??= Promise.all([topology(), import("./land.ts")]).then(
        ([found, { landFinder, prepareLand }]) => {
          land = prepareLand(found);
          finder = landFinder(land);
        },
        (fault: unknown) => {
          loading = null;
          throw fault;
        },
      );
      return loading;
    },
  };
}
