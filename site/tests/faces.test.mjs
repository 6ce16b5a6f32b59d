// The section through the diaphragm on Specify: what lies on each face, chosen and moved in the drawing.
import assert from 'node:assert/strict';
import { after, afterEach, before, beforeEach, test } from 'node:test';

import { box, edited, field, openSite, saved, until } from './support/visit.mjs';

let site, visit, page;
before(async () => { site = await openSite(); });
after(() => site.close());
beforeEach(async () => {
  visit = await site.visit({ reducedMotion: 'reduce' });
  page = await visit.open('specify.html');
  await saved(page);
});
afterEach(() => visit.end());

const drawing = () => page.locator('hoop-faces svg');
const kind = (side) => field(page, `faces.${side}.kind`).locator('select');
const words = async (pattern) => until(async () => pattern.test(await drawing().getAttribute('aria-label')), `words like ${pattern}`);

test('the drawing says what lies above and below, and leads to the fields', async () => {
  await words(/Above: air, baffled, no wall near\. Below: air, baffled, no wall near/);
  await edited(page, () => kind('lower').selectOption('vacuum'));
  await words(/Below: vacuum, nothing moves along/);
  await drawing().locator('[data-side=upper]').focus();
  await page.keyboard.press('Enter');
  await until(() => kind('upper').evaluate((select) => select.getRootNode().activeElement === select), 'the focus on the upper face');
});

test('the bottom of a cavity is moved by keys and by the pointer, and the figures follow', async () => {
  await edited(page, () => kind('lower').selectOption('cavity'));
  await edited(page, () => box(page, 'faces.lower.depth').fill('300 mm'));
  const handle = drawing().locator('[role=slider]');
  await until(async () => (await handle.getAttribute('aria-valuetext')) === '300 mm', 'the depth at the handle');
  await edited(page, async () => {
    await handle.focus();
    await page.keyboard.press('ArrowDown');
  });
  assert.equal(await box(page, 'faces.lower.depth').inputValue(), '315');
  await drawing().scrollIntoViewIfNeeded();
  const grip = await handle.boundingBox();
  const whole = await drawing().boundingBox();
  const sheet = whole.y + whole.height / 2;
  const at = grip.y + grip.height / 2;
  await page.mouse.move(grip.x + grip.width / 2, at);
  await page.mouse.down();
  await page.mouse.move(grip.x + grip.width / 2, at - (at - sheet) / 4);
  await page.mouse.move(grip.x + grip.width / 2, at - (at - sheet) / 2);
  await page.mouse.up();
  // Half the way back to the sheet, within a pixel of a hundred.
  await until(async () => Math.abs(Number(await box(page, 'faces.lower.depth').inputValue()) - 157.5) < 5, 'half the depth');
  assert.match(await handle.getAttribute('aria-valuetext'), /^1[56]\d.* mm$/);
});
