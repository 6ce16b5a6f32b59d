/**
 * The foot of each printed page. The diaphragm's name and revision are put into [data-print=diaphragm] by whoever
 * knows them (`setPrintedDiaphragm`); the rest is filled in as printing starts.
 */
export function startPrintFoot(): void {
  addEventListener('beforeprint', () => {
    put('page', document.querySelector('main h1')?.textContent ?? '');
    put('when', `printed ${new Date().toLocaleString('en-GB', { dateStyle: 'long', timeStyle: 'short' })}`);
    put('address', location.href.length <= 300 ? location.href : `${location.href.split('#')[0]} (the full link is on the hand-over page)`);
  });
}

function put(what: string, text: string): void {
  for (const place of document.querySelectorAll(`[data-print=${what}]`)) {
    place.textContent = text;
  }
}
