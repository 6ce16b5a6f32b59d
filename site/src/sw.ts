/// <reference lib="webworker" />
/**
 * The service worker: keeps one version of the site whole, serves it from the device, and changes versions only when
 * the page says so.
 *
 * - Everything in the list arrives, or the new version is not installed and the old one stays.
 * - It looks in its own cache only, never in another version's.
 * - The zip and the single file are downloads: they pass through. defaults.json belongs to whoever hosts the site: the
 *   network's copy first, the last one seen when there is no network.
 */
import { buildId, files, version } from 'hoopsheet:precache';

declare const self: ServiceWorkerGlobalScope;

const root = new URL('./', self.location.href);
const prefix = `hoopsheet ${root.pathname} `; // caches belong to the origin: name the path as well
const cacheName = prefix + version;
const listed = new Set(files.map((file) => new URL(file.path, root).href));
const defaults = new URL('defaults.json', root).href;

self.addEventListener('install', (event) => {
  event.waitUntil(install());
});

self.addEventListener('activate', (event) => {
  event.waitUntil(activate());
});

self.addEventListener('message', (event) => {
  if (event.data === 'take-over') {
    event.waitUntil(self.skipWaiting());
  }
});

self.addEventListener('fetch', (event) => {
  const request = event.request;
  if (request.method !== 'GET' || request.headers.has('range')) {
    return;
  }
  const url = new URL(request.url);
  url.search = '';
  url.hash = '';
  if (url.href === defaults) {
    event.respondWith(networkFirst(request));
    return;
  }
  const file = fileOf(url);
  if (file !== undefined) {
    event.respondWith(kept(file, request));
  }
});

/** The listed file that answers for an address: itself, index.html of its directory, or the page without ".html". */
function fileOf(url: URL): string | undefined {
  const candidates = url.href.endsWith('/') ? [`${url.href}index.html`] : [url.href, `${url.href}.html`];
  return candidates.find((candidate) => listed.has(candidate));
}

async function kept(file: string, request: Request): Promise<Response> {
  const cache = await caches.open(cacheName);
  const answer = await cache.match(file, { ignoreSearch: true });
  return answer ?? fetch(request);
}

async function networkFirst(request: Request): Promise<Response> {
  const cache = await caches.open(cacheName);
  try {
    const answer = await fetch(request, { cache: 'no-cache' });
    if (answer.ok) {
      await cache.put(defaults, answer.clone());
    }
    return answer;
  } catch (error) {
    const last = await cache.match(defaults, { ignoreSearch: true });
    if (last) {
      return last;
    }
    throw error;
  }
}

async function install(): Promise<void> {
  const cache = await caches.open(cacheName);
  try {
    await Promise.all(files.map((file) => keep(cache, file.path, file.sha256)));
  } catch (error) {
    await caches.delete(cacheName);
    throw error;
  }
  try {
    await networkFirst(new Request(defaults));
  } catch {
    // A team may have removed it; the pages then use their own defaults.
  }
}

/** Fetches one file, past the http cache, makes sure that it is the one that was built, and keeps it. */
async function keep(cache: Cache, path: string, sha256: string | undefined): Promise<void> {
  const url = new URL(path, root).href;
  const answer = await fetch(url, { cache: 'no-cache', credentials: 'same-origin' });
  if (!answer.ok) {
    throw new Error(`${path}: the server answered ${answer.status}`);
  }
  const body = await answer.arrayBuffer();
  if (sha256 !== undefined) {
    const sum = new Uint8Array(await crypto.subtle.digest('SHA-256', body));
    if (btoa(String.fromCharCode(...sum)) !== sha256) {
      throw new Error(`${path} arrived damaged or from another version`);
    }
  } else if (path.endsWith('.html') && !new TextDecoder().decode(body).includes(`data-build="${buildId}"`)) {
    throw new Error(`${path} is a page of another version`);
  }
  // A fresh response: one that was redirected may not answer a navigation.
  await cache.put(url, new Response(body, { status: 200, headers: { 'Content-Type': contentType(path, answer) } }));
}

/** Of the types that browsers insist on we are sure ourselves; servers are not always. */
function contentType(path: string, answer: Response): string {
  const ending = path.slice(path.lastIndexOf('.'));
  const sure: Record<string, string> = {
    '.html': 'text/html; charset=utf-8',
    '.js': 'text/javascript; charset=utf-8',
    '.css': 'text/css; charset=utf-8',
    '.svg': 'image/svg+xml',
    '.woff2': 'font/woff2',
    '.webmanifest': 'application/manifest+json',
  };
  return sure[ending] ?? answer.headers.get('Content-Type') ?? 'application/octet-stream';
}

async function activate(): Promise<void> {
  const names = await caches.keys();
  await Promise.all(names.filter((name) => name.startsWith(prefix) && name !== cacheName).map((name) => caches.delete(name)));
  // The first install serves the pages already open too, so that one visit is enough to work without a network.
  await self.clients.claim();
}
