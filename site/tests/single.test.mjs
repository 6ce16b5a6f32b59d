// The single file from file://: every chapter, saves that survive a restart, what links say there.
import assert from 'node:assert/strict';
import { copyFile, mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { after, before, test } from 'node:test';
import { pathToFileURL } from 'node:url';

import { launch, newProfile, removeProfile } from './support/chromium.mjs';
import { Visit, box, edited, saved, siteDir, testdata, text, until } from './support/visit.mjs';

let dir, address, profile;
before(async () => {
  dir = await mkdtemp(path.join(tmpdir(), 'hoopsheet single '));
  const file = path.join(dir, 'hoopsheet-single.html');
  await copyFile(path.join(siteDir, 'hoopsheet-single.html'), file);
  address = pathToFileURL(file).href;
  profile = await newProfile();
});
after(async () => {
  await removeProfile(profile);
  await rm(dir, { recursive: true, force: true });
});

const args = ['--use-fake-device-for-media-stream', '--use-fake-ui-for-media-stream', '--autoplay-policy=no-user-gesture-required'];

async function start(ownProfile = profile) {
  const browser = await launch({
    profile: ownProfile, viewport: { width: 1280, height: 900 }, reducedMotion: 'reduce',
    args: [...args, `--use-file-for-fake-audio-capture=${testdata('signals', 'tap-demo.wav')}`],
  });
  const visit = new Visit(browser.context, address);
  return { visit, end: async () => { await browser.close(); visit.check(); } };
}

const turnTo = (page, name) => page.locator('nav.chapters').getByRole('link', { name, exact: true }).click();

test('every chapter opens from the list and from its address', async () => {
  const { visit, end } = await start();
  const page = await visit.open('');
  await saved(page);
  const links = page.locator('nav.chapters a');
  const count = await links.count();
  assert.ok(count >= 10, `${count} chapters`);
  for (let i = 0; i < count; i++) {
    const name = (await links.nth(i).innerText()).trim();
    await links.nth(i).click();
    await until(async () => (await page.title()).startsWith(`${name} - `) || i === 0, `the title of ${name}`);
    await page.locator('main h1').waitFor();
    assert.equal(await links.nth(i).getAttribute('aria-current'), 'page');
  }
  await text(page.locator('#offline-state'), /This file needs no network/);
  await page.goto('about:blank');
  await visit.open('#modes', page);
  await page.locator('#mode-table tbody tr').first().waitFor();
  await page.goBack();
  await end();
});

test('the whole way works, and the records survive a restart of the browser', async () => {
  const first = await start();
  const page = await first.visit.open('#specify');
  await saved(page);
  await edited(page, () => box(page, 'place').fill('from a memory stick'));
  await turnTo(page, 'Modes');
  await page.locator('#mode-table tbody tr').first().waitFor();
  await turnTo(page, 'Respond');
  await text(page.locator('#travel'), /mm/);
  await turnTo(page, 'Tap');
  await page.locator('#file').setInputFiles(testdata('signals', 'tap-demo.wav'));
  await text(page.locator('#tension'), /N\/m/);
  await page.locator('#keep-tap').click();
  await page.locator('#kept-taps tbody tr').first().waitFor();
  await saved(page);
  await first.end();

  const second = await start();
  const again = await second.visit.open('#specify');
  await saved(again);
  assert.equal(await box(again, 'place').inputValue(), 'from a memory stick');
  await turnTo(again, 'Tap');
  await again.locator('#kept-taps tbody tr').first().waitFor();
  await text(again.locator('[aria-labelledby=read]'), /44100 Hz/);
  await second.end();
});

test('links are said to open nowhere else, a file is offered, and a pasted link is read', async () => {
  const { visit, end } = await start();
  const page = await visit.open('#hand-over');
  await text(page.locator('[aria-labelledby=link-title]'), /This page is a file on this device.*Send the file/);
  await page.locator('#save-parcel').waitFor();
  const link = await until(async () => (await page.locator('#link').count()) && page.locator('#link').inputValue(), 'a link');
  const fragment = link.slice(link.indexOf('h=1.'));
  // Pasted behind the file's address.
  const pasted = await visit.open(`#${fragment}`);
  await pasted.locator('#keep-copy').waitFor();
  await text(pasted.locator('[aria-label="What this is"]'), /They agree/);
  await end();
});

test('the microphone works without a worklet, and says what that may cost', async () => {
  const own = await newProfile();
  const { visit, end } = await start(own);
  const page = await visit.open('#tap');
  await saved(page);
  await page.locator('#record').click();
  const status = page.locator('hoop-listen [role=status]');
  await until(async () => Number.parseFloat(await status.innerText()) >= 5, 'five seconds of sound');
  await page.locator('#record').click();
  await text(status, /captured in the page itself, which may have lost blocks/);
  await page.locator('#peak-table tbody tr').first().waitFor();
  await end();
  await removeProfile(own);
});
