// Keeps the planting sheet readable without signal. Its scope is /sheet/ and nothing else.
const STORE = 'hilum-sheet-1';

self.addEventListener('install', () => self.skipWaiting());

self.addEventListener('activate', (event) => {
  event.waitUntil(
    caches
      .keys()
      .then((names) => Promise.all(names.filter((name) => name.startsWith('hilum-sheet-') && name !== STORE).map((name) => caches.delete(name))))
      .then(() => self.clients.claim()),
  );
});

// The page says what it is made of; each part is kept if it can be fetched.
self.addEventListener('message', (event) => {
  const keep = event.data?.keep;
  if (!Array.isArray(keep)) return;
  event.waitUntil(
    caches.open(STORE).then((store) =>
      Promise.all(
        keep.map(async (address) => {
          if (new URL(address).pathname.startsWith('/api/')) return;
          try {
            const answer = await fetch(address, { cache: 'reload' });
            if (answer.ok) await store.put(address, answer);
          } catch {
            // No signal just now: it is kept the next time.
          }
        }),
      ),
    ),
  );
});

async function fresh(request) {
  const store = await caches.open(STORE);
  try {
    const answer = await fetch(request);
    if (answer.ok) await store.put(request.url, answer.clone());
    return answer;
  } catch (error) {
    const kept = await store.match(request.url, { ignoreVary: true });
    if (kept) return kept;
    throw error;
  }
}

async function kept(request) {
  const store = await caches.open(STORE);
  const found = await store.match(request.url, { ignoreVary: true });
  if (found) return found;
  const answer = await fetch(request);
  if (answer.ok) await store.put(request.url, answer.clone());
  return answer;
}

self.addEventListener('fetch', (event) => {
  const { request } = event;
  if (request.method !== 'GET') return;
  const address = new URL(request.url);
  if (address.origin !== self.location.origin || address.pathname.startsWith('/api/')) return;
  // Built files and fonts never change under their name; the sheet itself is fetched anew while there is signal.
  if (/^\/(_next\/static|fonts)\//.test(address.pathname)) event.respondWith(kept(request));
  else event.respondWith(fresh(request));
});
