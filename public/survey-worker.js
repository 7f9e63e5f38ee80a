/*
 * Keeps the survey page and the scripts it is made of, so that it opens without a signal. Nothing else: no data of the
 * shop passes through here, and with a signal every page comes from the server. The page is kept with its own headers,
 * so its policy and its nonce go together.
 */
const KEPT = "survey-page-1";
const isSurvey = (path) => /^\/lines\/[^/]+\/survey\/?$/.test(path);
const isAsset = (path) => path.startsWith("/_next/static/");

self.addEventListener("install", () => self.skipWaiting());
self.addEventListener("activate", (event) => event.waitUntil(self.clients.claim()));

self.addEventListener("message", (event) => {
  const { page, assets } = event.data ?? {};
  if (typeof page !== "string" || !isSurvey(page) || !Array.isArray(assets)) return;
  event.waitUntil(keep(page, assets.filter((asset) => isAsset(new URL(asset, self.location.origin).pathname))));
});

async function keep(page, assets) {
  const cache = await caches.open(KEPT);
  const answer = await fetch(page, { credentials: "same-origin" });
  if (answer.ok && !answer.redirected) await cache.put(page, answer);
  for (const asset of assets) if (!(await cache.match(asset))) await cache.add(asset).catch(() => undefined);
  // What an earlier release was made of is not needed any more.
  for (const request of await cache.keys()) {
    if (isAsset(new URL(request.url).pathname) && !assets.includes(request.url)) await cache.delete(request);
  }
}

self.addEventListener("fetch", (event) => {
  const { pathname, origin } = new URL(event.request.url);
  if (event.request.method !== "GET" || origin !== self.location.origin) return;
  if (event.request.mode === "navigate" && isSurvey(pathname)) event.respondWith(pageOf(event.request, pathname));
  else if (isAsset(pathname)) event.respondWith(assetOf(event.request));
});

async function pageOf(request, pathname) {
  try {
    return await fetch(request);
  } catch (failure) {
    const kept = await (await caches.open(KEPT)).match(pathname);
    if (kept) return kept;
    throw failure;
  }
}

/* Their names carry a hash of what is in them: a kept one is never out of date. */
async function assetOf(request) {
  const cache = await caches.open(KEPT);
  const kept = await cache.match(request.url);
  if (kept) return kept;
  const answer = await fetch(request);
  if (answer.ok) await cache.put(request.url, answer.clone());
  return answer;
}
