/** Small choices kept in the browser beside the store. Both storages may be refused; then nothing is remembered. */

const lastKey = 'hoopsheet-last-diaphragm';

/** The diaphragm that this tab had open last, or, for a new tab, that any tab had. Empty where none is known. */
export function lastDiaphragm(): string {
  try {
    return sessionStorage.getItem(lastKey) ?? localStorage.getItem(lastKey) ?? '';
  } catch {
    return '';
  }
}

export function rememberDiaphragm(id: string): void {
  try {
    sessionStorage.setItem(lastKey, id);
    localStorage.setItem(lastKey, id);
  } catch {
    // Refused: the address still says which one it is.
  }
}

/** The diaphragm that the address of this page asks for (?d=); empty where it asks for none. */
export function addressedDiaphragm(): string {
  return new URLSearchParams(location.search).get('d') ?? '';
}

/** Writes the diaphragm into the address, without a new entry in the history. */
export function addressDiaphragm(id: string): void {
  const url = new URL(location.href);
  if (url.searchParams.get('d') === id) {
    return;
  }
  url.searchParams.set('d', id);
  try {
    history.replaceState(history.state, '', url);
  } catch {
    // A browser may forbid it for local files; the tab remembers all the same.
  }
}
