/** Another version of the built site, as the next build would make it. */
import assert from 'node:assert/strict';
import { createHash } from 'node:crypto';
import { cp, mkdtemp, readdir, readFile, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { gunzipSync, gzipSync } from 'node:zlib';

import { siteDir } from './engine-page.mjs';

/** A copy of the built site that may be changed. */
export async function copyOfSite() {
  const dir = await mkdtemp(path.join(tmpdir(), 'hoopsheet-version-'));
  await cp(siteDir, dir, { recursive: true });
  return dir;
}

/** The build id of the site in a directory. */
export async function buildIdOf(dir) {
  return /data-build="([0-9a-f]+)"/.exec(await readFile(path.join(dir, 'index.html'), 'utf8'))[1];
}

/**
 * Turns the site in `dir` into another version: another build id in pages, scripts and wasm, another name of the
 * cache, and the sums that fit. Returns the new build id.
 */
export async function makeNextVersion(dir) {
  const old = await buildIdOf(dir);
  const next = [...old].map((digit) => (digit === '0' ? '1' : digit === '1' ? '0' : digit === 'a' ? 'b' : digit === 'b' ? 'a' : digit)).reverse().join('');
  assert.notEqual(next, old);
  const sums = {};
  for (const name of await readdir(dir, { recursive: true })) {
    const file = path.join(dir, name);
    if (/\.(html|js|css)$/.test(name)) {
      const text = await readFile(file, 'utf8');
      await writeFile(file, text.replaceAll(old, next));
    } else if (name.endsWith('.bin')) {
      const wasm = gunzipSync(await readFile(file));
      assert.ok(wasm.includes(old), 'the wasm carries the build id');
      await writeFile(file, gzipSync(Buffer.from(wasm.toString('latin1').replaceAll(old, next), 'latin1'), { level: 1 }));
    } else {
      continue;
    }
    sums[name.split(path.sep).join('/')] = createHash('sha256').update(await readFile(file)).digest('base64');
  }
  const worker = path.join(dir, 'sw.js');
  let code = await readFile(worker, 'utf8');
  code = code.replace(/path:"([^"]+)",sha256:"[^"]+"/g, (entry, name) => (sums[name] ? `path:"${name}",sha256:"${sums[name]}"` : entry));
  const changed = code.replace(/(\],\w+=")[0-9a-f]{16}"/, '$1fedcba9876543210"');
  assert.notEqual(changed, code, 'the name of the cache');
  await writeFile(worker, changed);
  return next;
}
