/** What became of a call. Calls never reject: whoever asks meets every outcome as a value. */
import type { Problem } from './protocol.js';

export type { Problem } from './protocol.js';

/** Carried out. */
export interface Answered<T> {
  kind: 'result';
  result: T;
}

/** Not carried out. Each problem has a sentence and, where it belongs to a field, that field's name. */
export interface Refusal {
  kind: 'refused';
  problems: Problem[];
}

/** Not carried out, and nobody needs to know: a newer request took its place, or it was stopped. */
export interface Superseded {
  kind: 'superseded';
}

/** Outcome of a call to the engine. */
export type Answer<T> = Answered<T> | Refusal | Superseded;

/** Outcome of a call to the store, which drops nothing. */
export type StoreAnswer<T> = Answered<T> | Refusal;

/**
 * Codes of problems that do not come from a field. The page may act on them:
 * `engine` the part that calculates has failed; `reload` this tab is of another build than the files on the server;
 * `conflict` another tab has written since; `storage-full`; `storage-refused` the browser keeps nothing here, work goes on
 * unsaved; `storage-lost` reload this tab; `storage-busy` another tab is in the way; `not-found`; `deleted`.
 */
export type PageCode =
  | 'engine'
  | 'reload'
  | 'conflict'
  | 'storage-full'
  | 'storage-refused'
  | 'storage-lost'
  | 'storage-busy'
  | 'not-found'
  | 'deleted';

/** A refusal with one sentence that belongs to no field. */
export function refusal(code: PageCode, message: string): Refusal {
  return { kind: 'refused', problems: [{ field: '', code, message }] };
}

/** The sentences of a refusal, one after another. */
export function sentences(refused: Refusal): string {
  return refused.problems.map((p) => p.message).join(' ');
}

/** True when one of the problems has this code. */
export function hasCode(refused: Refusal, code: PageCode): boolean {
  return refused.problems.some((p) => p.code === code);
}
