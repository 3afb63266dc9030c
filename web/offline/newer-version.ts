/** How often a page that stays open looks for a newer version, ms. */
const EVERY = 3_600_000;
/** After so long a page has what it loads at first, ms. */
const LOADED = 5000;
/** A worker that takes longer to say its name has failed to start, ms. */
const PATIENCE = 10_000;
/** What names a version in the page's address. */
const NAMED = "?version=";

/**
 * Keeps the page on the device for later visits without a network, and says when a newer version waits.
 *
 * @param found called with what brings the newer version in and loads the page anew
 */
export async function keepOffline(found: (useIt: () => void) => void): Promise<void> {
  // A page opened from a file, or served without TLS from elsewhere, has no service workers.
  if (!("serviceWorker" in navigator)) return;
  const named = location.search.startsWith(NAMED);
  if (named) history.replaceState(null, "", location.pathname);
  const { serviceWorker } = navigator;
  const address = new URL("service-worker.js", document.baseURI);
  let registration: ServiceWorkerRegistration;
  try {
    registration = await serviceWorker.register(address, { updateViaCache: "none" });
  } catch {
    // A browser may deny it, as in some private windows: the page then works as long as there is a network.
    return;
  }
  const own = named ? registration.waiting : null;
  if (own !== null) setTimeout(() => registration.waiting === own && own.postMessage("activate"), LOADED);
  const tell = (): void => {
    const { waiting } = registration;
    // The first version of all waits for nobody.
    if (waiting !== null && waiting !== own && serviceWorker.controller !== null)
      found(() => useNewer(serviceWorker, registration));
  };
  const watch = () => registration.installing?.addEventListener("statechange", tell);
  registration.addEventListener("updatefound", watch);
  watch();
  tell();
  // Offline now is not offline for good.
  setInterval(() => registration.update().catch(() => undefined), EVERY);
}

/**
 * The page of a newer version is asked for by name from the worker before, and lets its own worker in once it is there. The other way
 * round a press could be lost: a worker that is let in waits until the one before has nothing to answer, and a request that comes
 * just as that one is stopped starts it again, for half a minute at least.
 */
function useNewer(serviceWorker: ServiceWorkerContainer, { waiting }: ServiceWorkerRegistration): void {
  // Another tab may have let it in. Where its worker does not even start, the offer comes again.
  const reloading = setTimeout(() => location.reload(), waiting === null ? 0 : PATIENCE);
  serviceWorker.addEventListener("message", ({ data: version }) => {
    clearTimeout(reloading);
    location.replace(NAMED + version);
  });
  waiting?.postMessage("name");
}
