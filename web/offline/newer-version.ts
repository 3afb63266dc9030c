/** How often a page that stays open looks for a newer version, ms. */
const EVERY = 3_600_000;
/** How long the worker of a version that was asked for is waited for, ms; it mostly takes a twentieth of that. */
const PATIENCE = 1000;
/** What names a version in the page's address: a page that is asked for so may come before its worker. */
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
 * A worker that was let in waits until the one before has nothing to answer, and a request that comes just as that one is stopped
 * starts it again, for half a minute at least. The page does not wait for that: whichever worker answers then is asked for it by name.
 */
function useNewer(serviceWorker: ServiceWorkerContainer, { waiting }: ServiceWorkerRegistration): void {
  // Another tab may have let it in.
  if (waiting === null) {
    location.reload();
    return;
  }
  // A worker that can't even be started leaves its offer standing.
  let going = setTimeout(() => location.reload(), 10 * PATIENCE);
  serviceWorker.addEventListener("message", ({ data: version }) => {
    clearTimeout(going);
    going = setTimeout(() => location.replace(NAMED + version), PATIENCE);
  });
  serviceWorker.addEventListener("controllerchange", () => location.reload(), { once: true });
  waiting.postMessage("activate");
}
