/*
 * Keeps the page on the device, so that it opens without a network. The build puts the list of files before this text; its version
 * is a digest of their contents, so that the same files are never fetched again under another name.
 */

declare const self: ServiceWorkerGlobalScope;
declare const PRECACHE: {
  readonly version: string;
  /** Addresses relative to the scope; the page itself is "./". */
  readonly files: readonly string[];
};

// Several copies of the page may be served from folders of one origin; each keeps to its own.
const OWN = `legwork ${self.registration.scope} `;
const CURRENT = OWN + PRECACHE.version;
const PAGE = new URL("./", self.registration.scope).href;
const INDEX = new URL("index.html", PAGE).href;
const LISTED = new Set(PRECACHE.files.map((file) => new URL(file, PAGE).href));

/** All files or none: a version is either whole or not installed. */
async function install(): Promise<void> {
  const cache = await caches.open(CURRENT);
  await Promise.all([...LISTED].map((address) => keep(cache, address)));
}

async function keep(cache: Cache, address: string): Promise<void> {
  // What carries a digest of its content in its name need not be fetched twice.
  const known = address.startsWith(`${PAGE}assets/`) ? await caches.match(address) : undefined;
  if (known !== undefined) return cache.put(address, known);
  const answer = await fetch(address, { cache: "no-cache", credentials: "same-origin" });
  if (!answer.ok) throw new Error(`${address} could not be fetched (${answer.status})`);
  // An answer that was redirected may not be given to a navigation.
  const { headers } = answer;
  await cache.put(address, answer.redirected ? new Response(await answer.blob(), { headers }) : answer);
}

/** Takes away older versions, except the one before: pages of it that are still open load parts of it later. */
async function forgetOlder(): Promise<void> {
  const older = (await caches.keys()).filter((name) => name.startsWith(OWN) && name !== CURRENT);
  await Promise.all(older.slice(0, -1).map((name) => caches.delete(name)));
}

async function answer(request: Request, address: string): Promise<Response> {
  // The page of a newer version that the user asked for; its worker still waits.
  const named = new URL(request.url).searchParams.get("version");
  const newer = named === null ? undefined : await caches.match(address, { cacheName: OWN + named });
  if (newer !== undefined) return newer;
  const cache = await caches.open(CURRENT);
  return (await cache.match(address)) ?? (await caches.match(address)) ?? fetch(request);
}

/** The address under which a request is kept; `null` where it is none of this page's. */
function keptAs({ method, url }: Request): string | null {
  const address = url.replace(/[?#].*$/, "");
  if (method !== "GET" || !address.startsWith(PAGE)) return null;
  if (address === INDEX) return PAGE;
  return LISTED.has(address) || address.startsWith(`${PAGE}assets/`) ? address : null;
}

self.addEventListener("install", (event) => event.waitUntil(install()));
self.addEventListener("activate", (event) => event.waitUntil(forgetOlder().then(() => self.clients.claim())));
self.addEventListener("message", ({ data, source }) => {
  if (data === "name") source?.postMessage(PRECACHE.version);
  // A newer version waits until the user asks for it.
  if (data === "activate") void self.skipWaiting();
});
self.addEventListener("fetch", (event) => {
  const address = keptAs(event.request);
  if (address !== null) event.respondWith(answer(event.request, address));
});

export {};
