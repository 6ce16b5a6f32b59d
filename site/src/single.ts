/**
 * What the single self-contained HTML file carries in place of files on a server.
 *
 * The builder puts each part into a data block of the page (a script element of a type that browsers do not run):
 *
 *     <script type="text/plain" id="hoopsheet-wasm">base64 of the gzipped wasm</script>
 *     <script type="text/plain" id="hoopsheet-script-NAME">source of NAME.worker.ts or NAME.worklet.ts, bundled</script>
 *
 * and `openSingle` turns them into `globalThis.HOOPSHEET_SINGLE`. On the hosted site that global does not exist.
 */
export interface Single {
  /** Base64 of the gzipped wasm. */
  readonly wasm: string;
  /** Bundled source of each worker and worklet, by name. */
  readonly scripts: Readonly<Record<string, string>>;
}

declare global {
  // eslint-disable-next-line no-var
  var HOOPSHEET_SINGLE: Single | undefined;
}

const scriptPrefix = 'hoopsheet-script-';

/** Reads the data blocks of this page. Called once, first of all, by the entry of the single file. */
export function openSingle(from: Document): Single {
  const scripts: Record<string, string> = {};
  for (const block of from.querySelectorAll(`script[id^="${scriptPrefix}"]`)) {
    scripts[block.id.slice(scriptPrefix.length)] = block.textContent ?? '';
  }
  const wasm = from.getElementById('hoopsheet-wasm')?.textContent ?? '';
  if (wasm === '') {
    throw new Error('This copy of the Hoopsheet file is incomplete: the part that calculates is missing. Fetch the file again.');
  }
  return { wasm, scripts };
}
