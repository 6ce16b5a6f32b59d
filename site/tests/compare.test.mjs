// Side by side on Modes: now against a kept revision and against another diaphragm.
import assert from 'node:assert/strict';
import { after, afterEach, before, beforeEach, test } from 'node:test';

import { box, edited, openSite, saved, text, until } from './support/visit.mjs';

let site, visit, page;
before(async () => { site = await openSite(); });
after(() => site.close());
beforeEach(async () => { visit = await site.visit({ reducedMotion: 'reduce' }); });
afterEach(() => visit.end());

const modes = () => page.locator('#different-modes tbody tr');

test('without a revision the page says what to do; with one, what differs is listed as it is typed', async () => {
  page = await visit.open('modes.html');
  await text(page.locator('[aria-labelledby=compare-title]'), /Keep a revision/);
  const bar = page.locator('hoop-bar');
  await bar.getByRole('button', { name: 'Keep this revision' }).click();
  await bar.getByRole('button', { name: 'Keep revision 1' }).click();
  await text(bar.locator('.line'), /revision 1/);
  await page.locator('#against').selectOption('revision 1');
  await text(page.locator('#difference'), /Nothing specified differs/);
  await edited(page, () => box(page, 'tension.nominal').fill('341 N/m'));
  await text(page.locator('#difference'), /One line of the specification differs/);
  await text(page.locator('#different-lines'), /341 N\/m.*310 N\/m/);
  // A tenth more tension raises frequencies by 4.9 % at most (the root); the air in the mass keeps that share.
  await until(async () => /\+4\.[6-9]/.test(await modes().first().innerText()), 'the difference of the lowest mode');
  assert.equal(await modes().count(), 24);
  await saved(page);
  await page.reload();
  await text(page.locator('#difference'), /One line of the specification differs/);
});

test('another diaphragm can be held against it', async () => {
  page = await visit.open('records.html');
  await page.locator('#record-table tbody tr').first().waitFor();
  await page.getByRole('button', { name: /^Duplicate/ }).first().click();
  await until(async () => (await page.locator('#record-table tbody tr').count()) === 2, 'a copy');
  await visit.open('specify.html', page);
  await saved(page);
  await edited(page, () => box(page, 'ring.radius').fill('0.4 m'));
  await visit.open('modes.html', page);
  await until(async () => (await page.locator('#against option').count()) === 2, 'the other one');
  await page.locator('#against').selectOption({ index: 1 });
  await text(page.locator('#different-lines'), /400 mm.*450 mm/);
  await modes().first().waitFor();
});
