// Modules that the builder (site/build/bundle.go) makes while it bundles.

/** What was built, and under which file names it is shipped. */
declare module 'hoopsheet:build' {
  /** Names this build. The same value is linked into the wasm; a mismatch means "reload". */
  export const buildId: string;
  /** True in the single self-contained HTML file. */
  export const single: boolean;
  /** The gzipped wasm, relative to the bundle that imports this (import.meta.url). */
  export const wasmFile: string;
  /** File of each src/**\/NAME.worker.ts and NAME.worklet.ts, by NAME, relative like wasmFile. Empty inside workers. */
  export const scriptFiles: Readonly<Record<string, string>>;
  /** From the bundle back to the root of the site. */
  export const rootPath: string;
  /** The pages in the order of the chapter list: file name without .html, and title. */
  export const pages: readonly { readonly name: string; readonly title: string }[];
}

/** What the service worker keeps. */
declare module 'hoopsheet:precache' {
  /** Hash of every byte in the list. */
  export const version: string;
  export const buildId: string;
  /** Path relative to the root of the site, and the SHA-256 of its bytes (base64) where they may not differ at all. */
  export const files: readonly { readonly path: string; readonly sha256?: string }[];
}

/** wasm_exec.js of the toolchain that built the wasm: sets globalThis.Go. For workers, and for the single file's page. */
declare module 'hoopsheet:wasm_exec' {}

/** A style sheet imported from TypeScript is its text, with its own @imports resolved. */
declare module '*.css' {
  const text: string;
  export default text;
}
