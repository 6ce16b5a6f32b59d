import { splitHash } from '../pages.js';
import { linkOf, showCurrentChapter } from './links.js';

/**
 * Turns pages in the single file: #modes shows the page "modes", #modes--ID a place on it. Each page waits in a
 * <template>; turning to it fills <main> with a fresh copy, as loading a page does on the hosted site.
 */
export function startTurning(): void {
  addEventListener('hashchange', () => turn(true));
  addEventListener('click', turnInstead, { capture: true });
  turn(false);
}

let shown = '';

function turn(byReader: boolean): void {
  const { page, rest } = splitHash(location.hash.slice(1));
  if (page === '' && rest === 'content') {
    return; // the skip link
  }
  // A fragment that names no page is a hand-over code pasted behind the file's address.
  const name = page !== '' ? page : rest === '' ? 'index' : rest === 'licences' ? 'licences' : 'hand-over';
  const source = document.querySelector<HTMLTemplateElement>(`template[data-page="${name}"]`);
  const main = document.getElementById('content') as HTMLElement;
  if (source && name !== shown) {
    main.replaceChildren(document.importNode(source.content, true));
    shown = name;
    document.title = `${source.dataset.title} - Hoopsheet`;
    for (const link of document.querySelectorAll('nav.chapters a, footer a')) {
      if (link.getAttribute('href') === `#${name}`) {
        link.setAttribute('aria-current', 'page');
      } else {
        link.removeAttribute('aria-current');
      }
    }
    showCurrentChapter();
    scrollTo(0, 0);
    if (byReader) {
      main.focus({ preventScroll: true });
    }
  }
  if (rest !== '') {
    document.getElementById(`${name}--${rest}`)?.scrollIntoView();
  }
}

/** An element's link to a page of the hosted site ("modes.html#x") turns to the page instead. */
function turnInstead(event: Event): void {
  const raw = linkOf(event)?.getAttribute('href') ?? '';
  const match = /^(?:\.\/)?([a-z-]+)\.html(?:\?[^#]*)?(?:#(.*))?$/.exec(raw);
  if (match && document.querySelector(`template[data-page="${match[1]}"]`)) {
    event.preventDefault();
    location.hash = match[2] ? `${match[1]}--${match[2]}` : match[1]!;
  }
}
