/** How often a page that stays open looks for a newer version, ms. */
const EVERY = 3_600_000;

/**
 * Keeps the page on the device for later visits without a network, and says when a newer version waits.
 *
 * @param found called with what brings the newer version in and reloads the page
 */
export async function keepOffline(found: (useIt: () => void) => void): Promise<void> {
  // A page opened from a file, or served without TLS from elsewhere, has no service workers.
  if (!("serviceWorker" in navigator)) return;
  const { serviceWorker } = navigator;
  const address = new URL("service-worker.js", document.baseURI);
  let registration: ServiceWorkerRegistration;
  try {
    registration = await serviceWorker.register(address, { updateViaCache: "none" });
  } catch {
    // A browser may deny it, as in some private windows: the page then works as long as there is a network.
    return;
  }
  const tell = (): void => {
    const { waiting } = registration;
    // The first version of all waits for nobody.
    if (waiting !== null && serviceWorker.controller !== null)
      found(() => useVersion(serviceWorker, waiting));
  };
  registration.addEventListener("updatefound", () => {
    registration.installing?.addEventListener("statechange", tell);
  });
  tell();
  // Offline now is not offline for good.
  setInterval(() => registration.update().catch(() => undefined), EVERY);
}

function useVersion(serviceWorker: ServiceWorkerContainer, waiting: ServiceWorker): void {
  serviceWorker.addEventListener("controllerchange", () => location.reload(), { once: true });
  waiting.postMessage("activate");
}
