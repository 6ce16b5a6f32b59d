/**
 * The order in which calls reach the compute instance: one at a time.
 *
 * - A newer request with the key of the running one waits for it; an older one that still waits is dropped.
 * - What has run longer than `patienceMs` is ended with its worker when a newer request with its key waits, when it was
 *   stopped, or when a quick call waits. In the last case it is sent again afterwards.
 * - A call in which Go panics, or with which the worker dies, is refused and not sent again; those that wait are.
 */
import { type Answer, refusal } from './answer.js';
import { giveArrays } from './bulk.js';
import { Channel, type Owner, type Status } from './channel.js';
import type { Panic, Progress, Refused, Result } from './protocol.js';

/** How a call is to be treated. */
export interface CallOptions {
  /** Names the asker: a newer request with the same key takes the place of an older one. Without it none does. */
  key?: string;
  /** True for calls that answer in a few milliseconds and that a person waits for: they do not wait for long ones. */
  quick?: boolean;
  /** Told the share of the work done, 0 to 1. */
  onProgress?: (share: number) => void;
  /** Stops the call, which is then superseded. */
  signal?: AbortSignal;
}

/** A call that waits or runs. */
interface Job {
  readonly id: number;
  readonly name: string;
  readonly json: string;
  readonly blobs: readonly ArrayBuffer[];
  readonly options: CallOptions;
  readonly settle: (answer: Answer<unknown>) => void;
  started: number;
  stopped: boolean;
}

/** What has run longer than this may be ended. */
const patienceMs = 300;

/** What ending a worker and starting a fresh one costs; a call that should be done sooner is left to finish. */
const restartMs = 250;

export class Queue implements Owner {
  readonly channel: Channel;
  #running: Job | undefined;
  #waiting: Job[] = [];
  #next = 1;
  #timer: ReturnType<typeof setTimeout> | undefined;
  /** How long the last call of each name took, ms. */
  readonly #typical = new Map<string, number>();

  constructor(
    private readonly said: (status: Status) => void,
    private readonly now: () => number = () => performance.now(),
  ) {
    this.channel = new Channel('compute', false, this);
  }

  /** Puts a call into the queue. */
  add(name: string, json: string, blobs: readonly ArrayBuffer[], options: CallOptions): Promise<Answer<unknown>> {
    return new Promise((settle) => {
      const job: Job = { id: this.#next++, name, json, blobs, options, settle, started: 0, stopped: false };
      if (options.signal?.aborted) {
        settle({ kind: 'superseded' });
        return;
      }
      options.signal?.addEventListener('abort', () => this.#stop(job), { once: true });
      if (this.channel.status.state === 'reload') {
        settle(refusal('reload', this.channel.status.message));
        return;
      }
      this.#enqueue(job);
      this.channel.open();
      this.#advance();
    });
  }

  status(status: Status): void {
    this.said(status);
  }

  ready(): void {
    this.#advance();
  }

  heard(message: Result | Refused | Progress | Panic): void {
    const job = this.#running;
    if (message.type === 'panic') {
      // The call that panicked has been answered; what was sent after it is sent again.
      this.#running = undefined;
      if (job) {
        this.#waiting.unshift(job);
      }
      this.channel.died(message.message);
      return;
    }
    if (!job || message.id !== job.id) {
      return;
    }
    if (message.type === 'progress') {
      if (!job.stopped) {
        job.options.onProgress?.(message.share);
      }
      return;
    }
    this.#running = undefined;
    this.#typical.set(job.name, this.now() - job.started);
    if (message.type === 'refused') {
      job.settle({ kind: 'refused', problems: message.problems });
    } else {
      this.channel.answered();
      job.settle({ kind: 'result', result: giveArrays(message.response, message.arrays) });
    }
    this.#advance();
  }

  lost(message: string): void {
    const job = this.#running;
    this.#running = undefined;
    job?.settle(
      refusal('engine', `This calculation failed (${message}). The part that calculates has been started again; nothing you typed is lost.`),
    );
  }

  given(up: Status): void {
    const jobs = this.#running ? [this.#running, ...this.#waiting] : this.#waiting;
    this.#running = undefined;
    this.#waiting = [];
    for (const job of jobs) {
      job.settle(refusal(up.state === 'reload' ? 'reload' : 'engine', up.message));
    }
  }

  /** A newer request takes the place of the waiting one with its key, at that one's place in the row. */
  #enqueue(job: Job): void {
    const { key } = job.options;
    const at = key === undefined ? -1 : this.#waiting.findIndex((w) => w.options.key === key);
    if (at < 0) {
      this.#waiting.push(job);
      return;
    }
    const older = this.#waiting[at];
    this.#waiting[at] = job;
    older?.settle({ kind: 'superseded' });
  }

  #stop(job: Job): void {
    job.settle({ kind: 'superseded' });
    job.stopped = true;
    this.#waiting = this.#waiting.filter((w) => w !== job);
    this.#advance();
  }

  /** Sends the next call if none runs, else ends the running one if that is due. */
  #advance(): void {
    clearTimeout(this.#timer);
    if (this.channel.status.state !== 'ready') {
      return;
    }
    if (this.#running) {
      this.#endIfDue(this.#running);
      return;
    }
    const at = Math.max(0, this.#waiting.findIndex((w) => w.options.quick));
    const [job] = this.#waiting.splice(at, 1);
    if (!job) {
      return;
    }
    this.#running = job;
    job.started = this.now();
    this.channel.send({ type: 'call', id: job.id, name: job.name, request: job.json, blobs: job.blobs.map((b) => b.slice(0)) });
    this.#advance();
  }

  #endIfDue(job: Job): void {
    const { key, quick } = job.options;
    const newer = key !== undefined && this.#waiting.some((w) => w.options.key === key);
    const hurried = !quick && this.#waiting.some((w) => w.options.quick);
    if (!job.stopped && !newer && !hurried) {
      return;
    }
    const ran = this.now() - job.started;
    if (ran < patienceMs) {
      this.#timer = setTimeout(() => this.#advance(), patienceMs - ran);
      return;
    }
    const left = (this.#typical.get(job.name) ?? Infinity) - ran;
    if (left > 0 && left < restartMs) {
      this.#timer = setTimeout(() => this.#advance(), left + 1);
      return;
    }
    this.#running = undefined;
    if (job.stopped || newer) {
      job.settle({ kind: 'superseded' });
    } else {
      this.#waiting.push(job);
    }
    this.channel.restart();
  }
}
