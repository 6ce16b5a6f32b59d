// Specify: typing as people type, problems at the field, the working copy across reloads and crashes, revisions.
import assert from 'node:assert/strict';
import { after, afterEach, before, beforeEach, test } from 'node:test';

import { launchToKill, newProfile, removeProfile } from './support/chromium.mjs';
import { box, edited, field, openSite, saved, text, until, value } from './support/visit.mjs';

let site, visit, page;
before(async () => { site = await openSite(); });
after(() => site.close());
beforeEach(async () => {
  visit = await site.visit();
  page = await visit.open('specify.html');
  await saved(page);
});
afterEach(() => visit.end());

const derived = (id) => page.locator(`[data-derived="${id}"]`);
const problem = (name) => field(page, name).locator('#problem');

test('units are read as typed', async () => {
  await box(page, 'sheet.thickness').fill('0.9 mil');
  await box(page, 'tension.nominal').fill('2.3 lbf/in');
  await box(page, 'tension.nominal').blur();
  await saved(page);
  await page.reload();
  await saved(page);
  assert.equal(await box(page, 'sheet.thickness').inputValue(), '0.9');
  assert.match(await field(page, 'sheet.thickness').locator('select').inputValue(), /^mil$/);
  assert.equal(await box(page, 'tension.nominal').inputValue(), '2.3');
  // 0.9 mil is 22.86 um exactly; the unit can be changed and the value stays.
  await field(page, 'sheet.thickness').locator('select').selectOption('µm');
  await value(box(page, 'sheet.thickness'), /^22\.86$/);
});

test('a decimal comma is echoed, a doubtful one asked about', async () => {
  await box(page, 'ring.radius').fill('1,5 m');
  await text(field(page, 'ring.radius').locator('[role=status]'), /1\.5/);
  await box(page, 'ring.radius').fill('1,500 m');
  const words = await text(problem('ring.radius'), /1500|1\.500|thousand/i);
  assert.match(words, /\.$/);
  assert.equal(await box(page, 'ring.radius').inputValue(), '1,500 m');
});

test('nonsense keeps its text, says why at the field, and the rest goes on', async () => {
  const sigma = await text(derived('sigma').locator('.number'), /\d/);
  await box(page, 'sheet.thickness').fill('thin');
  await box(page, 'sheet.thickness').blur();
  await text(problem('sheet.thickness'), /thickness.*\.$/i);
  assert.equal(await box(page, 'sheet.thickness').getAttribute('aria-invalid'), 'true');
  const described = await box(page, 'sheet.thickness').getAttribute('aria-describedby');
  assert.ok(described.split(' ').includes('problem'), described);
  await text(page.locator('#attention'), /One field needs attention/);
  assert.equal(await derived('sigma').locator('.number').innerText(), sigma);

  // Other fields work on; the draft is still there after a reload, with its sentence.
  await box(page, 'ring.radius').fill('500 mm');
  await saved(page);
  await page.reload();
  await saved(page);
  assert.equal(await box(page, 'sheet.thickness').inputValue(), 'thin');
  await text(problem('sheet.thickness'), /\.$/);
  assert.equal(await box(page, 'ring.radius').inputValue(), '500');

  await box(page, 'sheet.thickness').fill('50 um');
  await page.locator('#attention').waitFor({ state: 'detached' });
  assert.equal(await box(page, 'sheet.thickness').getAttribute('aria-invalid'), 'false');
});

test('zero, negative and huge numbers are refused in words', async () => {
  for (const bad of ['0', '-3', '1e400', '1e30', 'NaN', '∞', '']) {
    await box(page, 'tension.nominal').fill(bad);
    await box(page, 'tension.nominal').blur();
    await text(problem('tension.nominal'), /tension.*\.$/i);
    assert.equal(await box(page, 'tension.nominal').inputValue(), bad);
    await box(page, 'tension.nominal').fill('310 N/m');
    await problem('tension.nominal').waitFor({ state: 'hidden' });
  }
});

test('thirty fast keystrokes drop none and the last answer is painted', async () => {
  const radius = box(page, 'ring.radius');
  await radius.fill('');
  // 30 characters without a pause; an exact tenth of a metre more than nothing special, in the end.
  const typed = '0.300000000000000000000000000 m';
  await radius.pressSequentially(typed, { delay: 0 });
  assert.equal(await radius.inputValue(), typed);
  // f(0,1) = j01 / (2 pi a) sqrt(T / sigma) of the demonstration at a = 0.3 m: 310 N/m on 50 um of 1390 kg/m^3 (its data
  // file gives sigma = 0.0695 kg/m^2); j01 = 2.404825557695773 (Abramowitz & Stegun, Table 9.5).
  const f = 2.404825557695773 / (2 * Math.PI * 0.3) * Math.sqrt(310 / 0.0695);
  await text(derived('f01').locator('.number'), new RegExp(`^${f.toPrecision(4).replace('.', '\\.')}`));
  await saved(page);
  await page.reload();
  await saved(page);
  assert.match(await radius.inputValue(), /^0\.30*$/);
});

test('what was typed survives a crash right after the pause', async () => {
  const profile = await newProfile();
  try {
    const first = await launchToKill(profile);
    const tab = await first.context.newPage();
    await tab.goto(new URL('specify.html', site.address).href);
    await saved(tab);
    await edited(tab, () => box(tab, 'place').fill('Hall 3, north wall'));
    await edited(tab, () => box(tab, 'ring.radius').fill('0.61 m'));
    await edited(tab, () => box(tab, 'sheet.thickness').fill('5o um'));
    await first.kill();

    const second = await launchToKill(profile);
    const again = await second.context.newPage();
    await again.goto(new URL('specify.html', site.address).href);
    await saved(again);
    assert.equal(await box(again, 'place').inputValue(), 'Hall 3, north wall');
    assert.equal(await box(again, 'ring.radius').inputValue(), '0.61');
    assert.equal(await box(again, 'sheet.thickness').inputValue(), '5o um');
    await second.kill();
  } finally {
    await removeProfile(profile);
  }
});

test('typing and going on in the same moment loses nothing', async () => {
  // The page is left before the pause has passed, again and again: by a link, by a reload, by another address.
  const ways = [
    () => page.locator('nav.chapters').getByRole('link', { name: 'Cautions', exact: true }).click(),
    () => page.reload(),
    () => visit.open('method.html', page),
  ];
  for (let i = 0; i < 6; i++) {
    await box(page, 'place').fill(`hall ${i}`);
    await box(page, 'ring.radius').fill(`${40 + i} parsec`);
    await ways[i % ways.length]();
    await saved(page);
    await visit.open('specify.html', page);
    await saved(page);
    assert.equal(await box(page, 'place').inputValue(), `hall ${i}`);
    assert.equal(await box(page, 'ring.radius').inputValue(), `${40 + i} parsec`);
  }
  await page.locator('hoop-bar [data-keeping=conflict]').waitFor({ state: 'detached' });
});

test('what is typed while a revision is being kept is in the working copy', async () => {
  const bar = page.locator('hoop-bar');
  await bar.getByRole('button', { name: 'Keep this revision' }).click();
  await page.evaluate(() => {
    // In one breath: the button, and a keystroke in a field.
    const find = (root, selector) => {
      for (const element of root.querySelectorAll('*')) {
        const found = element.matches(selector) ? element : element.shadowRoot && find(element.shadowRoot, selector);
        if (found) {
          return found;
        }
      }
      return null;
    };
    find(document, 'hoop-bar').shadowRoot.querySelector('form').requestSubmit();
    const input = find(document, '[data-field="place"]').shadowRoot.querySelector('#box');
    input.value = 'typed meanwhile';
    input.dispatchEvent(new InputEvent('input', { bubbles: true }));
  });
  await text(bar.locator('.line'), /revision 1, changed since/);
  await saved(page);
  await page.reload();
  await saved(page);
  assert.equal(await box(page, 'place').inputValue(), 'typed meanwhile');
  await text(bar.locator('.line'), /revision 1, changed since/);
});

test('closing the page right after typing loses nothing', async () => {
  const bar = page.locator('hoop-bar [data-stamp]');
  const before = await bar.getAttribute('data-stamp');
  await box(page, 'notes').fill('written in the last moment');
  // From when the bar no longer says that all is saved, or is past that already, nothing may be lost.
  await until(async () => (await bar.getAttribute('data-keeping')) !== 'saved' || (await bar.getAttribute('data-stamp')) !== before, 'the change to be taken in');
  await page.close({ runBeforeUnload: true });
  const again = await visit.open('specify.html');
  await saved(again);
  assert.equal(await box(again, 'notes').inputValue(), 'written in the last moment');
});

test('only "Keep this revision" makes a numbered one', async () => {
  const bar = page.locator('hoop-bar');
  await text(bar.locator('.line'), /no revision kept/);
  await bar.getByRole('button', { name: 'Keep this revision' }).click();
  await bar.locator('#note').fill('as ordered');
  await bar.getByRole('button', { name: 'Keep revision 1' }).click();
  await text(bar.locator('.line'), /revision 1(?!, changed)/);
  await box(page, 'ring.radius').fill('0.7 m');
  await text(bar.locator('.line'), /revision 1, changed since/);
  await saved(page);
  await page.reload();
  await text(bar.locator('.line'), /revision 1, changed since/);
  await bar.getByRole('button', { name: 'Keep this revision' }).click();
  await bar.getByRole('button', { name: 'Keep revision 2' }).click();
  await text(bar.locator('.line'), /revision 2(?!, changed)/);
});

test('a typical material fills its figures, lines are added and removed', async () => {
  await field(page, 'sheet.material').locator('select').selectOption({ index: 2 });
  const name = await box(page, 'sheet.material').inputValue();
  assert.ok(name.length > 0);
  await value(box(page, 'sheet.density'), /^(?!1390$)\d+/);
  const lines = page.locator('hoop-specify .line');
  const before = await lines.count();
  await page.getByRole('button', { name: 'Add a line' }).click();
  await lines.nth(before).waitFor();
  await box(page, `avoid.lines.${before}.frequency`).fill('1450 rpm');
  await saved(page);
  await page.getByRole('button', { name: `Remove line ${before + 1}` }).click();
  await lines.nth(before).waitFor({ state: 'detached' });
});
