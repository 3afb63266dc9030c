/**
 * Narrows where images may come from to the page itself and, where the user has entered one, the origin of their tiles. A policy in
 * force can only be narrowed: another address takes effect when the page is loaded again.
 */
export function narrowImages(tiles: string): void {
  const meta = document.createElement("meta");
  meta.httpEquiv = "Content-Security-Policy";
  meta.content = `img-src 'self' data: blob: ${tileOrigin(tiles) ?? ""}`.trim();
  document.head.append(meta);
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
