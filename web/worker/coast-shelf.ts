import type { CoastIndex } from "./coast-index.ts";
import type { CoastDetail, CoastTile } from "./protocol.ts";

/** The two coastlines, each fetched and indexed once, when first asked for. */
export interface CoastShelf {
  /** A tile of the detail asked for, or of the coarse coast while the fine one is not there. */
  tile(z: number, x: number, y: number, detail: CoastDetail): Promise<CoastTile>;
  load(detail: CoastDetail): Promise<CoastIndex>;
}

export function createCoastShelf(fetchCoast: (detail: CoastDetail) => Promise<unknown>): CoastShelf {
  const loading = new Map<CoastDetail, Promise<CoastIndex>>();
  let fine: CoastIndex | null = null;

  const load = (detail: CoastDetail): Promise<CoastIndex> => {
    const begun = loading.get(detail);
    if (begun !== undefined) return begun;
    // What cuts tiles travels with the coast: it is of no use before.
    const index = Promise.all([fetchCoast(detail), import("./coast-index.ts")]).then(
      ([topology, { indexCoast }]) => indexCoast(topology, detail),
    );
    loading.set(detail, index);
    index.then(
      (ready) => {
        if (detail === "10m") fine = ready;
      },
      // A failed load is not kept: offline now is not offline for good.
      () => loading.delete(detail),
    );
    return index;
  };

  return {
    load,
    async tile(z, x, y, detail) {
      if (detail === "10m" && fine !== null) return fine.tile(z, x, y);
      return (await load("50m")).tile(z, x, y);
    },
  };
}
