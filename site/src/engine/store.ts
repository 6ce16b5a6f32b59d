/** Calls to the instance that keeps records. It is never ended while it works, and nothing sent to it is dropped. */
import { type StoreAnswer, refusal } from './answer.js';
import { giveArrays } from './bulk.js';
import { Channel, type Owner, type Status } from './channel.js';
import type { Call, Panic, Progress, Refused, Result } from './protocol.js';

type Settle = (answer: StoreAnswer<unknown>) => void;

export class StoreClient implements Owner {
  readonly channel: Channel;
  /** Sent and not yet answered, by id. */
  readonly #asked = new Map<number, Settle>();
  /** Not yet sent. */
  #waiting: { call: Call; settle: Settle }[] = [];
  #next = 1;

  constructor(
    onPage: boolean,
    private readonly said: (status: Status) => void,
  ) {
    this.channel = new Channel('store', onPage, this);
  }

  ask(name: string, json: string, blobs: ArrayBuffer[]): Promise<StoreAnswer<unknown>> {
    return new Promise((settle) => {
      if (this.channel.status.state === 'reload') {
        settle(refusal('reload', this.channel.status.message));
        return;
      }
      this.#waiting.push({ call: { type: 'call', id: this.#next++, name, request: json, blobs }, settle });
      this.channel.open();
      this.#send();
    });
  }

  status(status: Status): void {
    this.said(status);
  }

  ready(): void {
    this.#send();
  }

  heard(message: Result | Refused | Progress | Panic): void {
    // After a panic the store goes on: the transaction was rolled back, and others may be under way.
    if (message.type === 'panic' || message.type === 'progress') {
      return;
    }
    const settle = this.#asked.get(message.id);
    this.#asked.delete(message.id);
    this.channel.answered();
    if (message.type === 'refused') {
      settle?.({ kind: 'refused', problems: message.problems });
    } else {
      settle?.({ kind: 'result', result: giveArrays(message.response, message.arrays) });
    }
  }

  lost(message: string): void {
    const settles = [...this.#asked.values()];
    this.#asked.clear();
    for (const settle of settles) {
      settle(
        refusal('storage-lost', `The part that keeps records stopped before it answered (${message}). Look whether the last change was kept, and repeat it if not.`),
      );
    }
  }

  given(up: Status): void {
    const settles = [...this.#asked.values(), ...this.#waiting.map((w) => w.settle)];
    this.#asked.clear();
    this.#waiting = [];
    for (const settle of settles) {
      settle(refusal(up.state === 'reload' ? 'reload' : 'storage-lost', up.message));
    }
  }

  #send(): void {
    if (this.channel.status.state !== 'ready') {
      return;
    }
    for (const { call, settle } of this.#waiting.splice(0)) {
      this.#asked.set(call.id, settle);
      this.channel.send(call);
    }
  }
}
