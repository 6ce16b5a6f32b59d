// Numbers you can trust: published values computed in the visitor's browser. For scripts: every call by name.
import assert from 'node:assert/strict';
import { readFile } from 'node:fs/promises';
import path from 'node:path';
import { after, before, test } from 'node:test';

import { root } from './support/server.mjs';
import { openSite, testdata, text } from './support/visit.mjs';

let site;
before(async () => { site = await openSite(); });
after(() => site.close());

test('every published value is computed here and agrees', async () => {
  const { checks } = JSON.parse(await readFile(testdata('published', 'checks.json'), 'utf8'));
  const visit = await site.visit();
  const page = await visit.open('numbers.html');
  const words = await text(page.locator('#summary'), /\d+ of \d+ values agree/);
  assert.match(words, new RegExp(`all agree ${checks.length} of ${checks.length} values`));
  // Nothing is stored beforehand: the rows show what was computed, with the source of what was printed.
  for (const group of new Set(checks.map((c) => c.group))) {
    await page.locator('hoop-numbers details', { hasText: group }).first().locator('summary').click();
    const row = page.locator(`[data-group="${group}"] tbody tr`).first();
    const [check] = checks.filter((c) => c.group === group);
    const cells = await row.locator('td').allInnerTexts();
    assert.equal(cells[1], check.expected);
    // The difference allowed is half a unit of the last printed digit, times the slack of values whose source truncates.
    const decimals = check.expected.split('.')[1]?.length ?? 0;
    assert.ok(Math.abs(Number(cells[2]) - Number(check.expected)) <= 0.5 * 10 ** -decimals * (check.slack ?? 1) + 1e-15, cells.join(' | '));
    assert.ok(cells[0].includes(check.source.slice(0, 40)));
  }
  await page.getByRole('button', { name: 'Compute again' }).click();
  await text(page.locator('#summary'), /all agree/);
  assert.ok(await page.locator('#accuracy tbody tr').count() > 5);
  await visit.end();
});

test('the page For scripts names every call', async () => {
  const contract = JSON.parse(await readFile(path.join(root, 'site', 'contract', 'contract.schema.json'), 'utf8'));
  const visit = await site.visit();
  const page = await visit.open('scripts.html');
  const words = await page.locator('main').innerText();
  for (const { name } of [...contract.calls, ...contract.store]) {
    assert.ok(words.includes(name), `${name} is not on the page`);
  }
  await visit.end();
});
