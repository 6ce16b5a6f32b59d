import { pages } from 'hoopsheet:build';

import { carry } from '../pages.js';
import { siteRoot } from '../shipped.js';

/**
 * Keeps ?d= (which diaphragm) and ?frame in every link to another page of ours, wherever the link stands, in an
 * element's shadow tree too. A link is completed at the moment it may be used: pressed, focused, its menu opened.
 */
export function startCarrying(): void {
  for (const kind of ['pointerdown', 'focusin', 'contextmenu', 'click']) {
    addEventListener(kind, (event) => {
      const link = linkOf(event);
      const url = link && pageOf(link);
      if (link && url) {
        carry(url);
        link.href = url.href;
      }
    }, { capture: true });
  }
}

/** The link that an event happened on, through shadow trees. */
export function linkOf(event: Event): HTMLAnchorElement | undefined {
  return event.composedPath().find((part): part is HTMLAnchorElement => part instanceof HTMLAnchorElement && part.hasAttribute('href'));
}

/** The link's address if it leads to a page of this site. */
function pageOf(link: HTMLAnchorElement): URL | undefined {
  const raw = link.getAttribute('href') ?? '';
  if (raw.startsWith('#')) {
    return undefined;
  }
  const url = new URL(link.href);
  const root = siteRoot();
  if (url.origin !== root.origin || !url.pathname.startsWith(root.pathname)) {
    return undefined;
  }
  const rest = url.pathname.slice(root.pathname.length);
  return rest === '' || rest === 'licences.html' || pages.some((page) => rest === `${page.name}.html`) ? url : undefined;
}

/** Brings the chapter one is in into sight where the list is a strip that scrolls sideways. */
export function showCurrentChapter(): void {
  const strip = document.querySelector('nav.chapters');
  const current = strip?.querySelector('[aria-current]');
  if (strip && current && strip.scrollWidth > strip.clientWidth) {
    const box = current.getBoundingClientRect();
    const frame = strip.getBoundingClientRect();
    strip.scrollLeft += box.left + box.width / 2 - (frame.left + frame.width / 2);
  }
}
