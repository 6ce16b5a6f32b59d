/** What the browser says about keeping records on this device, in words. Each API is missing somewhere. */

/** The browser's answer. */
export interface Keeping {
  /** `kept`: only the person removes them; `may-go`: the browser may remove them; `unknown`: it does not say. */
  readonly promise: 'kept' | 'may-go' | 'unknown';
  /** One or two sentences. */
  readonly words: string;
  /** Room used and room allowed, in words; empty where the browser does not say. */
  readonly room: string;
}

const keptWords = 'This browser has promised to keep the records on this device until you delete them.';
const mayGoWords =
  'This browser may delete the records when space runs short, or after weeks without a visit. Export a file of everything now and then.';
const unknownWords =
  'This browser does not say whether it keeps the records (over plain http it is not allowed to). Export a file of everything now and then.';

/** Asks the browser to keep the records. Some browsers ask the person; call it on a click. */
export async function askToKeep(): Promise<Keeping> {
  return report(async (storage) => (await storage.persisted()) || (await storage.persist()));
}

/** What the browser has promised so far, without asking it for more. */
export async function keeping(): Promise<Keeping> {
  return report((storage) => storage.persisted());
}

async function report(promised: (storage: StorageManager) => Promise<boolean>): Promise<Keeping> {
  const storage = manager();
  if (!storage || typeof storage.persist !== 'function' || typeof storage.persisted !== 'function') {
    return { promise: 'unknown', words: unknownWords, room: await room(storage) };
  }
  try {
    const kept = await promised(storage);
    return { promise: kept ? 'kept' : 'may-go', words: kept ? keptWords : mayGoWords, room: await room(storage) };
  } catch {
    return { promise: 'unknown', words: unknownWords, room: '' };
  }
}

/** navigator.storage is missing over plain http, whatever the type says. */
function manager(): StorageManager | undefined {
  return (navigator as { storage?: StorageManager }).storage;
}

async function room(storage: StorageManager | undefined): Promise<string> {
  if (!storage || typeof storage.estimate !== 'function') {
    return '';
  }
  try {
    const { usage, quota } = await storage.estimate();
    if (usage === undefined || quota === undefined) {
      return '';
    }
    return `About ${megabytes(usage)} of ${megabytes(quota)} used.`;
  } catch {
    return '';
  }
}

function megabytes(bytes: number): string {
  const mb = bytes / 1e6;
  if (mb >= 1000) {
    return `${(mb / 1000).toFixed(1)} GB`;
  }
  return `${mb >= 10 ? mb.toFixed(0) : mb.toFixed(1)} MB`;
}
