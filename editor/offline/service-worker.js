// The build puts the names of all its files here, and a name for the whole that changes when any of them does.
const FILES = __FILES__;
const CACHE = `skewback-${__BUILD__}`;

// Everything is fetched at once, the parts that are loaded late too: whoever has opened the editor has all of it.
self.addEventListener('install', (event) => {
  event.waitUntil(caches.open(CACHE).then((cache) => cache.addAll(FILES)));
});

self.addEventListener('activate', (event) => {
  const old = (name) => name.startsWith('skewback-') && name !== CACHE;
  event.waitUntil(
    caches.keys().then((names) => Promise.all(names.filter(old).map((name) => caches.delete(name)))),
  );
});

// The page itself is asked for anew where there is a network, so that a new build is seen; its files, whose names
// change with their content, are not.
self.addEventListener('fetch', (event) => {
  const { request } = event;
  if (request.method !== 'GET' || new URL(request.url).origin !== self.location.origin) return;
  if (request.mode === 'navigate') {
    event.respondWith(fetch(request).catch(() => kept('./index.html')));
    return;
  }
  event.respondWith(kept(request).then((response) => response ?? fetch(request)));
});

// A host may say that its files vary with who asks; ours do not.
function kept(request) {
  return caches.match(request, { ignoreVary: true, ignoreSearch: true });
}
