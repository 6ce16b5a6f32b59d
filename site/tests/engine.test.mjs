// The client of the compute instance: what becomes of calls when it panics, dies, is outrun by newer requests, comes
// from another build, or is served badly.
import assert from 'node:assert/strict';
import { readdir, readFile } from 'node:fs/promises';
import path from 'node:path';
import { after, before, beforeEach, afterEach, test } from 'node:test';
import { gunzipSync } from 'node:zlib';

import { launch } from './support/chromium.mjs';
import { beforeWorker, enginePage, serveSite, siteDir } from './support/engine-page.mjs';

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

const states = (tab) => tab.page.evaluate(() => globalThis.states.map((s) => s.compute.state));
const status = (tab) => tab.page.evaluate(() => globalThis.engine.status.compute);

/** Some seconds of work: many modes, a fine grid, many frames. */
const longRequest = (document) => ({
  document,
  displacement: { kind: 'formula', peak: 0.001, radius: 0, angle: 0, width: 0, formula: '(1-r^2)*cos(3*theta)' },
  velocity: { kind: 'rest', peak: 0, radius: 0, angle: 0, width: 0, formula: '' },
  orders: 60, circles: 60, duration: 5, frames: 250, radii: 129, angles: 256,
  points: [0, 0.3, 0.6, 0.9].map((radius) => ({ radius, angle: 1 })),
  // As many modes are taken of the ideal sheet only.
  without: ['stiffness', 'fluid', 'sound', 'cavity', 'masses', 'unevenness'],
});

test('arrays come as typed arrays, in their places', async () => {
  const tab = await enginePage(context, server.address);
  const shape = await tab.page.evaluate(async () => {
    const { result } = await globalThis.engine.call('shape', { m: 1, n: 2, orientation: 0, size: 32, sectionAngle: 0, sectionPoints: 11 });
    return { raster: result.raster.constructor.name, size: result.raster.length, section: result.section.length, middle: result.section[5] };
  });
  // Mode (1, 2) is zero on its nodal diameter, so at the centre; the floats carry 24 bits.
  assert.deepEqual({ ...shape, middle: Math.abs(shape.middle) < 2 ** -20 }, { raster: 'Float32Array', size: 1024, section: 11, middle: true });
  assert.equal(await tab.page.evaluate(() => globalThis.engine.version), (await tab.ask('about')).version);
});

test('a refusal is a value with a sentence', async () => {
  const tab = await enginePage(context, server.address);
  const outcome = await tab.page.evaluate(() => globalThis.engine.call('modes', { document: {}, count: 3, misspelt: 1 }));
  assert.equal(outcome.kind, 'refused');
  assert.match(outcome.problems[0].message, /misspelt/);
});

test('a panic refuses its call only, and a fresh instance goes on', async () => {
  // A buffer that is none makes the Go side panic when it takes the files of the request.
  await beforeWorker(context, `self.addEventListener('message', ({ data }) => { if (data.name === 'demo') data.blobs = [-1]; });`);
  const tab = await enginePage(context, server.address);
  await tab.ask('about');
  const outcomes = await tab.page.evaluate(() => Promise.all([
    globalThis.engine.call('demo', {}), globalThis.engine.call('about', {}), globalThis.engine.call('read', { items: [] }),
  ]));
  assert.deepEqual(outcomes.map((o) => o.kind), ['refused', 'result', 'result']);
  assert.equal(outcomes[0].problems[0].code, 'internal');
  assert.match(outcomes[0].problems[0].message, /Nothing you typed is lost/);
  assert.deepEqual(await states(tab), ['starting', 'ready', 'restarting', 'ready']);
});

test('an instance that dies refuses its call only; after three deaths in a row the client gives up and says so', async () => {
  // A getter that throws, throws through Go, and ends the program.
  await beforeWorker(context, `self.addEventListener('message', ({ data }) => { if (data.name === 'demo') Object.defineProperty(data, 'blobs', { get() { throw new Error('torn'); } }); });`);
  const tab = await enginePage(context, server.address);
  const once = await tab.page.evaluate(() => Promise.all([globalThis.engine.call('demo', {}), globalThis.engine.call('about', {})]));
  assert.deepEqual(once.map((o) => o.kind), ['refused', 'result']);
  assert.equal(once[0].problems[0].code, 'engine');

  const thrice = await tab.page.evaluate(() => Promise.all([1, 2, 3, 4].map(() => globalThis.engine.call('demo', {}))));
  assert.deepEqual(thrice.map((o) => o.kind), ['refused', 'refused', 'refused', 'refused']);
  const { state, message } = await status(tab);
  assert.equal(state, 'failed');
  assert.match(message, /has stopped several times .*Reload this page/);
  // The next call tries once more.
  assert.ok((await tab.ask('about')).version);
  assert.equal((await status(tab)).state, 'ready');
});

test('a worker that cannot be loaded is reported, not waited for', async () => {
  await context.route(/\/assets\/engine-[^/]*\.js$/, (route) => route.fulfill({ status: 404, body: 'gone' }));
  const tab = await enginePage(context, server.address);
  const outcome = await tab.page.evaluate(() => globalThis.engine.call('about', {}));
  assert.equal(outcome.kind, 'refused');
  assert.equal((await status(tab)).state, 'failed');
});

test('newer requests take the place of older ones that wait; the last one is always answered', async () => {
  const tab = await enginePage(context, server.address);
  const { document } = await tab.ask('demo');
  const kinds = await tab.page.evaluate((document) => Promise.all(
    Array.from({ length: 12 }, (_, i) => globalThis.engine.call('modes', { document, count: i + 1 }, { key: 'modes' })),
  ).then((answers) => answers.map((a) => (a.kind === 'result' ? a.result.modes.length : a.kind))), document);
  assert.deepEqual(kinds, [1, ...Array(10).fill('superseded'), 12]);
  // Other askers are not touched, nor calls without a key.
  const others = await tab.page.evaluate((document) => Promise.all(
    ['a', 'b', undefined, undefined].map((key) => globalThis.engine.call('modes', { document, count: 2 }, { key })),
  ).then((answers) => answers.map((a) => a.kind)), document);
  assert.deepEqual(others, ['result', 'result', 'result', 'result']);
});

test('a long call is ended for a newer one of its asker, and others are sent again', async () => {
  const tab = await enginePage(context, server.address);
  const { document } = await tab.ask('demo');
  const kinds = await tab.page.evaluate(async ([long, document]) => {
    const first = globalThis.engine.call('respond', long, { key: 'respond' });
    const other = globalThis.engine.call('modes', { document, count: 3 }, { key: 'modes' });
    const newer = globalThis.engine.call('respond', { ...long, orders: 2, circles: 2, frames: 4, radii: 5, angles: 8 }, { key: 'respond' });
    return (await Promise.all([first, other, newer])).map((a) => a.kind);
  }, [longRequest(document), document]);
  assert.deepEqual(kinds, ['superseded', 'result', 'result']);
  assert.deepEqual(await states(tab), ['starting', 'ready', 'restarting', 'ready']);
});

test('a quick call does not wait for a long one, which is answered all the same', async () => {
  const tab = await enginePage(context, server.address);
  const { document } = await tab.ask('demo');
  const order = await tab.page.evaluate(async ([long]) => {
    const order = [];
    const slow = globalThis.engine.call('respond', long, { key: 'respond' }).then((a) => order.push(`long ${a.kind}`));
    const quick = globalThis.engine.call('read', { items: [] }, { key: 'fields', quick: true }).then((a) => order.push(`quick ${a.kind}`));
    await Promise.all([slow, quick]);
    return order;
  }, [longRequest(document)]);
  assert.deepEqual(order, ['quick result', 'long result']);
});

test('a call can be stopped, before it is sent and while it runs', async () => {
  const tab = await enginePage(context, server.address);
  const { document } = await tab.ask('demo');
  const kinds = await tab.page.evaluate(async ([long]) => {
    const running = new AbortController();
    const waiting = new AbortController();
    const calls = [
      globalThis.engine.call('respond', long, { signal: running.signal }),
      globalThis.engine.call('about', {}, { signal: waiting.signal }),
      globalThis.engine.call('about', {}),
      globalThis.engine.call('about', {}, { signal: AbortSignal.abort() }),
    ];
    waiting.abort();
    running.abort();
    return (await Promise.all(calls)).map((a) => a.kind);
  }, [longRequest(document)]);
  assert.deepEqual(kinds, ['superseded', 'superseded', 'result', 'superseded']);
});

test('another build on the server: reload, in words, for engine and store', async () => {
  const script = (await readdir(path.join(siteDir, 'assets'))).filter((name) => name.endsWith('.js'));
  let id = '';
  for (const name of script) {
    id ||= /(["'`])([0-9a-f]{12,64})\1/.exec(await readFile(path.join(siteDir, 'assets', name), 'utf8'))?.[2] ?? '';
  }
  assert.ok(id, 'no build id was found in the scripts');
  await context.route(/\/assets\/.*\.js$/, async (route) => {
    const response = await route.fetch();
    await route.fulfill({ response, body: (await response.text()).replaceAll(id, '0'.repeat(id.length)) });
  });
  const tab = await enginePage(context, server.address);
  const outcomes = await tab.page.evaluate(() => Promise.all([globalThis.engine.call('about', {}), globalThis.engine.store('records.list', {})]));
  for (const outcome of outcomes) {
    assert.equal(outcome.kind, 'refused');
    assert.equal(outcome.problems[0].code, 'reload');
    assert.match(outcome.problems[0].message, /Reload this tab/);
  }
});

/** Serves the wasm as `change` says, and gives the outcome of a call. */
async function withWasm(change) {
  const asset = /\/assets\/hoopsheet-[^/]*\.bin$/;
  await context.route(asset, async (route) => {
    const bytes = await (await route.fetch()).body();
    await route.fulfill(change(bytes));
  });
  const tab = await enginePage(context, server.address);
  const outcome = await tab.page.evaluate(() => globalThis.engine.call('about', {}));
  await context.unroute(asset);
  const later = await tab.page.evaluate(() => globalThis.engine.call('about', {}));
  assert.equal(later.kind, 'result', 'the next call does not try again');
  return outcome;
}

test('a server that unpacks the wasm and gives it a wrong type does no harm', async () => {
  const outcome = await withWasm((bytes) => ({ contentType: 'text/plain', body: gunzipSync(bytes) }));
  assert.equal(outcome.kind, 'result');
});

for (const [what, change, words] of [
  ['missing', () => ({ status: 404, body: 'no' }), /could not be fetched.*404/],
  ['an error page', () => ({ contentType: 'text/html', body: '<h1>Sorry</h1>' }), /is something else/],
  ['cut short', (bytes) => ({ body: bytes.subarray(0, bytes.length / 2) }), /could not be made ready/],
  ['empty', () => ({ body: '' }), /is something else/],
]) {
  test(`the wasm is ${what}: a sentence, and the next call tries again`, async () => {
    const outcome = await withWasm(change);
    assert.equal(outcome.kind, 'refused');
    assert.equal(outcome.problems[0].code, 'engine');
    assert.match(outcome.problems[0].message, words);
  });
}

test('no connection: a sentence', async () => {
  await context.route(/\/assets\/hoopsheet-[^/]*\.bin$/, (route) => route.abort());
  const tab = await enginePage(context, server.address);
  const outcome = await tab.page.evaluate(() => globalThis.engine.call('about', {}));
  assert.match(outcome.problems[0].message, /no connection to the server/);
});
