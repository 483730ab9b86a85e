/**
 * Keeps the page available without a connection. `onNewVersion` is called when a newer version has been fetched and
 * waits; the page tells the user, and calls `takeOver` on the user's word: the page then loads again.
 */
export async function keepOffline(onNewVersion: (takeOver: () => void) => void): Promise<void> {
  if (import.meta.env.DEV || !('serviceWorker' in navigator)) return;
  const { serviceWorker } = navigator;
  const registration = await serviceWorker.register('./sw.js', { updateViaCache: 'none' });

  const offer = (waiting: ServiceWorker) =>
    onNewVersion(() => {
      serviceWorker.addEventListener('controllerchange', () => location.reload(), { once: true });
      waiting.postMessage('take over');
    });

  if (registration.waiting) offer(registration.waiting);
  registration.addEventListener('updatefound', () => {
    const fresh = registration.installing;
    fresh?.addEventListener('statechange', () => {
      // Without a controller this is the first visit, and there is no older version to replace.
      if (fresh.state === 'installed' && serviceWorker.controller) offer(fresh);
    });
  });
}
