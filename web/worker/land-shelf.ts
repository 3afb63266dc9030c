import type { Land, LandTopology } from "./core.ts";

/** The fine coast as land to hold routes against, made when first asked for. */
export interface LandShelf {
  readonly ready: () => Land | null;
  load(): Promise<void>;
}

export function createLandShelf(topology: () => Promise<LandTopology>): LandShelf {
  let land: Land | null = null;
  let loading: Promise<void> | null = null;
  return {
    ready: () => land,
    load() {
      loading ??= Promise.all([topology(), import("./land.ts")]).then(
        ([found, { prepareLand }]) => {
          land = prepareLand(found);
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
