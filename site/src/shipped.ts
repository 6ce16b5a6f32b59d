/**
 * Where shipped files are, the same call on the hosted site, on a host page that embeds an element, and in the
 * single file. Nothing else in site/src needs to know which of the three it runs in.
 */
import { rootPath, scriptFiles, wasmFile } from 'hoopsheet:build';

import './single.js';

export { buildId, single } from 'hoopsheet:build';

/** The root of the site, with a trailing slash. In the single file: the file itself. */
export function siteRoot(): URL {
  return globalThis.HOOPSHEET_SINGLE ? new URL(location.href) : new URL(rootPath, import.meta.url);
}

/** A file of the site by its path from the root, such as "defaults.json". Null in the single file, which has none. */
export function siteFile(path: string): URL | null {
  return globalThis.HOOPSHEET_SINGLE ? null : new URL(path, siteRoot());
}

/**
 * The wasm as shipped: gzipped on the hosted site and in the single file alike, but a server may have unpacked it on
 * the way, so look at the first bytes (1f 8b, or \0asm).
 */
export async function wasmBytes(): Promise<Uint8Array<ArrayBuffer>> {
  const carried = globalThis.HOOPSHEET_SINGLE;
  if (carried) {
    return decodeBase64(carried.wasm);
  }
  const answer = await fetch(new URL(wasmFile, import.meta.url));
  if (!answer.ok) {
    throw new Error(`The part that calculates could not be fetched: the server answered ${answer.status} for ${wasmFile}.`);
  }
  return new Uint8Array(await answer.arrayBuffer());
}

const blobs = new Map<string, string>();

/** Address to start src/**\/NAME.worker.ts (a classic worker) or NAME.worklet.ts from. */
export function scriptURL(name: string): string {
  const carried = globalThis.HOOPSHEET_SINGLE;
  if (!carried) {
    const file = scriptFiles[name];
    if (file === undefined) {
      throw new Error(`no worker or worklet named ${name} was built`);
    }
    return new URL(file, import.meta.url).href;
  }
  let url = blobs.get(name);
  if (url === undefined) {
    const source = carried.scripts[name];
    if (source === undefined) {
      throw new Error(`the single file carries no worker or worklet named ${name}`);
    }
    url = URL.createObjectURL(new Blob([source], { type: 'text/javascript' }));
    blobs.set(name, url);
  }
  return url;
}

function decodeBase64(text: string): Uint8Array<ArrayBuffer> {
  const chars = atob(text.trim());
  const bytes = new Uint8Array(chars.length);
  for (let i = 0; i < chars.length; i++) {
    bytes[i] = chars.charCodeAt(i);
  }
  return bytes;
}
