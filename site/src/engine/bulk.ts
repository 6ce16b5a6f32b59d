/** Large arrays and files beside the JSON of a message: taken out of requests, put into results. */
import type { SideArray } from './protocol.js';

/** A request as JSON, with its files beside it. The files are copies, so that the page keeps its own. */
export function takeBlobs(request: unknown): { json: string; blobs: ArrayBuffer[] } {
  const blobs: ArrayBuffer[] = [];
  const json = JSON.stringify(request, (_key, value: unknown) => {
    if (!(value instanceof Uint8Array)) {
      return value;
    }
    if (value.length === 0) {
      return '';
    }
    blobs.push(value.slice().buffer);
    return `blob:${blobs.length - 1}`;
  });
  return { json, blobs };
}

/** The result of a call: its JSON with every array put where it belongs. The type is the caller's to know. */
export function giveArrays(json: string, arrays: SideArray[]): unknown {
  const result: unknown = JSON.parse(json);
  for (const array of arrays) {
    const value = array.kind === 'f32' ? new Float32Array(array.buffer) : new Uint8Array(array.buffer);
    put(result, array.path, value);
  }
  return result;
}

function put(into: unknown, path: readonly string[], value: Float32Array | Uint8Array): void {
  let place = into;
  for (const name of path.slice(0, -1)) {
    place = isBranch(place) ? place[name] : undefined;
  }
  const last = path[path.length - 1];
  if (!isBranch(place) || last === undefined) {
    throw new Error(`the result has no place ${path.join('.')}`);
  }
  place[last] = value;
}

/** Objects and lists alike: a list takes its index as text. */
function isBranch(value: unknown): value is Record<string, unknown> {
  return typeof value === 'object' && value !== null;
}
