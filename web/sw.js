// Keeps a whole copy of Linehut on this device, so that it answers with no signal.
//
// The two lines below are filled in when the page is built (`cargo xtask stamp`): what this version is,
// and each of its files with the digest it must have.
const VERSION = "unstamped";
const FILES = [];

// Only caches under this prefix are ours: other pages may live on the same host.
const PREFIX = "linehut-";
const CACHE = PREFIX + VERSION;

const address = (path) => new URL(path, self.registration.scope).href;
const HOME = address("./");
const OWN = new Set(FILES.map(([path]) => address(path)));

self.addEventListener("install", (event) => event.waitUntil(keepAll()));

// All files of this version, or none: a copy with a hole in it would fail where nobody can mend it.
async function keepAll() {
  const cache = await caches.open(CACHE);
  let done = 0;
  await tell(done);
  try {
    await Promise.all(
      FILES.map(async ([path, integrity]) => {
        const answer = await fetch(address(path), { cache: "no-cache", integrity });
        if (!answer.ok) throw new Error(`${path}: ${answer.status}`);
        await cache.put(address(path), answer);
        await tell(++done);
      }),
    );
  } catch (error) {
    await caches.delete(CACHE);
    throw error;
  }
}

async function tell(done) {
  const pages = await self.clients.matchAll({ type: "window", includeUncontrolled: true });
  for (const page of pages) page.postMessage({ type: "keeping", done, of: FILES.length });
}

self.addEventListener("activate", (event) => event.waitUntil(settle()));

async function settle() {
  const names = await caches.keys();
  const old = names.filter((name) => name.startsWith(PREFIX) && name !== CACHE);
  await Promise.all(old.map((name) => caches.delete(name)));
  await self.clients.claim();
}

// A new version waits until the person says so: nothing changes under the hand.
self.addEventListener("message", (event) => {
  if (event.data?.type === "take-over") self.skipWaiting();
});

self.addEventListener("fetch", (event) => {
  const { request } = event;
  if (request.method !== "GET" || !request.url.startsWith(HOME)) return;
  const url = new URL(request.url);
  let href = url.origin + url.pathname;
  if (href === address("index.html")) href = HOME;
  if (OWN.has(href)) event.respondWith(own(href, request));
  else if (request.mode === "navigate") event.respondWith(fetch(request).catch(() => own(HOME, request)));
});

// The copy first; the network only if the browser has thrown the copy away.
async function own(href, request) {
  const cache = await caches.open(CACHE);
  return (await cache.match(href)) ?? fetch(request);
}
