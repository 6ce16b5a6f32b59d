/** Runs the Go program in this context (a worker, or the page of the single file) and connects it. */
import 'hoopsheet:wasm_exec';

import type { Call, FromEngine, Host, Role } from './protocol.js';

/** What wasm_exec.js puts on globalThis. */
interface GoProgram {
  readonly importObject: WebAssembly.Imports;
  /** Set by us: called with the exit code when the program ends. */
  exit: (code: number) => void;
  run(instance: WebAssembly.Instance): Promise<void>;
}

declare global {
  // eslint-disable-next-line no-var
  var Go: new () => GoProgram;
  // eslint-disable-next-line no-var
  var hoopsheetHost: Host | undefined;
}

type Post = (message: FromEngine, transfer: ArrayBuffer[]) => void;

/**
 * Starts Go and returns what takes the page's messages; they wait until Go listens. `post` is given Go's messages, and
 * `gone` once when the program has ended, however it ended.
 */
export function runGo(module: WebAssembly.Module, role: Role, post: Post): (call: Call) => void {
  const host: Host = { role, post };
  const early: Call[] = [];
  let over = false;

  const gone = (message: string): void => {
    if (!over) {
      over = true;
      post({ type: 'gone', message }, []);
    }
  };

  const start = async (): Promise<void> => {
    const go = new globalThis.Go();
    const instance = await WebAssembly.instantiate(module, go.importObject);
    globalThis.hoopsheetHost = host;
    const end = go.run(instance); // Go installs host.receive before this returns
    for (const call of early.splice(0)) {
      deliver(call);
    }
    await end;
    gone('the program ended');
  };

  const deliver = (call: Call): void => {
    if (over) {
      return;
    }
    if (host.receive === undefined) {
      early.push(call);
      return;
    }
    try {
      host.receive(call);
    } catch (error) {
      // Go does not survive an exception that JavaScript throws through it.
      gone(String(error));
    }
  };

  start().catch((error: unknown) => gone(String(error)));
  return deliver;
}
