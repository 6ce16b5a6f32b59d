// Respond: more that sets the sheet moving, each with its own fields, refusals and notes; modes chosen by the engine.
import { after, afterEach, before, beforeEach, test } from 'node:test';

import { box, field, openSite, saved, text, until, value } from './support/visit.mjs';

let site, visit, page;
before(async () => { site = await openSite(); });
after(() => site.close());
beforeEach(async () => {
  visit = await site.visit({ reducedMotion: 'reduce' });
  page = await visit.open('respond.html');
  await text(page.locator('#travel'), /mm/);
});
afterEach(() => visit.end());

const answer = async () => (await page.locator('hoop-respond dl').allInnerTexts()).join(' ').replace(/\s+/g, ' ');

async function other(before) {
  return until(async () => {
    const now = await answer();
    return now !== before && now;
  }, 'another answer');
}

async function add(kind) {
  const before = await answer();
  await page.locator('#add').selectOption(kind);
  await page.locator('.source').last().waitFor();
  return other(before);
}

test('each kind of source changes the answer and says what is assumed', async () => {
  await page.locator('#kind-displacement').selectOption('rest');
  for (const kind of ['blow', 'body', 'pressure', 'front', 'release', 'displacement', 'impulse', 'velocity']) {
    await add(kind);
    await page.locator('.source button').click();
    await page.locator('.source').waitFor({ state: 'detached' });
    await text(page.locator('#travel'), /^0 mm|^−?0/);
  }
});

test('a body tells the mass that it meets, and may stay', async () => {
  const before = await add('body');
  await text(page.locator('.source .help'), /It meets [\d.]+ g of the sheet.*restitution/);
  await page.getByLabel('it stays on the sheet').check();
  await other(before);
  await text(page.locator('.source .help'), /weight is left out/);
  await box(page, 'more.0.restitution').waitFor({ state: 'detached' });
});

test('a table in time is taken and its fault is named', async () => {
  await page.locator('#kind-displacement').selectOption('rest');
  await add('shake');
  const table = page.locator('#table-0');
  await table.fill('0, 0\n0.01, 5\n0.02, x');
  await table.blur();
  await text(page.locator('.source > .error'), /Line 3 of the table has "x"/);
  const before = await answer();
  await table.fill('0, 0\n0.01, 5\n0.02, 0');
  await table.blur();
  await other(before);
  await page.locator('.source > .error').waitFor({ state: 'detached' });
});

test('modes are chosen, and what is set stays after a reload', async () => {
  const before = await add('blow');
  await page.locator('#orders').selectOption('0');
  await other(before);
  await text(page.locator('#used'), /m up to \d+, n up to \d+; the others could move it by at most about/);
  await box(page, 'more.0.momentum').fill('0.02');
  await saved(page);
  await page.reload();
  await value(box(page, 'more.0.momentum'), /^0\.02$/);
  await field(page, 'more.0.radius').locator('#box').fill('1.4');
  await field(page, 'more.0.radius').locator('#box').blur();
  await text(field(page, 'more.0.radius').locator('#problem'), /\.$/);
});

test('a surface beside the sheet: least gap and first contact', async () => {
  const before = await answer();
  await box(page, 'neighbour.gap').fill('20 mm');
  await other(before);
  await text(page.locator('#clearance'), /^1[45][.\d]* mm.*it does not touch/s);
  await box(page, 'neighbour.gap').fill('3 mm');
  await text(page.locator('#clearance'), /^−[.\d]+ mm.*it touches first at 0 ms/s);
  await page.locator('#side').selectOption('below');
  await text(page.locator('#clearance'), /touches? first at [1-9]|does not touch/);
  await page.locator('#shown').selectOption('1');
  await text(page.locator('#history'), /velocity, m\/s|point 1/);
});
