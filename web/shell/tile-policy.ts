let allowed: string | null = null;

/**
 * Narrows where images may come from to the page itself and, where the user has entered one, the origin of their tiles. A policy in
 * force can only be narrowed: another address takes effect when the page is loaded again.
 */
export function narrowImages(tiles: string): void {
  allowed = tileOrigin(tiles);
  const meta = document.createElement("meta");
  meta.httpEquiv = "Content-Security-Policy";
  meta.content = `img-src 'self' data: blob: ${tileOrigin(tiles) ?? ""}`.trim();
  document.head.append(meta);
}

/** Whether tiles of this address are let in; those of a new one are once the page is loaded again. */
export function letsIn(tiles: string): boolean {
  return allowed !== null && allowed === tileOrigin(tiles);
}

/** Whether a text is an address of raster tiles: a web address that holds {z}, {x} and {y}. */
export function isTileAddress(tiles: string): boolean {
  return tileOrigin(tiles) !== null && ["{z}", "{x}", "{y}"].every((part) => tiles.includes(part));
}

/** The origin that a tile address fetches from; `null` for none or for one that is no web address. */
export function tileOrigin(tiles: string): string | null {
  try {
    const { origin, protocol } = new URL(tiles.replace("{s}", "a"));
    return protocol === "https:" || protocol === "http:" ? origin : null;
  } catch {
    return null;
  }
}
