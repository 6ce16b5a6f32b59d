// Every page: accessible by axe-core in light, dark and direct sun; no sideways scrolling from 360 px to a desk, nor at
// 200 % zoom; nothing asked of any other origin (support/visit.mjs watches that, the policy and the console).
import assert from 'node:assert/strict';
import { readdir, readFile } from 'node:fs/promises';
import { createRequire } from 'node:module';
import { after, before, test } from 'node:test';

import { box, openSite, saved, siteDir, testdata, text, until } from './support/visit.mjs';

const axeSource = await readFile(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');

let site, visit, page;
before(async () => {
  site = await openSite();
  await furnish();
});
after(async () => {
  await site.close();
  visit.check();
});

/** What tells that a page has its answers; pages of prose have them at once. */
const ready = {
  'index.html': 'hoop-start canvas', 'specify.html': '[data-field="ring.radius"]', 'modes.html': '#mode-table', 'respond.html': '#history canvas',
  'tap.html': '#peak-table', 'records.html': '#record-table', 'hand-over.html': '#figures', 'numbers.html': 'hoop-numbers #summary',
};

const names = (await readdir(siteDir)).filter((file) => file.endsWith('.html') && file !== 'hoopsheet-single.html');

/** Makes a profile in which every page has something to show: a kept revision, a tap, a field with a problem. */
async function furnish() {
  visit = await site.visit({ reducedMotion: 'reduce' });
  page = await visit.open('tap.html');
  await saved(page);
  await page.setInputFiles('#file', testdata('signals', 'tap-demo.wav'));
  await page.locator('#tension').waitFor();
  await page.locator('#keep-tap').click();
  await page.locator('#kept-taps tbody tr').first().waitFor();
  await saved(page);
  const bar = page.locator('hoop-bar');
  await bar.getByRole('button', { name: 'Keep this revision' }).click();
  await bar.getByRole('button', { name: 'Keep revision 1' }).click();
  await text(bar.locator('.line'), /revision 1/);
  await visit.open('specify.html', page);
  await saved(page);
  await box(page, 'sheet.nu').fill('about a third');
  await box(page, 'sheet.nu').blur();
  await page.locator('#attention').waitFor();
  await saved(page);
}

async function opened(name) {
  await visit.open(name, page);
  await page.locator('main h1').waitFor();
  if (ready[name]) {
    await page.locator(ready[name]).first().waitFor();
  }
  await saved(page);
}

/** Serious and critical findings of axe-core, shadow trees included. */
async function findings(page) {
  await page.evaluate(axeSource); // through the debugger, which the page's policy does not stop
  return page.evaluate(async () => {
    const { violations } = await globalThis.axe.run(document, { resultTypes: ['violations'] });
    return violations.filter((v) => v.impact === 'serious' || v.impact === 'critical')
      .flatMap((v) => v.nodes.map((node) => `${v.id}: ${node.target.flat().join(' ')}: ${node.failureSummary?.replace(/\s+/g, ' ')}`));
  });
}

/** The lightings: what the device asks for, and what is chosen in the footer. */
const lightings = [['light', ''], ['dark', ''], ['light', 'sunlight']];

async function findingsInEveryLight(where) {
  const faults = [];
  for (const [colorScheme, theme] of lightings) {
    await where.emulateMedia({ colorScheme });
    await where.locator('#theme').selectOption(theme);
    for (const finding of await findings(where)) {
      faults.push(`${theme || colorScheme}: ${finding}`);
    }
  }
  return faults;
}

test('axe finds nothing serious on any page in any light', async () => {
  const faults = [];
  for (const name of names) {
    await opened(name);
    faults.push(...(await findingsInEveryLight(page)).map((fault) => `${name}: ${fault}`));
  }
  assert.deepEqual(faults, []);
});

test('nor on a hand-over received, nor where one is damaged', async () => {
  await opened('hand-over.html');
  const link = await until(async () => (await page.locator('#link').count()) && page.locator('#link').inputValue(), 'a link');
  const there = await visit.open(link);
  await there.locator('#keep-copy').waitFor();
  assert.deepEqual(await findingsInEveryLight(there), []);
  await there.goto('about:blank');
  await visit.open(link.slice(0, -30), there);
  await there.locator('hoop-handover [role=alert]').waitFor();
  assert.deepEqual(await findingsInEveryLight(there), []);
  await there.close();
});

/** What reaches beyond the right edge of the window, for the message. */
const beyond = (page) => page.evaluate(() => {
  const width = document.scrollingElement.clientWidth;
  const wide = [];
  const look = (root) => {
    for (const element of root.querySelectorAll('*')) {
      const box = element.getBoundingClientRect();
      if (box.width > 0 && box.right > width + 1 && getComputedStyle(element).position !== 'fixed') {
        wide.push(`${element.localName}${element.id ? `#${element.id}` : ''}.${element.className?.baseVal ?? element.className} to ${Math.round(box.right)}`);
      }
      if (element.shadowRoot) {
        look(element.shadowRoot);
      }
    }
  };
  look(document);
  return wide.slice(0, 6);
});

// A desk, a tablet, a phone, and the first two at 200 % zoom, which halves the pixels that a page has.
const widths = [1280, 820, 360, 640, 410];

test(`no page scrolls sideways at ${widths.join(', ')} px`, async () => {
  const faults = [];
  for (const name of names) {
    await opened(name);
    for (const width of widths) {
      await page.setViewportSize({ width, height: 800 });
      await page.evaluate(() => new Promise((done) => requestAnimationFrame(() => requestAnimationFrame(done))));
      const [wide, room] = await page.evaluate(() => [document.scrollingElement.scrollWidth, innerWidth]);
      if (wide > room) {
        faults.push(`${name}: ${wide} px wide in ${room}: ${(await beyond(page)).join('; ')}`);
      }
    }
  }
  assert.deepEqual(faults, []);
});
