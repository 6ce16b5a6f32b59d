/**
 * Messages between a page and an instance of the engine (wasm/protocol.go is the other side).
 *
 * A worker is sent a `Start` first; everything after it goes to Go. Go's first message is `Ready`. A page whose own build
 * differs from `ready.build` must be reloaded: nothing else of the protocol may be assumed then. Each `Call` is answered
 * by exactly one `Result` or `Refused` with its id, before which any number of `Progress` may come. `Panic` follows the
 * answer of a call in which Go panicked; `Gone` is sent by the loader, not by Go, when the Go program has ended.
 *
 * Large data never cross as JSON. In a request the JSON holds "blob:0", "blob:1", ... where the bytes of `blobs[0]`,
 * `blobs[1]`, ... belong. In a result the JSON holds [] or "" where an array of `arrays` belongs, and `path` leads there.
 */

/** What an instance of the wasm does: computes and may be killed, or keeps records and must not be. */
export type Role = 'compute' | 'store';

/** First message to a worker. */
export interface Start {
  type: 'start';
  role: Role;
  module: WebAssembly.Module;
}

/** One call. The buffers of `blobs` are transferred. */
export interface Call {
  type: 'call';
  id: number;
  name: string;
  /** JSON. */
  request: string;
  blobs: ArrayBuffer[];
}

/** First message from Go. */
export interface Ready {
  type: 'ready';
  build: string;
  role: Role;
  /** Version of the engine, which figures that are handed over carry. */
  version: string;
}

/** One large array or file of a result. */
export interface SideArray {
  /** Member names, an index of a list written as its number. */
  path: string[];
  kind: 'f32' | 'bytes';
  buffer: ArrayBuffer;
}

/** Answer of a call that was carried out. */
export interface Result {
  type: 'result';
  id: number;
  /** JSON. */
  response: string;
  arrays: SideArray[];
}

/** One thing wrong with a request: sentences for people, a code for programs. */
export interface Problem {
  field: string;
  code: string;
  message: string;
  /** Place of the first offending character of a typed text in UTF-16 units; -1 or absent where there is none. */
  offset?: number;
}

/** Answer of a call that was not carried out. */
export interface Refused {
  type: 'refused';
  id: number;
  problems: Problem[];
}

/** Share of the work of a call that is done, 0 to 1. */
export interface Progress {
  type: 'progress';
  id: number;
  share: number;
}

/** A call panicked. It has been answered; the instance should not be trusted with more. */
export interface Panic {
  type: 'panic';
  message: string;
}

/** The Go program has ended, or never started. */
export interface Gone {
  type: 'gone';
  message: string;
}

/** Everything an instance sends. */
export type FromEngine = Ready | Result | Refused | Progress | Panic | Gone;

/** What the loader and Go share on globalThis: the loader sets it before it runs Go. */
export interface Host {
  role: Role;
  /** Set by the loader: sends a message to the page. */
  post: (message: FromEngine, transfer: ArrayBuffer[]) => void;
  /** Set by Go before it posts `Ready`: takes a message from the page. */
  receive?: (message: Call) => void;
}
