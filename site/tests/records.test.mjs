// Records: the list, the one file, two tabs, refused storage.
import assert from 'node:assert/strict';
import { after, afterEach, before, beforeEach, test } from 'node:test';

import { box, edited, openSite, saved, testdata, text, until, value } from './support/visit.mjs';

let site, visit;
before(async () => { site = await openSite(); });
after(() => site.close());
beforeEach(async () => { visit = await site.visit({ reducedMotion: 'reduce' }); });
afterEach(() => visit.end());

const rows = (page) => page.locator('#record-table tbody tr');
const bar = (page) => page.locator('hoop-bar .line');
const panel = (page) => page.locator('[aria-labelledby=list-title]');

async function openRecords(into = visit) {
  const page = await into.open('records.html');
  await rows(page).first().waitFor();
  await saved(page);
  return page;
}

test('new, rename, duplicate, open, delete and undo', async () => {
  const page = await openRecords();
  assert.equal(await rows(page).count(), 1);
  await page.locator('#new').click();
  await until(async () => (await rows(page).count()) === 2, 'two rows');
  await text(bar(page), /New diaphragm/);

  const open = page.locator('#record-table tr.chosen');
  await open.getByRole('button', { name: /^Rename/ }).click();
  await open.getByLabel('new name').fill('North window, test cell 4');
  await open.getByRole('button', { name: 'Rename', exact: true }).click();
  await text(bar(page), /North window, test cell 4/);
  await text(open, /North window, test cell 4/);

  await open.getByRole('button', { name: /^Duplicate/ }).click();
  await until(async () => (await rows(page).count()) === 3, 'three rows');
  await text(bar(page), /North window, test cell 4 \(copy\)/);

  // The other one, which is not open, is deleted and brought back; then the open one.
  const other = rows(page).filter({ hasText: 'Film port B' });
  await other.getByRole('button', { name: /^Delete/ }).click();
  await other.waitFor({ state: 'detached' });
  await page.locator('#undo').click();
  await other.waitFor();
  await page.locator('#record-table tr.chosen').getByRole('button', { name: /^Delete/ }).click();
  await until(async () => (await rows(page).count()) === 2 && !(await bar(page).innerText()).includes('(copy)'), 'another one open');
  await page.locator('#undo').click();
  await until(async () => (await rows(page).count()) === 3, 'three rows again');

  await rows(page).filter({ hasText: 'Film port B' }).getByRole('button', { name: 'Open' }).click();
  await text(bar(page), /Film port B/);
  assert.match(new URL(page.url()).search, /d=[0-9A-Z]{26}/);
});

test('the address names the diaphragm: chapters, reload and back agree', async () => {
  const page = await openRecords();
  const first = new URL(page.url()).searchParams.get('d');
  await page.locator('#new').click();
  await text(bar(page), /New diaphragm/);
  const second = new URL(page.url()).searchParams.get('d');
  assert.notEqual(first, second);
  await page.locator('nav.chapters').getByRole('link', { name: 'Specify' }).click();
  await value(box(page, 'name'), /^New diaphragm$/);
  assert.equal(new URL(page.url()).searchParams.get('d'), second);
  await page.reload();
  await value(box(page, 'name'), /^New diaphragm$/);
  await page.goto(new URL(`specify.html?d=${first}`, site.address).href);
  await value(box(page, 'name'), /^Film port B/);
  await page.goBack();
  await value(box(page, 'name'), /^New diaphragm$/);
  // One that does not exist is said to be gone, and something sound is opened instead.
  await page.goto(new URL('specify.html?d=01JZZZZZZZZZZZZZZZZZZZZZZZ', site.address).href);
  await text(page.locator('hoop-bar .said'), /\.$/);
  await box(page, 'name').waitFor();
});

test('everything goes out in one file and comes in elsewhere', async () => {
  const page = await openRecords();
  await page.locator('#new').click();
  await text(bar(page), /New diaphragm/);
  await saved(page);
  const bar1 = page.locator('hoop-bar');
  await bar1.getByRole('button', { name: 'Keep this revision' }).click();
  await bar1.locator('#note').fill('first');
  await bar1.getByRole('button', { name: 'Keep revision 1' }).click();
  await page.locator('#revision-table').waitFor();
  const [download] = await Promise.all([page.waitForEvent('download'), page.locator('#export').click()]);
  assert.match(download.suggestedFilename(), /\.zip$/);
  const file = await download.path();

  const elsewhere = await site.visit();
  const there = await openRecords(elsewhere);
  await there.locator('#import').setInputFiles(file);
  await text(panel(there), /2 diaphragms added/);
  await until(async () => (await rows(there).count()) === 3, 'three rows');
  // The same file again adds nothing.
  await there.locator('#import').setInputFiles(file);
  await text(panel(there), /2 here already/);
  assert.equal(await rows(there).count(), 3);
  await rows(there).filter({ hasText: 'New diaphragm' }).getByRole('button', { name: 'Open' }).click();
  await there.locator('#revision-table').waitFor();
  await text(there.locator('#revision-table'), /first/);
  await elsewhere.end();
});

test('a file of a newer version, a damaged and a foreign one are refused in words', async () => {
  const page = await openRecords();
  for (const [name, words] of [['newer.zip', /newer version/], ['cut-short.zip', /\.$/], ['altered.zip', /\.$/], ['other-zip.zip', /\.$/], ['bomb.zip', /\.$/]]) {
    await page.locator('#import').setInputFiles(testdata('archives', name));
    await text(page.locator('[aria-labelledby=list-title] [role=alert]'), words);
    assert.equal(await rows(page).count(), 1, name);
    // A sound action takes the sentence away, so that the next is seen to be new.
    await page.locator('#import').setInputFiles(testdata('archives', 'empty-1.zip'));
    await page.locator('[aria-labelledby=list-title] [role=alert]').waitFor({ state: 'detached' });
  }
});

test('two tabs: the second says so, sees what is saved, and cannot overwrite silently', async () => {
  const one = await visit.open('specify.html');
  await saved(one);
  const two = await visit.open(`specify.html${new URL(one.url()).search}`);
  await saved(two);
  for (const page of [one, two]) {
    await text(page.locator('hoop-bar .said'), /open in another tab/);
  }
  await box(one, 'place').fill('Hall 7');
  await value(box(two, 'place'), /^Hall 7$/);

  // Both are changed at once: the second tab's write is refused, and it offers a choice.
  await two.evaluate(() => {
    // This tab's news are held back, as they are when it is busy.
    BroadcastChannel.prototype.postMessage = () => {};
  });
  await Promise.all([box(one, 'place').fill('from one'), box(two, 'place').fill('from two')]);
  const conflicted = await until(async () => {
    for (const page of [one, two]) {
      if (await page.locator('hoop-bar [data-keeping=conflict]').count()) {
        return page;
      }
    }
    return null;
  }, 'a conflict');
  const other = conflicted === one ? two : one;
  await saved(other);
  const mine = await box(conflicted, 'place').inputValue();
  const theirs = await box(other, 'place').inputValue();
  assert.notEqual(mine, theirs);
  await conflicted.locator('hoop-bar').getByRole('button', { name: 'Keep mine as a copy' }).click();
  await saved(conflicted);
  assert.equal(await box(conflicted, 'place').inputValue(), mine);
  assert.notEqual(new URL(conflicted.url()).search, new URL(other.url()).search);
  await other.reload();
  await saved(other);
  assert.equal(await box(other, 'place').inputValue(), theirs, 'what was acknowledged stays');
});

test('in a conflict the other tab\'s can be shown instead', async () => {
  const one = await visit.open('specify.html');
  await saved(one);
  const two = await visit.open(`specify.html${new URL(one.url()).search}`);
  await saved(two);
  await Promise.all([one, two].map((page) => page.evaluate(() => { BroadcastChannel.prototype.postMessage = () => {}; })));
  await edited(one, () => box(one, 'place').fill('from one'));
  await box(two, 'place').fill('from two');
  await two.locator('hoop-bar [data-keeping=conflict]').waitFor();
  await two.locator('hoop-bar').getByRole('button', { name: 'Show the other tab\'s' }).click();
  await value(box(two, 'place'), /^from one$/);
  await saved(two);
});

for (const [what, script] of [
  ['throws', () => { IDBFactory.prototype.open = () => { throw new DOMException('refused', 'SecurityError'); }; }],
  ['is missing', () => { Object.defineProperty(globalThis, 'indexedDB', { value: undefined }); }],
]) {
  test(`where storage ${what}, work goes on unsaved and the page says so`, async () => {
    // The store lives in a worker, where the test's script must go too.
    await visit.context.addInitScript(script);
    await visit.context.route(/\/assets\/engine-[^/]*\.js$/, async (route) => {
      const response = await route.fetch();
      await route.fulfill({ response, body: `(${script})();\n${await response.text()}` });
    });
    const page = await visit.open('specify.html');
    await page.locator('hoop-bar [data-keeping=unsaveable]').waitFor();
    await text(page.locator('hoop-bar .said'), /\.$/);
    await box(page, 'ring.radius').fill('0.3 m');
    // f(0,1) = j01 / (2 pi a) sqrt(T / sigma), as in specify.test.mjs.
    const f = (2.404825557695773 / (2 * Math.PI * 0.3)) * Math.sqrt(310 / 0.0695);
    await text(page.locator('[data-derived="f01"] .number'), new RegExp(f.toPrecision(4).replace('.', '\\.')));
    // The tab carries the work from page to page, though no further.
    await visit.open('modes.html', page);
    await value(box(page, 'ring.radius'), /^0\.3$/);
    await visit.open('records.html', page);
    await text(panel(page).locator('[role=alert]'), /\.$/);
    await page.locator('hoop-bar [data-keeping=unsaveable]').waitFor();
  });
}

test('the browser is asked to keep the records, and its answer is shown', async () => {
  const page = await openRecords();
  await text(page.locator('#storage-answer'), /This browser (may delete|has promised)/);
  const ask = page.getByRole('button', { name: 'Ask the browser to keep them' });
  if (await ask.count()) {
    await ask.click();
    await text(page.locator('#storage-answer'), /This browser (may delete|has promised).*used\./);
  }
});

test('settings: units of new fields, the name on taps', async () => {
  const page = await openRecords();
  await page.locator('#units').selectOption('inch-pound');
  await page.locator('#by').fill('R. Miller');
  await page.locator('#by').blur();
  await text(page.locator('[aria-labelledby=settings-title]'), /Kept\./);
  await visit.open('specify.html', page);
  await until(async () => /in$/.test(await page.locator('[data-field="ring.radius"] select').inputValue()), 'inches');
});
