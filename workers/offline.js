// The offline cache. The build writes sw.js from this: it puts the list of files and their revision in place of the name below.
// A new version is fetched in the background and waits: the page says so and the user decides when it takes over.
const build = __BUILD__;

const prefix = `spherelathe ${self.registration.scope} `;
const cacheName = prefix + build.revision;
const address = (file) => new URL(file, self.registration.scope).href;
const whenUsed = new Set(build.whenUsed.map(address));
const known = new Set([...build.ahead.map(address), ...whenUsed]);

self.addEventListener('install', (event) => {
  event.waitUntil(
    (async () => {
      const cache = await caches.open(cacheName);
      await cache.addAll(build.ahead.map((file) => new Request(address(file), { cache: 'reload' })));
      // What the user fetched under the old version stays available under the new one: its name carries its hash.
      for (const url of whenUsed) {
        const held = await caches.match(url);
        if (held) await cache.put(url, held);
      }
    })(),
  );
});

self.addEventListener('activate', (event) => {
  event.waitUntil(
    (async () => {
      for (const name of await caches.keys()) {
        if (name.startsWith(prefix) && name !== cacheName) await caches.delete(name);
      }
      await self.clients.claim();
    })(),
  );
});

self.addEventListener('message', (event) => {
  if (event.data === 'take over') self.skipWaiting();
});

async function answer(request, url) {
  const cache = await caches.open(cacheName);
  const held = await cache.match(url);
  if (held) return held;
  const fresh = await fetch(request);
  if (fresh.ok && whenUsed.has(url)) await cache.put(url, fresh.clone());
  return fresh;
}

self.addEventListener('fetch', (event) => {
  const { request } = event;
  if (request.method !== 'GET') return;
  const { href } = new URL(request.url);
  const bare = href.replace(/[?#].*$/, '');
  const url = bare === self.registration.scope ? address('index.html') : bare;
  if (known.has(url)) event.respondWith(answer(request, url));
});
