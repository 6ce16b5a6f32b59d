// Records in the browser, through the same client that pages use: two tabs, refused storage, lost connections, a killed
// browser. What can be tested without a page is in store-go.test.mjs.
import assert from 'node:assert/strict';
import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { readFile } from 'node:fs/promises';
import path from 'node:path';
import { after, before, beforeEach, afterEach, test } from 'node:test';
import { setTimeout as delay } from 'node:timers/promises';

import { chromium } from 'playwright-core';

import { executablePath, flags, launch, newProfile, removeProfile } from './support/chromium.mjs';
import { beforeWorker, enginePage, serveSite } from './support/engine-page.mjs';

let server, browser, context;

before(async () => {
  server = await serveSite();
});

after(() => server?.stop());

beforeEach(async () => {
  browser = await launch();
  context = browser.context;
});

afterEach(() => browser.close());

const saveOf = ({ document, drafts, units, desk, stamp }) => ({ document, drafts, units, desk, stamp });

const codes = (outcome) => (outcome.kind === 'refused' ? outcome.problems.map((p) => p.code) : [outcome.kind]);

test('create, save, keep, duplicate, delete, restore, and open again after a reload', async () => {
  const tab = await enginePage(context, server.address);
  const made = await tab.keep('records.create', { from: 'demo', name: 'West port' });
  const id = made.document.id;
  const change = saveOf(made);
  change.document.tension.nominal = 250;
  change.drafts = { 'ring.radius': 'wide' };
  const saved = await tab.keep('records.save', change);
  assert.deepEqual(saved, { stamp: made.stamp + 1, unkept: true });
  await tab.keep('records.save', { ...change, drafts: {}, stamp: saved.stamp });
  const kept = await tab.keep('records.keep', { id, stamp: saved.stamp + 1, note: 'as built' });
  assert.equal(kept.document.revision, 1);
  assert.equal(kept.unkept, false);

  const twin = await tab.keep('records.duplicate', { id });
  await tab.keep('records.delete', { id: twin.document.id });
  assert.deepEqual(codes(await tab.tell('records.open', { id: twin.document.id })), ['deleted']);
  await tab.keep('records.restore', { id: twin.document.id });

  await tab.page.close();
  const later = await enginePage(context, server.address);
  const opened = await later.keep('records.open', { id });
  assert.equal(opened.document.tension.nominal, 250);
  assert.deepEqual(opened.revisions.map((r) => [r.number, r.note]), [[1, 'as built']]);
  const { records } = await later.keep('records.list');
  assert.deepEqual(records.map((r) => r.name).sort(), ['West port', 'West port (copy)']);
  assert.ok(records.every((r) => r.deleted === ''));
});

test('two tabs: the one that has not seen the last write is refused and overwrites nothing', async () => {
  const first = await enginePage(context, server.address);
  const second = await enginePage(context, server.address);
  const inFirst = await first.keep('records.create', { from: 'demo', name: '' });
  const inSecond = await second.keep('records.open', { id: inFirst.document.id });
  const ofFirst = saveOf(inFirst);
  ofFirst.document.notes = 'first';
  await first.keep('records.save', ofFirst);
  const ofSecond = saveOf(inSecond);
  ofSecond.document.notes = 'second';
  const outcome = await second.tell('records.save', ofSecond);
  assert.deepEqual(codes(outcome), ['conflict']);
  assert.match(outcome.problems[0].message, /^Another tab has changed this diaphragm since/);
  assert.equal((await second.keep('records.open', { id: inFirst.document.id })).document.notes, 'first');
});

test('a tap with its recording goes out in the file of everything and comes in elsewhere', async () => {
  const here = await enginePage(context, server.address);
  const { document } = await here.keep('records.create', { from: 'demo', name: 'Travels' });
  const file = await here.page.evaluate(async (diaphragm) => {
    const recording = Uint8Array.from({ length: 100_000 }, (_, i) => i % 251);
    const session = {
      id: '', diaphragm, revision: 0, taken: '2026-03-01T09:00:00Z', by: '', instrument: '', notes: '', airTemperature: 0,
      sheetTemperature: 0, peaks: [], tension: 0, standardUncertainty: 0, verdict: '', engine: '', recordingName: 'a.wav', microphone: '',
    };
    const put = await globalThis.engine.store('taps.put', { session, recording });
    const back = await globalThis.engine.store('taps.recording', { id: put.result.id });
    const got = back.result.recording;
    if (!(got instanceof Uint8Array) || got.length !== recording.length || got.some((b, i) => b !== i % 251)) {
      throw new Error('the recording came back changed');
    }
    if (recording.length !== 100_000) {
      throw new Error('the page lost its own copy of the recording');
    }
    const none = await globalThis.engine.store('taps.put', { session: { ...session, recordingName: '' }, recording: new Uint8Array() });
    const empty = await globalThis.engine.store('taps.recording', { id: none.result.id });
    if (!(empty.result.recording instanceof Uint8Array) || empty.result.recording.length !== 0) {
      throw new Error('a missing recording is no empty Uint8Array');
    }
    const archive = await globalThis.engine.store('archive.export', {});
    return { name: archive.result.name, bytes: [...archive.result.file] };
  }, document.id);
  assert.match(file.name, /^hoopsheet-\d{4}-\d\d-\d\d\.zip$/);

  const elsewhere = await launch();
  try {
    const there = await enginePage(elsewhere.context, server.address);
    const bring = () => there.page.evaluate((bytes) => globalThis.engine.store('archive.import', { file: new Uint8Array(bytes) }), file.bytes);
    const first = await bring();
    assert.deepEqual([first.result.added, first.result.same, first.result.taps, first.result.copied], [1, 0, 2, 0]);
    const again = await bring();
    assert.deepEqual([again.result.added, again.result.same, again.result.taps, again.result.copied], [0, 1, 0, 0]);
    const opened = await there.keep('records.open', { id: document.id });
    assert.deepEqual(opened.document, document);
  } finally {
    await elsewhere.close();
  }
});

for (const [how, code] of Object.entries({
  missing: "Object.defineProperty(self, 'indexedDB', { value: undefined });",
  null: "Object.defineProperty(self, 'indexedDB', { value: null });",
  throwing: "Object.defineProperty(self, 'indexedDB', { get() { throw new DOMException('refused', 'SecurityError'); } });",
  refusing: "IDBFactory.prototype.open = () => { throw new DOMException('refused', 'SecurityError'); };",
})) {
  test(`storage refused (${how}): a sentence, and the engine goes on`, async () => {
    await beforeWorker(context, code);
    const tab = await enginePage(context, server.address);
    const outcome = await tab.tell('records.list');
    assert.deepEqual(codes(outcome), ['storage-refused']);
    assert.match(outcome.problems[0].message, /You can go on working, but nothing is saved/);
    assert.ok((await tab.ask('demo')).document.name);
  });
}

test('storage full: a sentence, and what was there stays', async () => {
  await beforeWorker(context, `
    const put = IDBObjectStore.prototype.put;
    IDBObjectStore.prototype.put = function (value, key) {
      if (String(value).includes('too much')) throw new DOMException('full', 'QuotaExceededError');
      return put.call(this, value, key);
    };`);
  const tab = await enginePage(context, server.address);
  const made = await tab.keep('records.create', { from: 'demo', name: '' });
  const request = saveOf(made);
  const outcome = await tab.tell('records.save', { ...request, document: { ...request.document, notes: 'too much' } });
  assert.deepEqual(codes(outcome), ['storage-full']);
  assert.deepEqual((await tab.keep('records.open', { id: made.document.id })).stamp, made.stamp);
});

test('a save whose transaction aborts is not acknowledged', async () => {
  await beforeWorker(context, `
    const put = IDBObjectStore.prototype.put;
    IDBObjectStore.prototype.put = function (value, key) {
      const request = put.call(this, value, key);
      if (String(value).includes('abort me')) request.addEventListener('success', () => queueMicrotask(() => this.transaction.abort()));
      return request;
    };`);
  const tab = await enginePage(context, server.address);
  const made = await tab.keep('records.create', { from: 'demo', name: '' });
  const request = saveOf(made);
  const outcome = await tab.tell('records.save', { ...request, document: { ...request.document, notes: 'abort me' } });
  assert.equal(outcome.kind, 'refused');
  assert.deepEqual((await tab.keep('records.open', { id: made.document.id })).stamp, made.stamp);
});

test('a newer version in another tab takes over: this tab is told to reload', async () => {
  const tab = await enginePage(context, server.address);
  const made = await tab.keep('records.create', { from: 'demo', name: '' });
  const newer = await enginePage(context, server.address);
  await newer.page.evaluate(() => new Promise((resolve, reject) => {
    const request = indexedDB.open('hoopsheet', 1000);
    request.onsuccess = () => resolve();
    request.onerror = () => reject(request.error);
  }));
  const outcome = await tab.tell('records.save', saveOf(made));
  assert.deepEqual(codes(outcome), ['storage-lost']);
  assert.match(outcome.problems[0].message, /Reload this tab/);
});

test('another tab holds the database and does not let go: a sentence, then the call goes through', async () => {
  const other = await enginePage(context, server.address);
  // As a tab of an older version that is busy: it holds the database while its deletion is asked for, and what asks
  // after that has to wait.
  await other.page.evaluate(() => new Promise((resolve) => {
    const request = indexedDB.open('hoopsheet', 1);
    request.onsuccess = () => {
      globalThis.held = request.result;
      indexedDB.deleteDatabase('hoopsheet').onblocked = () => resolve();
    };
  }));
  const tab = await enginePage(context, server.address);
  const outcome = await tab.tell('records.list');
  assert.deepEqual(codes(outcome), ['storage-busy']);
  await other.page.evaluate(() => globalThis.held.close());
  assert.deepEqual((await tab.keep('records.list')).records, []);
});

test('the site data is cleared under an open tab: the store connects anew', async () => {
  const tab = await enginePage(context, server.address);
  await tab.keep('records.create', { from: 'demo', name: '' });
  const cdp = await context.newCDPSession(tab.page);
  await cdp.send('Storage.clearDataForOrigin', { origin: new URL(server.address).origin, storageTypes: 'indexeddb' });
  assert.deepEqual((await tab.keep('records.list')).records, []);
  await tab.keep('records.create', { from: 'demo', name: 'after' });
  assert.equal((await tab.keep('records.list')).records[0].name, 'after');
});

test('the browser is killed while it saves: no acknowledged save is lost', async () => {
  const profile = await newProfile();
  try {
    const start = async () => {
      const child = spawn(executablePath, [...flags, `--user-data-dir=${profile}`, '--remote-debugging-port=0', 'about:blank'], {
        detached: true, stdio: ['ignore', 'ignore', 'pipe'],
      });
      const endpoint = await new Promise((resolve, reject) => {
        let text = '';
        child.stderr.on('data', (chunk) => {
          text += chunk;
          const found = /DevTools listening on (ws:\S+)/.exec(text);
          if (found) {
            resolve(found[1]);
          }
        });
        child.once('exit', () => reject(new Error(text)));
      });
      const connection = await chromium.connectOverCDP(endpoint);
      const kill = async () => {
        const gone = once(child, 'exit');
        process.kill(-child.pid, 'SIGKILL');
        await gone;
      };
      return { kill, context: connection.contexts()[0] };
    };

    const first = await start();
    const tab = await enginePage(first.context, server.address);
    const made = await tab.keep('records.create', { from: 'demo', name: '' });
    let acknowledged = 0;
    let heard;
    const enough = new Promise((resolve) => { heard = resolve; });
    await tab.page.exposeFunction('acknowledge', (n) => {
      acknowledged = n;
      if (n === 20) {
        heard();
      }
    });
    void tab.page.evaluate(async (request) => {
      for (let n = 1; ; n++) {
        request.document.notes = `save ${n}`;
        const answer = await globalThis.engine.store('records.save', request);
        request.stamp = answer.result.stamp;
        globalThis.acknowledge(n);
      }
    }, saveOf(made)).catch(() => undefined); // the browser dies under it
    await enough;
    await first.kill();
    const atDeath = acknowledged;

    const second = await start();
    const later = await enginePage(second.context, server.address);
    const opened = await later.keep('records.open', { id: made.document.id });
    const found = Number(/^save (\d+)$/.exec(opened.document.notes)?.[1]);
    assert.ok(found >= atDeath, `save ${atDeath} was acknowledged, save ${found} was found`);
    assert.equal(opened.stamp, made.stamp + found);
    await second.kill();
  } finally {
    await delay(100); // child processes of the killed browser still write into the profile
    await removeProfile(profile);
  }
});

/** Keys of the object store "records" of this page's database, if it has one. */
async function keysOfRecords() {
  if (!(await indexedDB.databases()).some((d) => d.name === 'hoopsheet')) {
    return [];
  }
  return new Promise((resolve) => {
    indexedDB.open('hoopsheet').onsuccess = ({ target: { result: db } }) => {
      const request = db.transaction('records').objectStore('records').getAllKeys();
      request.onsuccess = () => {
        db.close();
        resolve(request.result);
      };
    };
  });
}

test('the single file keeps records on the page and finds them again', async () => {
  const { siteDir } = await import('./support/engine-page.mjs');
  const file = `file://${path.join(siteDir, 'hoopsheet-single.html')}`;
  assert.ok((await readFile(new URL(file))).length > 0);
  const workers = [];
  const open = async () => {
    const page = await context.newPage();
    await page.goto(`${file}#specify`);
    // The page opens the last diaphragm, or makes the demonstration.
    let ids = [];
    while (ids.length === 0) {
      ids = await page.evaluate(keysOfRecords);
    }
    if (page.workers().length === 0) {
      await page.waitForEvent('worker');
    }
    workers.push(...await Promise.all(page.workers().map((worker) => worker.evaluate(() => self.name))));
    await page.close();
    return ids;
  };
  const first = await open();
  assert.equal(first.length, 1);
  assert.deepEqual(await open(), first);
  assert.ok(workers.length > 0 && workers.every((name) => name === 'hoopsheet-compute'), `workers: ${workers}`);
});
