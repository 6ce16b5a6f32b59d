// Runs the Go tests of the store (wasm/*_test.go with the tag "browser") in Chromium, since Node has no IndexedDB.
import assert from 'node:assert/strict';
import { copyFile, mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { after, before, test } from 'node:test';

import { launch } from './support/chromium.mjs';
import { command, serve } from './support/server.mjs';

const page = `<!doctype html><meta charset="utf-8"><title>Go tests</title>
<script src="wasm_exec.js"></script>
<script>
globalThis.runTests = async (args) => {
  const lines = [];
  console.log = (line) => lines.push(line);
  const go = new Go();
  go.argv = ['wasm.test', ...args];
  let code = -1;
  go.exit = (c) => { code = c; };
  const { instance } = await WebAssembly.instantiateStreaming(fetch('store.wasm'), go.importObject);
  await go.run(instance);
  return { code, lines };
};
</script>`;

let dir, server, browser;

before(async () => {
  dir = await mkdtemp(path.join(tmpdir(), 'hoopsheet-go-tests-'));
  const goRoot = (await command('go', ['env', 'GOROOT'])).trim();
  await copyFile(path.join(goRoot, 'lib/wasm/wasm_exec.js'), path.join(dir, 'wasm_exec.js'));
  await command('go', ['test', '-c', '-tags', 'browser', '-o', path.join(dir, 'store.wasm'), './wasm'], { GOOS: 'js', GOARCH: 'wasm' });
  await writeFile(path.join(dir, 'index.html'), page);
  server = await serve(dir, { csp: false });
  browser = await launch();
});

after(async () => {
  await browser?.close();
  await server?.stop();
  await rm(dir, { recursive: true, force: true });
});

test('the Go tests of the store pass in Chromium', async () => {
  const tab = await browser.context.newPage();
  await tab.goto(server.address);
  const { code, lines } = await tab.evaluate((args) => globalThis.runTests(args), ['-test.v', ...(process.env.RUN ? [`-test.run=${process.env.RUN}`] : [])]);
  const output = lines.join('\n');
  assert.equal(code, 0, output);
  assert.match(output, /^PASS$/m, output);
  assert.doesNotMatch(output, /^--- SKIP/m, output);
});
