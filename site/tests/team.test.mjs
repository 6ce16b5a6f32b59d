// defaults.json beside the site: a team's materials, limits, units and link address; a file with faults; none at all.
import assert from 'node:assert/strict';
import { rm, writeFile } from 'node:fs/promises';
import path from 'node:path';
import { after, before, test } from 'node:test';

import { copyOfSite } from './support/next-version.mjs';
import { box, field, openSite, saved, text, until, value } from './support/visit.mjs';

let dir, site;
before(async () => {
  dir = await copyOfSite();
  site = await openSite({ dir });
});
after(async () => {
  await site.close();
  await rm(dir, { recursive: true, force: true });
});

const put = (content) => writeFile(path.join(dir, 'defaults.json'), typeof content === 'string' ? content : JSON.stringify(content));

const ourCloth = { id: 'our-cloth', name: 'Our coated cloth', density: 1250, e: 1.1e9, nu: 0.3, cte: 4e-5, allowableStress: 2.5e7 };

test('materials, limits, units and link address of a team are used', async () => {
  await put({ units: 'inch-pound', linkAddress: 'https://example.org/h/hand-over.html', materials: [ourCloth], limits: { tolerance: 0.05, lowest: 25, lines: [] } });
  const visit = await site.visit({ reducedMotion: 'reduce' });
  const page = await visit.open('records.html');
  await saved(page);
  await page.locator('#new').click();
  await text(page.locator('hoop-bar .line'), /New diaphragm/);
  await saved(page);
  await page.locator('nav.chapters').getByRole('link', { name: 'Specify', exact: true }).click();
  await saved(page);
  await until(async () => /in$/.test(await field(page, 'ring.radius').locator('select').inputValue()), 'inches');
  await value(box(page, 'tension.tolerance'), /^5$/);
  await value(box(page, 'avoid.lowest'), /^25$/);
  await field(page, 'sheet.material').locator('select').selectOption({ label: 'Our coated cloth' });
  await value(box(page, 'sheet.material'), /^Our coated cloth$/);
  await saved(page);
  await page.locator('nav.chapters').getByRole('link', { name: 'Hand over', exact: true }).click();
  await until(async () => (await page.locator('#link').count())
    && (await page.locator('#link').inputValue()).startsWith('https://example.org/h/hand-over.html#'), 'the team\'s address');
  await visit.end();
});

test('a fault in the file is told where settings are, and takes nothing else away', async () => {
  await put({ units: 'cubits', materials: [ourCloth] });
  const visit = await site.visit({ reducedMotion: 'reduce' });
  const page = await visit.open('records.html');
  await saved(page);
  await text(page.locator('hoop-records, [aria-labelledby=settings-title]'), /defaults\.json.*cubits/);
  await visit.open('specify.html', page);
  await saved(page);
  await field(page, 'sheet.material').locator('option', { hasText: 'Our coated cloth' }).waitFor({ state: 'attached' });
  await visit.end();
});

for (const [what, content] of [['that is no JSON', '{"units": '], ['that is a web page', '<!doctype html><title>Log in</title>']]) {
  test(`a file ${what} does no harm`, async () => {
    await put(content);
    const visit = await site.visit({ reducedMotion: 'reduce' });
    const page = await visit.open('specify.html');
    await saved(page);
    await value(box(page, 'ring.radius'), /^450$/);
    await visit.end();
  });
}

test('without the file the pages use their own defaults', async () => {
  await rm(path.join(dir, 'defaults.json'));
  const visit = await site.visit({ reducedMotion: 'reduce' });
  visit.allow(/404.*defaults\.json/);
  const page = await visit.open('specify.html');
  await saved(page);
  await value(box(page, 'ring.radius'), /^450$/);
  assert.equal(await field(page, 'ring.radius').locator('select').inputValue(), 'mm');
  await visit.end();
});
