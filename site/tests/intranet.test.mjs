// Plain http on a name, as on an old intranet: what browsers take away there is said in words, everything else works.
import assert from 'node:assert/strict';
import { readdir } from 'node:fs/promises';
import { after, afterEach, before, beforeEach, test } from 'node:test';

import { box, edited, openSite, saved, siteDir, testdata, text, until } from './support/visit.mjs';

let site, visit, address;
before(async () => {
  site = await openSite({ args: ['--host-resolver-rules=MAP tools.intra 127.0.0.1'] });
  const url = new URL(site.address);
  url.hostname = 'tools.intra';
  address = url.href;
});
after(() => site.close());
beforeEach(async () => {
  visit = await site.visit({ reducedMotion: 'reduce' });
  visit.address = address;
  visit.origins.add(new URL(address).origin);
});
afterEach(() => visit.end());

test('the missing service worker is explained on every page', async () => {
  const page = await visit.open('index.html');
  assert.equal(await page.evaluate(() => isSecureContext), false, 'this is the context that the test is about');
  for (const name of (await readdir(siteDir)).filter((file) => file.endsWith('.html') && file !== 'hoopsheet-single.html')) {
    await visit.open(name, page);
    await text(page.locator('#offline-state'), /Served over plain http.*single file/);
    await page.locator('main h1').waitFor();
  }
});

test('the missing microphone is explained, and a file is read', async () => {
  const page = await visit.open('tap.html');
  await text(page.locator('hoop-listen .note'), /plain http.*open the file/i);
  assert.equal(await page.locator('#record').count(), 0);
  await page.setInputFiles('#file', testdata('signals', 'tap-demo.wav'));
  await text(page.locator('#tension'), /N\/m/);
});

test('records are kept, and the page does not claim to know for how long', async () => {
  const page = await visit.open('specify.html');
  await saved(page);
  await edited(page, () => box(page, 'place').fill('on the intranet'));
  await page.reload();
  await saved(page);
  assert.equal(await box(page, 'place').inputValue(), 'on the intranet');
  await visit.open('records.html', page);
  await text(page.locator('#storage-answer'), /over plain http it is not allowed to/);
});

test('a table is copied the old way, and the link is known to lead nowhere outside', async () => {
  const page = await visit.open('modes.html');
  await page.locator('#mode-table tbody tr').first().waitFor();
  const actions = page.locator('hoop-table-actions').first();
  await actions.getByRole('button', { name: 'Copy table' }).click();
  await text(actions.locator('[role=status]'), /Copied/);
  await visit.open('hand-over.html', page);
  await text(page.locator('[aria-labelledby=link-title]'), /"tools\.intra" is known only on this network/);
  await until(async () => (await page.locator('#link').inputValue()).startsWith(address), 'a link');
});
