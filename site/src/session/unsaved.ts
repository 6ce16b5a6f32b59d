/**
 * What had not reached the store when this tab left a page, for the next page of the same tab: a page that is left ends
 * its workers at once, and a save that has just begun with them. Only the tab's own storage can be written in that moment.
 */
import type { Diaphragm, Edit, OpenedRecord } from '../contract.js';

const key = 'hoopsheet-unsaved';

/** The working copy as it was, with edits that the engine had not answered. */
export interface Unsaved {
  readonly document: Diaphragm;
  readonly drafts: Readonly<Record<string, string>>;
  readonly units: Readonly<Record<string, string>>;
  readonly desk: Readonly<Record<string, string>>;
  readonly edits: readonly Edit[];
  /** False where the browser keeps no records: then the tab carries the only copy from page to page. */
  readonly kept: boolean;
  /** Of the last save that was answered. */
  readonly stamp: number;
  /** Whether another tab had the diaphragm open too, or had written it. */
  readonly shared: boolean;
}

export function putUnsaved(unsaved: Unsaved): void {
  try {
    sessionStorage.setItem(key, JSON.stringify(unsaved));
  } catch {
    // Refused or full: the save that has been sent may still arrive.
  }
}

export function dropUnsaved(): void {
  try {
    sessionStorage.removeItem(key);
  } catch {
    // Refused: nothing was put there either.
  }
}

/** Takes out what was left of a diaphragm; null where nothing was, or where all of it has arrived in the store. */
export function takeUnsaved(opened: OpenedRecord): Unsaved | null {
  const unsaved = take((u) => u.kept && u.document.id === opened.document.id && u.document.schema === opened.document.schema);
  return unsaved && unsaved.edits.length === 0 && sameContent(unsaved, opened) ? null : unsaved;
}

/** Takes out what was left of work that the browser refuses to keep. */
export function takeUnkept(): Unsaved | null {
  return take((u) => !u.kept);
}

function take(wanted: (unsaved: Unsaved) => boolean): Unsaved | null {
  try {
    const text = sessionStorage.getItem(key);
    const unsaved = text === null ? null : (JSON.parse(text) as Unsaved);
    if (!unsaved || !wanted(unsaved)) {
      return null;
    }
    sessionStorage.removeItem(key);
    return unsaved;
  } catch {
    return null;
  }
}

/**
 * The stamp to go on from. One save may have arrived after the stamp was taken: ours, unless another tab was there. In
 * doubt the old stamp is kept, so that the store refuses to overwrite and the person decides.
 */
export function stampAfter(unsaved: Unsaved, opened: OpenedRecord): number {
  return opened.stamp === unsaved.stamp + 1 && !unsaved.shared ? opened.stamp : unsaved.stamp;
}

type Content = Pick<OpenedRecord, 'document'> & Pick<Unsaved, 'drafts' | 'units' | 'desk'>;

function sameContent(a: Content, b: Content): boolean {
  const text = ({ document, drafts, units, desk }: Content): string => JSON.stringify([document, sorted(drafts), sorted(units), sorted(desk)]);
  return text(a) === text(b);
}

function sorted(map: Readonly<Record<string, string>>): [string, string][] {
  return Object.entries(map).sort(([a], [b]) => (a < b ? -1 : 1));
}
