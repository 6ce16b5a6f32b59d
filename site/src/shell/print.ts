import { session } from '../session/session.js';

let override = '';

/**
 * Says which diaphragm a print is of where it is not the open one, as on a hand-over page that shows what was received.
 * Empty goes back to the open one.
 */
export function setPrintedDiaphragm(text: string): void {
  override = text;
}

/** Fills in the foot of each printed page - diaphragm and revision, page, date, address - as printing starts. */
export function startPrintFoot(): void {
  addEventListener('beforeprint', () => {
    put('diaphragm', override || openDiaphragm());
    put('page', document.querySelector('main h1')?.textContent ?? '');
    put('when', `printed ${new Date().toLocaleString('en-GB', { dateStyle: 'long', timeStyle: 'short' })}`);
    put('address', location.href.length <= 300 ? location.href : `${location.href.split('#')[0]} (the full link is on the hand-over page)`);
  });
}

function openDiaphragm(): string {
  if (!session.document) {
    return 'Hoopsheet';
  }
  const { name, revision } = session.document;
  const kept = revision === 0 ? 'no revision kept' : `revision ${revision}${session.unkept ? ', changed since' : ''}`;
  return `${name}, ${kept}`;
}

function put(what: string, text: string): void {
  for (const place of document.querySelectorAll(`[data-print=${what}]`)) {
    place.textContent = text;
  }
}
