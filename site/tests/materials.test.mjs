// Materials of one's own on Specify, and the catalogue with its sources.
import assert from 'node:assert/strict';
import { after, afterEach, before, beforeEach, test } from 'node:test';

import { box, edited, field, openSite, saved, text, until, value } from './support/visit.mjs';

let site, visit, page;
before(async () => { site = await openSite(); });
after(() => site.close());
beforeEach(async () => {
  visit = await site.visit({ reducedMotion: 'reduce' });
  page = await visit.open('specify.html');
  await saved(page);
});
afterEach(() => visit.end());

const own = () => page.locator('#own-materials');
const offered = () => field(page, 'sheet.material').locator('select option').allInnerTexts();

test('a material is kept from the sheet, offered, taken over by another diaphragm, and taken out with a way back', async () => {
  await edited(page, () => box(page, 'sheet.material').fill('Test cloth 7'));
  await edited(page, () => box(page, 'sheet.density').fill('1234 kg/m³'));
  await own().locator('summary').click();
  await own().getByLabel('Where these figures come from').fill('our own test, invented');
  await own().getByRole('button', { name: /Keep the sheet/ }).click();
  await text(own(), /Test cloth 7 is kept on this device/);
  await until(async () => (await offered()).includes('Test cloth 7'), 'the material in the list');
  await page.reload();
  await saved(page);
  await until(async () => (await offered()).includes('Test cloth 7'), 'the material after a reload');
  await edited(page, () => box(page, 'sheet.density').fill('1400 kg/m³'));
  await box(page, 'sheet.density').blur(); // what is typed stands in its box until that is left
  await edited(page, () => field(page, 'sheet.material').locator('select').selectOption({ label: 'Test cloth 7' }));
  await value(box(page, 'sheet.density'), /^1234$/);
  await own().locator('summary').click();
  await own().getByRole('button', { name: 'Take out Test cloth 7' }).click();
  await text(own(), /is taken out/);
  assert.ok(!(await offered()).includes('Test cloth 7'));
  await value(box(page, 'sheet.density'), /^1234$/);
  await own().getByRole('button', { name: 'Undo' }).click();
  await until(async () => (await offered()).includes('Test cloth 7'), 'the material again');
});

test('the catalogue gives the source of its figures', async () => {
  await page.locator('#catalogue summary').click();
  await text(page.locator('#catalogue'), /Polyester film.*1390.*kg\/m³.*GPa.*MPa.*common practice/);
});
