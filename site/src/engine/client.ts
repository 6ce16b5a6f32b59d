/**
 * The engine as pages use it: started once per page, shared by every element on it.
 *
 *     const answer = await engine.call('modes', { document, count: 60 }, { key: 'modes' });
 *     if (answer.kind === 'result') draw(answer.result);
 *     if (answer.kind === 'refused') show(answer.problems);   // 'superseded': a newer request is on its way
 *
 *     const saved = await engine.store('records.save', request);
 *
 * Calls never reject. Nothing is loaded before the first call (or `warm`).
 */
import type { CallMap, StoreMap } from '../contract.js';
import { single } from '../shipped.js';
import type { Answer, StoreAnswer } from './answer.js';
import { takeBlobs } from './bulk.js';
import type { Status } from './channel.js';
import { Queue, type CallOptions } from './queue.js';
import { StoreClient } from './store.js';

export type { Answer, Problem, Refusal, StoreAnswer } from './answer.js';
export { hasCode, sentences } from './answer.js';
export type { State, Status } from './channel.js';
export type { CallOptions } from './queue.js';

/** What `status` events carry. */
export interface EngineStatus {
  /** The part that calculates. */
  readonly compute: Status;
  /** The part that keeps records. */
  readonly store: Status;
}

export class Engine extends EventTarget {
  readonly #queue = new Queue(() => this.#say());
  readonly #store = new StoreClient(single, () => this.#say());

  /** State of both parts. A `status` event is sent whenever it changes. */
  get status(): EngineStatus {
    return { compute: this.#queue.channel.status, store: this.#store.channel.status };
  }

  /** Version of the engine that computes; empty before it is ready. */
  get version(): string {
    return this.#queue.channel.version;
  }

  /** Asks the engine. Results are plain objects; `Numbers` are Float32Array and `Blob` Uint8Array. */
  call<Name extends keyof CallMap>(
    name: Name,
    request: CallMap[Name]['request'],
    options: CallOptions = {},
  ): Promise<Answer<CallMap[Name]['result']>> {
    const { json, blobs } = takeBlobs(request);
    return this.#queue.add(name, json, blobs, options) as Promise<Answer<CallMap[Name]['result']>>;
  }

  /** Asks the store. Nothing is dropped or reordered; a save is answered when it is on the disk. */
  store<Name extends keyof StoreMap>(
    name: Name,
    request: StoreMap[Name]['request'],
  ): Promise<StoreAnswer<StoreMap[Name]['result']>> {
    const { json, blobs } = takeBlobs(request);
    return this.#store.ask(name, json, blobs) as Promise<StoreAnswer<StoreMap[Name]['result']>>;
  }

  /** Starts both parts ahead of the first call, or again after they failed. */
  warm(): void {
    this.#queue.channel.open();
    this.#store.channel.open();
  }

  #say(): void {
    this.dispatchEvent(new Event('status'));
  }
}

/** The engine of this page. */
export const engine = new Engine();
