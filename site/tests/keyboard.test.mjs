// The whole way with the keyboard alone: no pointer is used in this file.
import assert from 'node:assert/strict';
import { after, afterEach, before, beforeEach, test } from 'node:test';

import { box, openSite, saved, text, until } from './support/visit.mjs';

let site, visit, page;
before(async () => { site = await openSite(); });
after(() => site.close());
beforeEach(async () => { visit = await site.visit({ reducedMotion: 'reduce', permissions: ['clipboard-read', 'clipboard-write'] }); });
afterEach(() => visit.end());

/** What has the focus, through shadow trees: tag, id, accessible words, and the field it is in. */
const focused = () => page.evaluate(() => {
  let element = document.activeElement;
  let field = '';
  while (element?.shadowRoot?.activeElement) {
    field = element.dataset.field ?? field;
    element = element.shadowRoot.activeElement;
  }
  const outline = getComputedStyle(element);
  return {
    tag: element.localName,
    id: element.id,
    field,
    words: (element.getAttribute('aria-label') ?? element.textContent ?? '').replace(/\s+/g, ' ').trim(),
    href: element.getAttribute('href') ?? '',
    shown: outline.outlineStyle !== 'none' || outline.boxShadow !== 'none',
  };
});

/** Presses Tab until what has the focus is the wanted thing; every stop on the way must be seen to have it. */
async function tabTo(wanted, what, most = 400) {
  for (let i = 0; i < most; i++) {
    await page.keyboard.press('Tab');
    const now = await focused();
    // After the last stop the focus leaves the page once, before it begins again.
    assert.ok(now.shown || now.tag === 'body', `the focus cannot be seen on ${JSON.stringify(now).slice(0, 200)}`);
    if (wanted(now)) {
      return now;
    }
  }
  assert.fail(`${what} is not reached by Tab`);
}

async function chapter(name) {
  await tabTo((f) => f.tag === 'a' && f.words === name, `the chapter ${name}`);
  await Promise.all([page.waitForEvent('load'), page.keyboard.press('Enter')]);
  await saved(page);
}

test('the first stop skips to the page', async () => {
  page = await visit.open('specify.html');
  await saved(page);
  await page.keyboard.press('Tab');
  assert.equal((await focused()).words, 'Skip to the page');
  await page.keyboard.press('Enter');
  const inside = await tabTo((f) => f.field !== '', 'the first field', 3);
  assert.equal(inside.field, 'name');
});

test('from Specify to Hand over without a pointer', async () => {
  page = await visit.open('specify.html');
  await saved(page);
  await tabTo((f) => f.field === 'ring.radius' && f.tag === 'input', 'the ring radius');
  await page.keyboard.press('Control+A');
  await page.keyboard.type('0.4 m');
  await tabTo((f) => f.field === 'ring.radius' && f.tag === 'select', 'its unit');
  await tabTo((f) => f.field === 'tension.nominal' && f.tag === 'input', 'the tension');
  await page.keyboard.press('Control+A');
  await page.keyboard.type('300 N/m');
  await saved(page);
  await tabTo((f) => f.words === 'Keep this revision', 'Keep this revision');
  await page.keyboard.press('Enter');
  await until(async () => (await focused()).id === 'note', 'the note has the focus');
  await page.keyboard.type('typed throughout');
  await page.keyboard.press('Enter');
  await text(page.locator('hoop-bar .line'), /revision 1(?!, changed)/);
  await until(async () => /saved/i.test((await focused()).words), 'the focus goes on from where the form was');

  await chapter('Modes');
  await page.locator('#mode-table tbody tr').first().waitFor();
  await tabTo((f) => f.words === 'Draw mode (1, 1)', 'mode (1, 1)');
  await page.keyboard.press('Space');
  await text(page.getByRole('heading', { level: 2 }).filter({ hasText: /^Mode/ }), /\(1, 1\)/);
  await tabTo((f) => f.words === 'Copy table', 'Copy table');
  await page.keyboard.press('Enter');
  await until(async () => /\t/.test(await page.evaluate(() => navigator.clipboard.readText())), 'a copied table');

  await chapter('Respond');
  await text(page.locator('#travel'), /mm/);
  const before = await page.locator('#travel').innerText();
  await tabTo((f) => f.id === 'kind-displacement', 'the kind of start');
  await page.keyboard.press('ArrowUp');
  await until(async () => (await page.locator('#travel').innerText()) !== before, 'another travel');
  await tabTo((f) => f.id === 'scrub', 'the slider of time');
  await page.keyboard.press('ArrowRight');
  await tabTo((f) => f.words === 'Remove point 2', 'Remove point 2');
  await page.keyboard.press('Enter');
  await box(page, 'points.1.radius').waitFor({ state: 'detached' });

  await chapter('Tap');
  await tabTo((f) => f.id === 'file', 'opening a recording');
  await tabTo((f) => f.id === 'frequency', 'a typed peak');
  for (const peak of ['61.2', '97.5', '130.7']) {
    await page.keyboard.type(peak);
    await page.keyboard.press('Enter');
    await until(async () => (await page.locator('#frequency').inputValue()) === '', 'the peak is taken');
  }
  await text(page.locator('#tension'), /N\/m/);
  await tabTo((f) => f.id === 'keep-tap', 'Keep this tap');
  await page.keyboard.press('Enter');
  await page.locator('#kept-taps tbody tr').first().waitFor();
  await saved(page);

  await chapter('Hand over');
  await page.locator('#link').waitFor();
  await tabTo((f) => f.id === 'copy-link', 'Copy the link');
  await page.keyboard.press('Enter');
  await until(async () => /#h=1\./.test(await page.evaluate(() => navigator.clipboard.readText())), 'a copied link');
});
