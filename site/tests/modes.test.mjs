// Modes: the table against published ratios, choosing by keyboard, the drawing's motion, copies of the table.
import assert from 'node:assert/strict';
import { readFile } from 'node:fs/promises';
import { after, afterEach, before, beforeEach, test } from 'node:test';

import { box, openSite, saved, testdata, text, until } from './support/visit.mjs';

let site, visit, page;
before(async () => { site = await openSite(); });
after(() => site.close());
beforeEach(async () => { visit = await site.visit({ permissions: ['clipboard-read', 'clipboard-write'] }); });
afterEach(() => visit.end());

const rows = () => page.locator('#mode-table tbody tr');

async function open() {
  page = await visit.open('modes.html');
  await rows().first().waitFor();
}

/** What a button saves, as text. */
async function savedBy(button) {
  const [download] = await Promise.all([page.waitForEvent('download'), button.click()]);
  return { name: download.suggestedFilename(), text: await readFile(await download.path(), 'utf8') };
}

const actions = () => page.locator('hoop-table-actions').first();

test('ideal frequencies stand in the published ratios', async () => {
  await open();
  await page.getByLabel('Modes to list').selectOption('48');
  await until(async () => (await rows().count()) === 48, '48 rows');
  const file = await savedBy(actions().getByRole('button', { name: 'Save JSON' }));
  assert.equal(file.name, 'modes.json');
  const { modes } = JSON.parse(file.text);
  const ideal = (m, n) => modes.find((mode) => mode.m === m && mode.n === n)?.ideal;
  const { checks } = JSON.parse(await readFile(testdata('published', 'checks.json'), 'utf8'));
  let held = 0;
  for (const { quantity, arguments: [m, n], expected } of checks) {
    if (quantity !== 'frequency-ratio' || ideal(m, n) === undefined) {
      continue;
    }
    // Half a unit of the last printed digit.
    const most = 0.5 * 10 ** -expected.split('.')[1].length;
    const ratio = ideal(m, n) / ideal(0, 1);
    assert.ok(Math.abs(ratio - Number(expected)) <= most, `(${m}, ${n}): ${ratio}, published ${expected}`);
    held++;
  }
  assert.ok(held >= 10, `${held} ratios held`);
  // f(0,1) = j01 / (2 pi a) sqrt(T / sigma): 2.404825557695773 (Abramowitz & Stegun, Table 9.5) with the demonstration's
  // a = 0.45 m, T = 310 N/m, sigma = 0.0695 kg/m^2, as testdata/signals/make_signals.py computed it apart from us.
  const demo = JSON.parse(await readFile(testdata('signals', 'tap-demo.json'), 'utf8'));
  for (const { m, n, frequency } of demo.modes) {
    assert.ok(Math.abs(ideal(m, n) / frequency - 1) < 1e-12, `(${m}, ${n}): ${ideal(m, n)} Hz, SciPy ${frequency} Hz`);
  }
});

test('the table shows what the files hold', async () => {
  await open();
  await actions().getByRole('button', { name: 'Copy table' }).click();
  await text(actions().locator('[role=status]'), /Copied/);
  const copied = await page.evaluate(() => navigator.clipboard.readText());
  const csv = await savedBy(actions().getByRole('button', { name: 'Save CSV' }));
  assert.equal(csv.name, 'modes.csv');
  const lines = csv.text.trimEnd().split('\r\n');
  const tsv = copied.trimEnd().split(/\r?\n/);
  assert.equal(lines.length, 1 + await rows().count());
  assert.equal(tsv.length, lines.length);
  const heads = tsv[0].split('\t');
  const cells = tsv[1].split('\t');
  const cell = (head) => cells[heads.indexOf(head)];
  const first = await rows().first().innerText();
  assert.match(first, new RegExp(`\\(${cell('m')}, ${cell('n')}\\)`));
  for (const head of ['frequency, Hz', 'ideal, Hz']) {
    assert.ok(first.includes(`${Number(cell(head)).toPrecision(4)} Hz`), `${first} against ${head} ${cell(head)}`);
  }
});

test('distance to each line is in words, and follows what is typed', async () => {
  await open();
  // The demonstration keeps clear of 50 Hz among others: its ideal (0, 1) is at 56.8 Hz.
  const clearances = await page.locator('#mode-table .chip').allInnerTexts();
  assert.ok(clearances.length > 0 && clearances.some((c) => /^(hit|near|clear)$/.test(c)), clearances.join());
  const before = await rows().first().innerText();
  await box(page, 'tension.nominal').fill('155 N/m');
  await until(async () => (await rows().first().innerText()) !== before, 'a new first row');
  // Half the tension: ideal frequencies by sqrt(1/2), whatever the fluid does.
  await text(rows().first(), new RegExp(`${(56.80409450576739 / Math.SQRT2).toPrecision(4)} Hz`));
  await saved(page);
});

test('a mode is chosen by keyboard and drawn', async () => {
  await open();
  const drawing = page.locator('hoop-mode-drawing');
  await drawing.locator('canvas').waitFor();
  const button = page.getByRole('button', { name: 'Draw mode (2, 1)' });
  await button.focus();
  await page.keyboard.press('Enter');
  await text(page.getByRole('heading', { level: 2 }).filter({ hasText: /^Mode/ }), /\(2, 1\)/);
  assert.equal(await button.getAttribute('aria-pressed'), 'true');
  assert.match(await drawing.locator('canvas').getAttribute('aria-label'), /mode \(2, 1\): 2 nodal diameters and\s+no nodal circle/);
  // Painted: the canvas holds more than one colour.
  assert.ok(await until(() => colours(drawing.locator('canvas')), 'a painted plan') > 8);
  // It is remembered for this diaphragm.
  await saved(page);
  await page.reload();
  await text(page.getByRole('heading', { level: 2 }).filter({ hasText: /^Mode/ }), /\(2, 1\)/);
});

/** How many colours a canvas shows; 0 for an empty one. */
function colours(canvas) {
  return canvas.evaluate((element) => {
    const { data } = element.getContext('2d').getImageData(0, 0, element.width, element.height);
    const seen = new Set();
    for (const pixel of new Uint32Array(data.buffer)) {
      seen.add(pixel);
    }
    return seen.size > 1 ? seen.size : 0;
  });
}

const path = () => page.locator('hoop-mode-drawing .now').getAttribute('d');

test('the motion can be paused and goes on', async () => {
  await open();
  const drawing = page.locator('hoop-mode-drawing');
  await drawing.getByRole('button', { name: 'Pause' }).waitFor();
  const moving = await until(path, 'a section');
  await until(async () => (await path()) !== moving, 'motion');
  await drawing.getByRole('button', { name: 'Pause' }).click();
  await drawing.getByRole('button', { name: 'Move' }).waitFor();
  const still = await path();
  await page.evaluate(() => new Promise((done) => { let left = 30; const step = () => (left-- > 0 ? requestAnimationFrame(step) : done()); step(); }));
  assert.equal(await path(), still);
  await drawing.getByRole('button', { name: 'Move' }).click();
  await until(async () => (await path()) !== still, 'motion again');
  const section = drawing.getByRole('button', { name: /Section at/ });
  await section.click();
  await text(section, /Section at 15°/);
});

test('with reduced motion asked for, nothing moves until it is told to', async () => {
  await visit.context.close();
  visit = await site.visit({ reducedMotion: 'reduce' });
  await open();
  const drawing = page.locator('hoop-mode-drawing');
  await drawing.getByRole('button', { name: 'Move' }).waitFor();
  const still = await until(path, 'a section');
  await page.evaluate(() => new Promise((done) => { let left = 30; const step = () => (left-- > 0 ? requestAnimationFrame(step) : done()); step(); }));
  assert.equal(await path(), still);
  await drawing.getByRole('button', { name: 'Move' }).click();
  await until(async () => (await path()) !== still, 'motion');
});

/** Opens Specify, edits, and comes to Modes. */
async function specified(...steps) {
  page = await visit.open('specify.html');
  await box(page, 'ring.radius').waitFor();
  for (const details of await page.locator('hoop-specify details').all()) {
    await details.evaluate((element) => { element.open = true; });
  }
  for (const [field, value] of steps) {
    if (value === undefined) {
      await page.getByRole('button', { name: field }).click();
    } else {
      await box(page, field).fill(value);
    }
  }
  await saved(page);
  page = await visit.open('modes.html');
  await rows().first().waitFor();
}

/** The modes as the page saves them, once they are no longer rough. */
async function listed() {
  await page.locator('#rough').waitFor({ state: 'detached' });
  return JSON.parse((await savedBy(actions().getByRole('button', { name: 'Save JSON' }))).text);
}

test('uneven tension shows both of a pair, the split and the angle', async () => {
  await specified(['Add a harmonic'], ['tension.harmonics.0.epsilon', '10 %'], ['tension.harmonics.0.angle', '30']);
  await page.locator('#tautness').waitFor();
  const { modes, smallest } = await listed();
  const pair = modes.filter((mode) => mode.m === 1 && mode.n === 1);
  assert.equal(pair.length, 2);
  // k = 2 splits (1, 1) by half of its amplitude at first order, dry; a fluid that moves along weighs on both alike but for
  // a few percent of the split, and the second order is the square of the amplitude.
  assert.ok(Math.abs(pair[0].split - 0.05) < 0.01 + 0.005, `split ${pair[0].split}`);
  assert.equal(pair[0].partner, pair[1].frequency);
  // The lower one has its nodal line along the strong pull, at 30 degrees.
  const lower = pair.find((mode) => !mode.upper);
  assert.ok(Math.abs((lower.nodalAngle * 180) / Math.PI - 30) < 0.1, `nodal line at ${lower.nodalAngle} rad`);
  assert.ok(smallest.share > 0.89 && smallest.share < 0.91, `smallest tension ${smallest.share} of the mean`);
  const shown = rows().filter({ hasText: '(1, 1)' }).first();
  await text(shown, /lower of a pair split by .* Hz .*; the other at/);
  await text(shown, /one at 30°/);
  await page.getByRole('button', { name: 'Draw mode (1, 1), upper of the pair' }).click();
  await text(page.locator('#mode-figures'), /the other of its pair/);
  await text(page.locator('#mode-figures'), /error of the computation/);
  assert.match(await page.locator('hoop-mode-drawing canvas').getAttribute('aria-label'), /close to/);
  // The costs of this mode end with the unevenness.
  await text(page.locator('#costs tr').last(), /unevenness/);
  await page.locator('hoop-mode-costs details').evaluate((element) => { element.open = true; });
  await text(page.locator('#sensitivities'), /amplitude of harmonic k = 2/);
  // Taken out, the pair is one again, and the page says so.
  await page.getByLabel('unevenness').uncheck();
  await page.locator('#tautness').waitFor({ state: 'detached' });
  assert.equal((await listed()).modes.filter((mode) => mode.m === 1 && mode.n === 1).length, 1);
  await page.locator('.caution').filter({ hasText: 'left out the unevenness' }).waitFor();
});

test('a patch lowers the modes, and its removal can be undone', async () => {
  await open();
  const before = (await listed()).modes[0].frequency;
  await specified(['Add a patch'], ['attached.patches.0.mass', '4 g']);
  await page.locator('#costs').filter({ hasText: 'attached masses' }).waitFor();
  const { modes } = await listed();
  assert.ok(modes[0].frequency < before && modes[0].frequency > 0.9 * before, `${modes[0].frequency} Hz against ${before} Hz`);
  assert.ok(modes[0].error < 1e-3 * modes[0].frequency, `error ${modes[0].error} Hz`);
  page = await visit.open('specify.html');
  await page.getByRole('button', { name: 'Remove patch 1' }).click();
  await page.getByRole('button', { name: 'Undo' }).click();
  await until(async () => (await box(page, 'attached.patches.0.mass').count()) === 1 && (await box(page, 'attached.patches.0.mass').inputValue()) === '4', 'the patch of 4 g');
});

test('wrinkling is refused in words', async () => {
  await specified(['tension.weftRatio', '0.2'], ['Add a harmonic'], ['tension.harmonics.0.epsilon', '60 %']);
  await text(page.locator('p.error'), /the sheet wrinkles: the smallest is -?[0-9.]+ of the mean/);
});

test('a hub gives the modes of the annulus and says what is left out', async () => {
  await specified(['ring.hubRadius', '225 mm']);
  const { modes, applies } = await listed();
  // Half the radius: J_0(x) Y_0(x/2) = J_0(x/2) Y_0(x) has x = 2 * 3.1230 (Abramowitz & Stegun, Table 9.7), against j_01.
  const lowest = modes.find((mode) => mode.m === 0 && mode.n === 1);
  assert.ok(Math.abs(lowest.frequency / lowest.ideal / (6.246 / 2.404825557695773) - 1) < 0.0001 / 6.246 + 1e-6);
  assert.deepEqual(applies, []);
  await text(page.locator('.caution').first(), /only the ideal sheet between hub and ring is computed. Left out: bending stiffness, the fluid/);
});

test('the list shows only what is asked for, and copies that', async () => {
  await open();
  const all = await rows().count();
  await page.locator('#filter').selectOption('2');
  await until(async () => (await rows().count()) < all, 'fewer modes');
  for (const words of await rows().allInnerTexts()) {
    assert.match(words, /^\(2, /);
  }
  await text(page.locator('#filtered'), /are shown/);
  await page.locator('#filter').selectOption('close');
  await until(async () => (await rows().allInnerTexts()).every((words) => /near|hit|below the lowest/.test(words)), 'those close to a line');
  await page.locator('#filter').selectOption('all');
  await until(async () => (await rows().count()) === all, 'all of them');
});
