/** One instance of the wasm kept alive: started when first needed, checked against this build, started again when it dies. */
import { buildId } from '../shipped.js';
import { type Instance, startInWorker, startOnPage } from './instance.js';
import { wasmModule } from './loader.js';
import type { Call, FromEngine, Panic, Progress, Refused, Result, Role } from './protocol.js';

/**
 * `idle` nothing has been asked yet; `starting`; `ready`; `restarting` after it died or was ended; `failed`: the next
 * call tries again; `reload`: this page is of another build than the wasm it got, and only a reload helps.
 */
export type State = 'idle' | 'starting' | 'ready' | 'restarting' | 'failed' | 'reload';

/** State of an instance with a sentence for the person; the sentence is empty while all is well. */
export interface Status {
  readonly state: State;
  readonly message: string;
}

/** What the owner of a channel is told. */
export interface Owner {
  status(status: Status): void;
  ready(): void;
  heard(message: Result | Refused | Progress | Panic): void;
  /** The instance died with whatever it was doing; another is being started. */
  lost(message: string): void;
  /** No instance can be had; `status` says why. */
  given(up: Status): void;
}

/** Deaths in a row, without an answer between them, after which the channel gives up. */
const mostDeaths = 3;

/** A worker that has not said `ready` after this long counts as dead. Slow tablets take a few seconds. */
const startLimitMs = 30_000;

const reloadMessage =
  'The files on the server have changed since this tab was opened. Reload this tab to go on.';

export class Channel {
  status: Status = { state: 'idle', message: '' };
  version = '';
  #instance: Instance | undefined;
  /** Counts starts, so that what an ended instance still says is not heard. */
  #start = 0;
  #deaths = 0;
  #timer: ReturnType<typeof setTimeout> | undefined;

  constructor(
    readonly role: Role,
    readonly onPage: boolean,
    private readonly owner: Owner,
  ) {}

  /** Starts the instance unless it runs or is starting. */
  open(): void {
    const { state } = this.status;
    if (state === 'idle') {
      this.#begin('starting');
    } else if (state === 'failed') {
      this.#deaths = Math.min(this.#deaths, mostDeaths - 1);
      this.#begin('starting');
    }
  }

  /** Sends a call; only in state `ready`. */
  send(call: Call): void {
    this.#instance?.send(call);
  }

  /** Tells the channel that the instance does its work, so that old deaths no longer count. */
  answered(): void {
    this.#deaths = 0;
  }

  /** Ends the instance, whatever it is doing, and starts a fresh one. */
  restart(): void {
    this.#begin('restarting');
  }

  /** Ends a broken instance and starts a fresh one, or gives up. */
  died(message: string): void {
    this.#deaths++;
    if (this.#deaths >= mostDeaths) {
      this.#giveUp({ state: 'failed', message: failedMessage(this.role, message) });
      return;
    }
    this.#begin('restarting');
    this.owner.lost(message);
  }

  #begin(state: State): void {
    this.#end();
    const start = this.#start;
    this.#say({ state, message: '' });
    wasmModule().then(
      async (module) => {
        if (start !== this.#start) {
          return;
        }
        this.#timer = setTimeout(() => this.died('it did not start'), startLimitMs);
        const listen = (message: FromEngine): void => {
          if (start === this.#start) {
            this.#heard(message);
          }
        };
        const instance = this.onPage ? await startOnPage(module, this.role, listen) : startInWorker(module, this.role, listen);
        if (start === this.#start) {
          this.#instance = instance;
        } else {
          instance.end();
        }
      },
    ).catch((error: unknown) => {
      if (start === this.#start) {
        const message = error instanceof Error ? error.message : String(error);
        this.#giveUp({ state: 'failed', message });
      }
    });
  }

  #heard(message: FromEngine): void {
    switch (message.type) {
      case 'ready':
        clearTimeout(this.#timer);
        if (message.build !== buildId || message.role !== this.role) {
          this.#giveUp({ state: 'reload', message: reloadMessage });
          return;
        }
        this.version = message.version;
        this.#say({ state: 'ready', message: '' });
        this.owner.ready();
        return;
      case 'gone':
        this.died(message.message);
        return;
      default:
        this.owner.heard(message);
    }
  }

  #giveUp(status: Status): void {
    this.#end();
    this.#say(status);
    this.owner.given(status);
  }

  #end(): void {
    this.#start++;
    clearTimeout(this.#timer);
    this.#instance?.end();
    this.#instance = undefined;
  }

  #say(status: Status): void {
    this.status = status;
    this.owner.status(status);
  }
}

function failedMessage(role: Role, cause: string): string {
  const part = role === 'compute' ? 'The part that calculates' : 'The part that keeps records';
  return `${part} has stopped several times (${cause}). Reload this page; what is not yet saved is lost only if you close it.`;
}
