/** Fetching, unpacking and compiling the wasm, once per page. */
import { wasmBytes } from '../shipped.js';

let compiled: Promise<WebAssembly.Module> | undefined;

/** The compiled wasm. After a failure the next call tries again. Rejects with a sentence for the person. */
export function wasmModule(): Promise<WebAssembly.Module> {
  compiled ??= compile().catch((error: unknown) => {
    compiled = undefined;
    throw error;
  });
  return compiled;
}

async function compile(): Promise<WebAssembly.Module> {
  if (typeof WebAssembly !== 'object') {
    throw new Error('This browser does not run WebAssembly, or it has been switched off: nothing can be calculated here.');
  }
  const bytes = await fetched();
  if (startsWith(bytes, [0x00, 0x61, 0x73, 0x6d])) {
    return await attempt(() => WebAssembly.compile(bytes));
  }
  if (!startsWith(bytes, [0x1f, 0x8b])) {
    throw new Error(
      'What the server sent in place of the part that calculates is something else. Reload this page; if that does not help, the copy of the site on the server is damaged.',
    );
  }
  if (typeof DecompressionStream !== 'function') {
    throw new Error('This browser is too old: it cannot unpack the part that calculates. It needs a version of 2023 or later.');
  }
  const unpacked = new Blob([bytes]).stream().pipeThrough(new DecompressionStream('gzip'));
  const response = new Response(unpacked, { headers: { 'Content-Type': 'application/wasm' } });
  return await attempt(() => WebAssembly.compileStreaming(response));
}

async function fetched(): Promise<Uint8Array<ArrayBuffer>> {
  try {
    return await wasmBytes();
  } catch (error) {
    // fetch itself rejects with a bare TypeError when there is no network.
    if (error instanceof TypeError) {
      throw new Error('The part that calculates could not be fetched: there is no connection to the server.');
    }
    throw error;
  }
}

async function attempt(compileBytes: () => Promise<WebAssembly.Module>): Promise<WebAssembly.Module> {
  try {
    return await compileBytes();
  } catch (error) {
    throw new Error(
      `The part that calculates could not be made ready; it may have arrived incomplete. Reload this page. (${String(error)})`,
    );
  }
}

function startsWith(bytes: Uint8Array, magic: readonly number[]): boolean {
  return magic.every((byte, i) => bytes[i] === byte);
}
