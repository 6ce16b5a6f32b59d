/** Starting one instance of the wasm: in a worker, or on the page itself where a worker would lose records. */
import { scriptURL } from '../shipped.js';
import type { Call, FromEngine, Role, Start } from './protocol.js';

/** A running instance. Messages may be sent once it has said `ready`. */
export interface Instance {
  send(call: Call): void;
  end(): void;
}

export type Listener = (message: FromEngine) => void;

/** Starts the wasm in a dedicated worker. A worker that fails to load or dies says `gone`. */
export function startInWorker(module: WebAssembly.Module, role: Role, listen: Listener): Instance {
  const worker = new Worker(scriptURL('engine'), { name: `hoopsheet-${role}` });
  worker.onmessage = (event: MessageEvent<FromEngine>) => listen(event.data);
  worker.onmessageerror = () => listen({ type: 'gone', message: 'a message of the worker could not be read' });
  worker.onerror = (event) => {
    event.preventDefault();
    listen({ type: 'gone', message: event.message || 'the worker could not be loaded' });
  };
  const start: Start = { type: 'start', role, module };
  worker.postMessage(start);
  return {
    send: (call) => worker.postMessage(call, call.blobs),
    end: () => {
      worker.onmessage = worker.onmessageerror = worker.onerror = null;
      worker.terminate();
    },
  };
}

/**
 * Starts the wasm on the page. For the store of the single file only: in WebKit the IndexedDB of a worker made from a
 * blob is another database, which is lost on restart.
 */
export async function startOnPage(module: WebAssembly.Module, role: Role, listen: Listener): Promise<Instance> {
  const { runGo } = await import('./run.js');
  // Through a port, so that messages arrive as from a worker: never before the caller holds what is returned here.
  const { port1, port2 } = new MessageChannel();
  port2.onmessage = (event: MessageEvent<FromEngine>) => listen(event.data);
  const take = runGo(module, role, (message, transfer) => port1.postMessage(message, transfer));
  return {
    send: take,
    end: () => port2.close(),
  };
}
