// Hand over: the link in a fresh profile, damaged links, files, notes on addresses, print.
import assert from 'node:assert/strict';
import { readFile, writeFile } from 'node:fs/promises';
import { after, afterEach, before, beforeEach, test } from 'node:test';

import { box, edited, openSite, saved, testdata, text, until } from './support/visit.mjs';

let site, visit;
before(async () => { site = await openSite(); });
after(() => site.close());
beforeEach(async () => { visit = await site.visit({ reducedMotion: 'reduce' }); });
afterEach(() => visit.end());

/** Prepares a hand-over of the demonstration with a tap, and gives its page and link. */
async function prepare() {
  const page = await visit.open('tap.html');
  await saved(page);
  await page.setInputFiles('#file', testdata('signals', 'tap-demo.wav'));
  await page.locator('#tension').waitFor();
  await saved(page);
  await visit.open('hand-over.html', page);
  const link = await until(async () => (await page.locator('#link').count()) && page.locator('#link').inputValue(), 'a link');
  return { page, link };
}

test('the link opens in a fresh profile, read-only, as sent beside computed now', async () => {
  const { page, link } = await prepare();
  assert.ok(link.length < 2000, `${link.length} characters`);
  assert.ok(link.startsWith(`${site.address}hand-over.html#h=1.`), link.slice(0, 80));
  const sent = await page.locator('#figures tbody td:nth-child(2)').allInnerTexts();
  assert.ok(sent.length > 12);

  const client = await site.visit();
  const there = await client.open(link);
  await there.locator('#keep-copy').waitFor();
  await text(there.locator('#figures thead'), /as sent.*computed now/i);
  await text(there.locator('[aria-label="What this is"]'), /read-only.*They agree/);
  assert.deepEqual(await there.locator('#figures tbody td:nth-child(2)').allInnerTexts(), sent);
  assert.deepEqual(await there.locator('#figures tbody td:nth-child(3)').allInnerTexts(), sent);
  assert.equal(await there.locator('hoop-handover input:not([type=file]), hoop-handover select').count(), 0, 'nothing to type in');
  assert.ok(await there.locator('hoop-handover .caution').count() > 0, 'cautions');
  await text(there.locator('[aria-label="What this is not"]'), /Anybody who has this.*no signature|not a signature/);

  await there.locator('#keep-copy').click();
  await text(there.locator('[aria-label="What this is"]'), /A copy is kept on this device/);
  await client.open('records.html', there);
  await text(there.locator('#record-table'), /Film port B/);
  await client.end();
});

test('links that were cut, altered or come from a newer version are explained', async () => {
  const { link } = await prepare();
  const client = await site.visit();
  const page = await client.context.newPage();
  const alert = page.locator('hoop-handover [role=alert]');
  const opened = async (address, words) => {
    await page.goto('about:blank');
    await page.goto(address);
    await text(alert, words);
    assert.equal(await page.locator('#figures').count(), 0, 'no figures of a damaged link');
    await page.locator('#parcel').waitFor();
  };
  await opened(link.slice(0, -40), /cut short/);
  await opened(link.slice(0, link.indexOf('#') + 8), /cut short/);
  const at = link.length - 100;
  const altered = link.slice(0, at) + (link[at] === 'A' ? 'B' : 'A') + link.slice(at + 1);
  await opened(altered, /altered/);
  await opened(link.replace('#h=1.', '#h=7.'), /newer version/);
  const bomb = (await readFile(testdata('links', 'bomb.txt'), 'utf8')).trim();
  await opened(`${site.address}hand-over.html#${bomb}`, /\.$/);
  // The whole link in the same tab then opens: the page listens to the address.
  await page.evaluate((hash) => { location.hash = hash; }, link.slice(link.indexOf('#')));
  await page.locator('#keep-copy').waitFor();
  await client.end();
});

test('a file hands over the same, and an altered figure is marked', async () => {
  const { page } = await prepare();
  const [download] = await Promise.all([page.waitForEvent('download'), page.locator('#save-parcel').click()]);
  assert.match(download.suggestedFilename(), /^film-port-b.*\.json$/);
  const parcel = JSON.parse(await readFile(await download.path(), 'utf8'));
  const client = await site.visit();
  const there = await client.open('hand-over.html');
  await there.locator('#parcel').setInputFiles(await download.path());
  await text(there.locator('[aria-label="What this is"]'), /They agree/);

  const figure = parcel.figures.find((f) => f.id.startsWith('f.'));
  figure.value *= 1.01;
  const altered = `${await download.path()}-altered.json`;
  await writeFile(altered, JSON.stringify(parcel));
  await there.reload();
  await there.locator('#parcel').setInputFiles(altered);
  await text(there.locator('[aria-label="What this is"]'), /One figure differs/);
  await text(there.locator(`[data-figure="${figure.id}"]`), /differs/);
  assert.equal(await there.locator('#figures .chip').count(), 1);
  await client.end();
});

test('the page says where a link will not open, and takes the address from the settings', async () => {
  const page = await visit.open('hand-over.html');
  // This test's server is at a loopback address.
  await text(page.locator('[aria-labelledby=link-title]'), /known only on this network.*Send the file/);
  await visit.open('records.html', page);
  await page.locator('#address').fill('https://example.org/hoopsheet/hand-over.html');
  await page.locator('#address').blur();
  await text(page.locator('[aria-labelledby=settings-title]'), /Kept\./);
  await visit.open('hand-over.html', page);
  await until(async () => (await page.locator('#link').count())
    && (await page.locator('#link').inputValue()).startsWith('https://example.org/hoopsheet/hand-over.html#h='), 'a link to the set address');
  assert.doesNotMatch(await page.locator('[aria-labelledby=link-title]').innerText(), /known only on this network/);
});

test('notes too long for a link leave the file', async () => {
  const page = await visit.open('specify.html');
  await saved(page);
  // Letters without a pattern, which cannot be packed: more than 2000 characters of them.
  let letters = '';
  for (let i = 1; letters.length < 3800; i = (Math.imul(i, 1664525) + 1013904223) >>> 0) {
    letters += String.fromCharCode(97 + ((i >>> 24) % 26));
  }
  await edited(page, () => box(page, 'notes').fill(letters));
  await visit.open('hand-over.html', page);
  await text(page.locator('[aria-labelledby=link-title]'), /A link would have \d+ characters/);
  assert.equal(await page.locator('#link').count(), 0);
  await page.locator('#save-parcel').waitFor();
});

/** Pages of a PDF: its page objects are not compressed by Chromium. */
const pageCount = (pdf) => pdf.toString('latin1').match(/\/Type\s*\/Page\b(?!s)/g)?.length ?? 0;

for (const format of ['A4', 'Letter']) {
  test(`a hand-over prints on two pages of ${format}`, async () => {
    const { page, link } = await prepare();
    const own = await page.pdf({ format });
    assert.ok(pageCount(own) >= 1 && pageCount(own) <= 2, `${pageCount(own)} pages`);
    const client = await site.visit();
    const there = await client.open(link);
    await there.locator('#keep-copy').waitFor();
    const received = await there.pdf({ format });
    assert.ok(pageCount(received) >= 1 && pageCount(received) <= 2, `${pageCount(received)} pages`);
    await client.end();
  });
}

test('print hides what is for the screen only and names diaphragm, revision and date', async () => {
  const { page } = await prepare();
  await page.emulateMedia({ media: 'print' });
  await page.evaluate(() => dispatchEvent(new Event('beforeprint')));
  for (const hidden of ['#link', '#copy-link', 'nav.chapters', '#theme']) {
    assert.equal(await page.locator(hidden).isVisible(), false, hidden);
  }
  await text(page.locator('.print-foot'), /Film port B, listening room, no revision kept.*Hand over.*printed \d/);
  await page.locator('#figures').waitFor();
});
