/** The worker in which one instance of the wasm runs. A classic worker: it imports nothing at run time. */
import { runGo } from './run.js';
import type { Call, Start } from './protocol.js';

declare const self: DedicatedWorkerGlobalScope;

let deliver: ((call: Call) => void) | undefined;

self.onmessage = (event: MessageEvent<Start | Call>) => {
  const message = event.data;
  if (message.type === 'start') {
    deliver = runGo(message.module, message.role, (answer, transfer) => self.postMessage(answer, transfer));
  } else {
    deliver?.(message);
  }
};
