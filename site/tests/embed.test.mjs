// One calculator on somebody else's page: of the same origin with the folder copied beside it, and framed from another.
import assert from 'node:assert/strict';
import { cp, mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { after, afterEach, before, beforeEach, test } from 'node:test';

import { chromium } from 'playwright-core';

import { executablePath, flags } from './support/chromium.mjs';
import { serve } from './support/server.mjs';
import { box, siteDir, text, Visit } from './support/visit.mjs';

// The policy that the Hosting page asks of a host page, and nothing more.
const policy = "default-src 'none'; script-src 'self' 'wasm-unsafe-eval'; worker-src 'self'; connect-src 'self'; style-src 'self'; img-src 'self'";

const hostPage = `<!doctype html>
<html lang="en"><meta charset="utf-8"><meta http-equiv="Content-Security-Policy" content="${policy}">
<title>Our test cell</title><link rel="stylesheet" href="host.css"><link rel="icon" href="icon.svg">
<h1>Our test cell</h1><p id="ours">A paragraph of the host, with a <button>button</button>.</p>
<table><tr><th>head</th><td>cell</td></tr></table>
<script type="module" src="hoopsheet/hoopsheet.js"></script>
<hoop-modes></hoop-modes>
</html>`;

const plainPage = hostPage.replace(/<script[\s\S]*<\/hoop-modes>/, '');

const framePage = (address) => `<!doctype html><html lang="en"><meta charset="utf-8"><title>A page elsewhere</title><link rel="icon" href="data:,">
<h1>A page elsewhere</h1><iframe src="${address}modes.html?frame" title="Modes of the diaphragm" width="900" height="700"></iframe></html>`;

const css = 'body { font: 16px/1.5 monospace; color: rgb(90, 0, 90); background: rgb(250, 250, 240); } button { border: 3px dotted red; } td { padding: 7px; }';

let dir, host, site, browser, visit;
before(async () => {
  dir = await mkdtemp(path.join(tmpdir(), 'hoopsheet-host-'));
  await cp(siteDir, path.join(dir, 'intranet', 'hoopsheet'), { recursive: true });
  await cp(path.join(siteDir, 'icon.svg'), path.join(dir, 'intranet', 'icon.svg'));
  await writeFile(path.join(dir, 'intranet', 'host.css'), css);
  await writeFile(path.join(dir, 'intranet', 'cell.html'), hostPage);
  await writeFile(path.join(dir, 'intranet', 'plain.html'), plainPage);
  host = await serve(dir);
  site = await serve(siteDir);
  await writeFile(path.join(dir, 'frame.html'), framePage(site.address));
  browser = await chromium.launch({ executablePath, args: flags });
});
after(async () => {
  await browser.close();
  await host.stop();
  await site.stop();
  await rm(dir, { recursive: true, force: true });
});
beforeEach(async () => { visit = new Visit(await browser.newContext({ viewport: { width: 1280, height: 900 }, reducedMotion: 'reduce' }), host.address); });
afterEach(() => visit.end());

/** How the host's own things look. */
const looks = (page) => page.evaluate(() => ['body', 'h1', '#ours', '#ours button', 'td'].map((selector) => {
  const element = document.querySelector(selector);
  const style = getComputedStyle(element);
  const box = element.getBoundingClientRect();
  return [selector, style.font, style.color, style.background, style.border, style.padding, style.margin, Math.round(box.width), selector === 'body' ? 0 : Math.round(box.height)];
}));

test('on a page of the same origin the element works under the host\'s own policy', async () => {
  const plain = await visit.open('intranet/plain.html');
  const wanted = await looks(plain);
  const page = await visit.open('intranet/cell.html');
  await page.locator('#mode-table tbody tr').first().waitFor();
  await box(page, 'ring.radius').fill('0.3 m');
  const before = await page.locator('#mode-table tbody tr').first().innerText();
  await page.locator('#mode-table tbody tr').nth(3).click();
  await text(page.getByRole('heading', { level: 2 }).filter({ hasText: /^Mode/ }), /\(/);
  assert.match(before, /Hz/);

  assert.deepEqual(await looks(page), wanted, 'the host\'s styles are left alone');
  assert.equal(page.url(), `${host.address}intranet/cell.html`, 'the host\'s address is left alone');
  assert.equal(await page.title(), 'Our test cell');
  assert.equal(await page.evaluate(async () => (await navigator.serviceWorker.getRegistrations()).length), 0, 'no service worker');
  assert.equal(await page.evaluate(() => document.documentElement.dataset.theme ?? ''), '');
  const added = await page.evaluate(() => [...document.head.querySelectorAll('style, link[rel=stylesheet]')].length + document.adoptedStyleSheets.length);
  assert.equal(added, 1, 'no sheet is added to the host\'s page');

  // What is typed there is kept, and found by the pages of the copied folder.
  await visit.open('intranet/hoopsheet/specify.html', page);
  await page.locator('hoop-bar [data-keeping=saved]').waitFor();
  assert.equal(await box(page, 'ring.radius').inputValue(), '0.3');
});

test('every element stands alone on a host page', async () => {
  const page = await visit.open('intranet/plain.html');
  await page.addScriptTag({ type: 'module', url: 'hoopsheet/hoopsheet.js' });
  for (const [name, sign] of [['bar', '[data-keeping]'], ['start', 'h2'], ['specify', '[data-field="ring.radius"]'], ['respond', '#travel'], ['tap', '#file'],
    ['records', '#record-table'], ['handover', '#figures'], ['numbers', 'table']]) {
    await page.evaluate((tag) => {
      document.querySelector('#under-test')?.remove();
      const element = document.createElement(tag);
      element.id = 'under-test';
      document.body.append(element);
    }, `hoop-${name}`);
    await page.locator(`#under-test ${sign}`).first().waitFor();
  }
});

test('framed by a page of another origin it works, without the list of chapters', async () => {
  visit.origins.add(new URL(site.address).origin);
  const page = await visit.open('frame.html');
  const frame = page.frameLocator('iframe');
  await frame.locator('#mode-table tbody tr').first().waitFor();
  assert.equal(await frame.locator('nav.chapters').isVisible(), false);
  await box(frame, 'ring.radius').fill('0.3 m');
  await frame.locator('hoop-bar [data-keeping=saved], hoop-bar [data-keeping=unsaveable]').first().waitFor();
  // A link inside stays in the frame, without the list again.
  await visit.open('frame.html', page);
  await frame.locator('#mode-table tbody tr').first().waitFor();
});
