// Without a network: the service worker under a sub-path, the whole way again with the server stopped, updates offered.
import assert from 'node:assert/strict';
import { readdir, readFile, rm, writeFile } from 'node:fs/promises';
import path from 'node:path';
import { after, before, test } from 'node:test';

import { chromium } from 'playwright-core';

import { executablePath, flags } from './support/chromium.mjs';
import { buildIdOf, copyOfSite, makeNextVersion } from './support/next-version.mjs';
import { serve } from './support/server.mjs';
import { Visit, box, edited, saved, siteDir, testdata, text, until, value } from './support/visit.mjs';

const prefix = '/some/sub/path/';

let browser;
before(async () => { browser = await chromium.launch({ executablePath, args: flags }); });
after(() => browser.close());

async function visitOf(server) {
  const context = await browser.newContext({ viewport: { width: 1280, height: 900 }, reducedMotion: 'reduce' });
  return new Visit(context, server.address);
}

const kept = (page) => text(page.locator('#offline-state'), /Kept on this device/);

test('with the server stopped every page opens, and the whole way works', async () => {
  const server = await serve(siteDir, { prefix });
  assert.ok(server.address.endsWith(prefix), server.address);
  const visit = await visitOf(server);
  const page = await visit.open('index.html');
  await kept(page);
  await saved(page);
  await server.stop();
  // Its own requests to the dead server, such as the one for a newer sw.js, are reported on the console.
  visit.allow(/ERR_CONNECTION_REFUSED|Failed to update a ServiceWorker|An unknown error occurred when fetching the script/);
  await assert.rejects(fetch(server.address), 'the server is still there');

  for (const name of ['', ...(await readdir(siteDir)).filter((file) => file.endsWith('.html') && file !== 'hoopsheet-single.html')]) {
    await visit.open(name, page);
    await page.locator('main h1').waitFor();
    await saved(page);
  }

  await visit.open('specify.html', page);
  await saved(page);
  await edited(page, () => box(page, 'place').fill('Below deck, no network'));
  await edited(page, () => box(page, 'ring.radius').fill('0.5 m'));
  const chapters = page.locator('nav.chapters');
  await chapters.getByRole('link', { name: 'Modes', exact: true }).click();
  await page.locator('#mode-table tbody tr').first().waitFor();
  await chapters.getByRole('link', { name: 'Respond', exact: true }).click();
  await text(page.locator('#travel'), /mm/);
  await chapters.getByRole('link', { name: 'Tap', exact: true }).click();
  await page.locator('#file').setInputFiles(testdata('signals', 'tap-demo.wav'));
  await text(page.locator('#tension'), /N\/m/);
  await page.locator('#keep-tap').click();
  await page.locator('#kept-taps tbody tr').first().waitFor();
  await saved(page);
  await chapters.getByRole('link', { name: 'Hand over', exact: true }).click();
  const link = await until(async () => (await page.locator('#link').count()) && page.locator('#link').inputValue(), 'a link');
  const received = await visit.open(link);
  await received.locator('#keep-copy').waitFor();
  await chapters.getByRole('link', { name: 'Records', exact: true }).click();
  await text(page.locator('#record-table'), /Below deck, no network/);
  await visit.end();
});

test('a new version is offered, not forced, and the work is saved first', async () => {
  const dir = await copyOfSite();
  const server = await serve(dir, { prefix });
  try {
    const visit = await visitOf(server);
    const page = await visit.open('specify.html');
    await kept(page);
    await saved(page);
    const old = await buildIdOf(dir);
    const next = await makeNextVersion(dir);
    const shown = () => page.locator('html').getAttribute('data-build');

    await page.reload();
    await text(page.locator('#updates'), /A new version is ready/);
    // Not forced: another page is still the old version, whole, and works.
    await page.locator('nav.chapters').getByRole('link', { name: 'Modes', exact: true }).click();
    await page.locator('#mode-table tbody tr').first().waitFor();
    assert.equal(await shown(), old);
    await visit.open('specify.html', page);
    await saved(page);
    await text(page.locator('#updates'), /A new version is ready/);
    await box(page, 'place').fill('typed before the new version');
    await Promise.all([page.waitForEvent('load'), page.locator('#updates').getByRole('button').click()]);
    await saved(page);
    assert.equal(await shown(), next);
    await value(box(page, 'place'), /^typed before the new version$/);
    await kept(page);
    assert.equal(await page.locator('#updates').innerText(), '');
    // One cache is left: that of the new version.
    await until(async () => (await page.evaluate(() => caches.keys())).length === 1, 'the old cache is gone');
    await visit.end();
  } finally {
    await server.stop();
    await rm(dir, { recursive: true, force: true });
  }
});

test('another tab is told when one has switched', async () => {
  const dir = await copyOfSite();
  const server = await serve(dir, { prefix });
  try {
    const visit = await visitOf(server);
    const one = await visit.open('specify.html');
    await kept(one);
    const two = await visit.open('modes.html');
    await kept(two);
    await makeNextVersion(dir);
    await one.reload();
    await text(one.locator('#updates'), /A new version is ready/);
    await Promise.all([one.waitForEvent('load'), one.locator('#updates').getByRole('button').click()]);
    await text(two.locator('#updates'), /Another tab has switched to the new version/);
    await Promise.all([two.waitForEvent('load'), two.locator('#updates').getByRole('button').click()]);
    await two.locator('#mode-table tbody tr').first().waitFor();
    await visit.end();
  } finally {
    await server.stop();
    await rm(dir, { recursive: true, force: true });
  }
});

test('a version of which a file is damaged is not taken', async () => {
  const dir = await copyOfSite();
  const server = await serve(dir, { prefix });
  try {
    const visit = await visitOf(server);
    const page = await visit.open('modes.html');
    await kept(page);
    const sheet = (await readdir(path.join(dir, 'assets'))).find((name) => name.endsWith('.css'));
    await writeFile(path.join(dir, 'assets', sheet), '/* cut short');
    await writeFile(path.join(dir, 'sw.js'), `${await readFile(path.join(dir, 'sw.js'), 'utf8')}\n// another version\n`);
    const found = await page.evaluate(async () => {
      const registration = await navigator.serviceWorker.ready;
      const arrived = new Promise((resolve) => {
        registration.addEventListener('updatefound', () => {
          const arriving = registration.installing;
          arriving.addEventListener('statechange', () => ['installed', 'redundant'].includes(arriving.state) && resolve(arriving.state));
        }, { once: true });
      });
      await registration.update();
      return arrived;
    });
    assert.equal(found, 'redundant');
    visit.allow(/arrived damaged/);
    await page.reload();
    await page.locator('#mode-table tbody tr').first().waitFor();
    await text(page.locator('#offline-state'), /Kept on this device/);
    assert.equal(await page.locator('#updates').innerText(), '');
    await visit.end();
  } finally {
    await server.stop();
    await rm(dir, { recursive: true, force: true });
  }
});
