/** Links between pages, the same call on the hosted site, on a host page and in the single file. */
import { pages } from 'hoopsheet:build';

import { siteRoot } from './shipped.js';

/** Parts of the address that travel along from page to page. */
const carried = ['d', 'frame'];

/**
 * Address of a page by name ("modes"), carrying which diaphragm (?d=) and whether framed (?frame) along from the
 * address of this page. `fragment` is an id on that page, or a hand-over code.
 */
export function pageHref(name: string, fragment = ''): string {
  if (globalThis.HOOPSHEET_SINGLE) {
    return fragment === '' ? `#${name}` : `#${name}--${fragment}`;
  }
  const url = new URL(`${name}.html`, siteRoot());
  carry(url);
  url.hash = fragment;
  return url.href;
}

/** Copies the travelling parts of this page's address onto `url`, unless it has its own. */
export function carry(url: URL): void {
  const here = new URLSearchParams(location.search);
  for (const key of carried) {
    const value = here.get(key);
    if (value !== null && !url.searchParams.has(key)) {
      url.searchParams.set(key, value);
    }
  }
}

/**
 * The fragment of this page's address without "#": an id on the page, or a hand-over code. In the single file
 * fragments have the form #PAGE--REST, and REST is returned.
 */
export function pageFragment(): string {
  const hash = location.hash.slice(1);
  return globalThis.HOOPSHEET_SINGLE ? splitHash(hash).rest : hash;
}

/** Takes a fragment of the single file apart. A fragment that begins with no page's name is left whole. */
export function splitHash(hash: string): { page: string; rest: string } {
  const at = hash.indexOf('--');
  const page = at < 0 ? hash : hash.slice(0, at);
  if (!pages.some((p) => p.name === page)) {
    return { page: '', rest: hash };
  }
  return { page, rest: at < 0 ? '' : hash.slice(at + 2) };
}
