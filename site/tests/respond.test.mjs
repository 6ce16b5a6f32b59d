// Respond: every kind of start, formulas, dragging on the drawing, travel, missed energy.
import assert from 'node:assert/strict';
import { after, afterEach, before, beforeEach, test } from 'node:test';

import { box, field, openSite, saved, text, until, value } from './support/visit.mjs';

let site, visit, page;
before(async () => { site = await openSite(); });
after(() => site.close());
beforeEach(async () => {
  visit = await site.visit({ reducedMotion: 'reduce' });
  page = await visit.open('respond.html');
  await text(travel(), /mm/);
});
afterEach(() => visit.end());

const travel = () => page.locator('#travel');
const missed = () => page.locator('#missed');
const drawing = () => page.locator('hoop-respond-drawing');

/** The whole answer: travel, energy, missed energy, and the modes that matter. */
const answer = async () => (await page.locator('hoop-respond dl, #matter-title ~ .table-scroll').allInnerTexts()).join(' ').replace(/\s+/g, ' ');

/** Waits for an answer other than the one before, and gives it. */
async function other(before) {
  return until(async () => {
    const now = await answer();
    return now !== before && now;
  }, 'another answer');
}

async function choose(part, kind) {
  const before = await answer();
  await page.locator(`#kind-${part}`).selectOption(kind);
  return other(before);
}

test('each kind of start gives an answer of its own', async () => {
  const seen = new Set([await answer()]);
  for (const [part, kind] of [['displacement', 'bulge'], ['displacement', 'bump'], ['displacement', 'formula'], ['velocity', 'patch'], ['velocity', 'bump'],
    ['velocity', 'bulge']]) {
    seen.add(await choose(part, kind));
    assert.match(await missed().innerText(), /[\d.]+ % of the energy/);
  }
  // The formula offered first is that of the bulge, so the answer changes with another one only.
  const before = await answer();
  await page.locator('#kind-velocity').selectOption('formula');
  await box(page, 'velocity.formula').fill('r * (1 - r)');
  seen.add(await other(before));
  assert.equal(seen.size, 8);
});

test('flat and at rest moves nothing, and says so', async () => {
  await page.locator('#kind-displacement').selectOption('rest');
  await until(async () => /^0 mm|nothing|at rest/i.test((await page.locator('hoop-respond .panel').allInnerTexts()).join(' ')), 'words on a sheet at rest');
});

test('a released bulge passes its own height at the centre', async () => {
  await choose('displacement', 'bulge');
  const before = await answer();
  await box(page, 'displacement.peak').fill('2 mm');
  const words = await other(before);
  // 1 - r^2 let go on an ideal sheet without damping passes the centre at 1.214 of its height first and never above
  // 1.3575 (computed for this project from the series of Bessel functions); damping and air can only take from it. It
  // is never less than its start.
  const [, figure] = /largest travel (−?[\d.]+) mm/.exec(words);
  const height = Math.abs(Number(figure.replace('−', '-')));
  assert.ok(height >= 2 && height <= 1.3575 * 2, words);
});

test('missed energy falls as more modes are used', async () => {
  const share = async () => Number(/([\d.]+(?: × 10[⁻⁰¹²³⁴⁵⁶⁷⁸⁹]+)?) % of the energy/.exec((await missed().innerText()).replace(/\s+/g, ' '))[1]);
  let before = await choose('displacement', 'bump');
  await page.locator('#orders').selectOption('8');
  before = await other(before);
  const few = await share();
  await page.locator('#orders').selectOption('12');
  await other(before);
  const more = await share();
  assert.ok(few > 0 && more > 0 && more < few, `${few} % with few modes, ${more} % with more`);
});

test('a formula is read, and its fault is pointed at', async () => {
  await choose('displacement', 'formula');
  const before = await answer();
  const formula = field(page, 'displacement.formula');
  await formula.locator('#box').fill('(1 - r^2) * cos(2 * theta)');
  const sound = await other(before);
  await formula.locator('#box').fill('(1 - r^2) * wobble(r)');
  await formula.locator('#box').blur();
  await text(formula.locator('#problem'), /wobble.*\.$/);
  const caret = await formula.locator('pre').innerText();
  const [line, mark] = caret.split('\n');
  assert.equal(line.indexOf('wobble'), mark.indexOf('▲'), caret);
  assert.equal(await answer(), sound, 'the last sound answer stays');
  for (const bad of ['1/r', '', '(1 - r^2', 'cos(2 theta)', 'r^^2', '1 - r^2 + sqrt(-1)']) {
    await formula.locator('#box').fill(bad);
    await formula.locator('#box').blur();
    await text(formula.locator('#problem'), /\.$/);
    assert.equal(await formula.locator('#box').inputValue(), bad);
  }
  await formula.locator('#box').fill('1 - r^2');
  await formula.locator('#problem').waitFor({ state: 'hidden' });
});

/** A place on the plan, in pixels of the page. The ring takes 0.46 of the canvas's width. */
async function spot(radius, degrees) {
  const canvas = drawing().locator('canvas');
  await canvas.scrollIntoViewIfNeeded();
  const b = await canvas.boundingBox();
  const angle = (degrees * Math.PI) / 180;
  return [b.x + b.width / 2 + 0.46 * b.width * radius * Math.cos(angle), b.y + b.height / 2 - 0.46 * b.width * radius * Math.sin(angle)];
}

async function drag(from, to) {
  await page.mouse.move(...await spot(...from));
  await page.mouse.down();
  const [x0, y0] = await spot(...from);
  const [x1, y1] = await spot(...to);
  for (let i = 1; i <= 8; i++) {
    await page.mouse.move(x0 + ((x1 - x0) * i) / 8, y0 + ((y1 - y0) * i) / 8);
  }
  await page.mouse.up();
}

test('points and the place of the start are dragged on the plan', async () => {
  // Point 2 starts at 0.5, 120 degrees; the pull at 0.4, 30 degrees.
  await drag([0.5, 120], [0.7, 200]);
  const radius = Number(await value(box(page, 'points.1.radius'), /^0\.(69|7|71)/));
  assert.ok(Math.abs(radius - 0.7) <= 0.02, `${radius}`);
  const angle = Number.parseFloat(await box(page, 'points.1.angle').inputValue());
  assert.ok(Math.abs(angle - 200) <= 2, `${angle}`);
  const before = await answer();
  await drag([0.4, 30], [0.3, 300]);
  const pulled = Number(await value(box(page, 'displacement.radius'), /^0\.(29|3|31)/));
  assert.ok(Math.abs(pulled - 0.3) <= 0.02, `${pulled}`);
  await other(before);
  // Press on an empty place: a third point.
  await page.mouse.click(...await spot(0.8, 80));
  await box(page, 'points.2.radius').waitFor();
  assert.match(await box(page, 'points.2.radius').inputValue(), /^0\.(79|8|81)/);
  await saved(page);
  await page.reload();
  await value(box(page, 'points.2.radius'), /^0\.(79|8|81)/);
  await page.getByRole('button', { name: 'Remove point 3' }).click();
  await box(page, 'points.2.radius').waitFor({ state: 'detached' });
});

test('the history has a curve a point, and the motion plays, steps and stops', async () => {
  await page.locator('#history canvas').waitFor();
  const legend = await page.locator('#history').innerText();
  assert.match(legend, /point 1[\s\S]*point 2/);
  const clock = drawing().locator('.clock');
  const start = await text(clock, /ms after the start/);
  await drawing().getByRole('button', { name: 'one step on' }).click();
  const stepped = await until(async () => { const now = await clock.innerText(); return now !== start && now; }, 'a step');
  await drawing().getByRole('button', { name: 'Move' }).click();
  await until(async () => (await clock.innerText()) !== stepped, 'motion');
  await drawing().getByRole('button', { name: 'Pause' }).click();
  await drawing().getByRole('button', { name: 'Largest travel' }).click();
  await text(clock, /largest travel of each place/);
  // By keyboard: the slider of time.
  await drawing().locator('#scrub').focus();
  await page.keyboard.press('End');
  assert.equal(await drawing().locator('#scrub').inputValue(), await drawing().locator('#scrub').getAttribute('max'));
});

test('what cannot be read stays and is explained', async () => {
  for (const [name, bad] of [['displacement.peak', 'high'], ['displacement.radius', '1.4'], ['points.0.angle', 'left']]) {
    await box(page, name).fill(bad);
    await box(page, name).blur();
    await text(field(page, name).locator('#problem'), /\.$/);
    assert.equal(await box(page, name).inputValue(), bad);
  }
});

test('tells what moves each point and how long the energy takes to fall', async () => {
  await text(page.locator('#energy-down'), /^[\d.]+ s after the last load$/);
  await text(page.locator('.movers').first(), /^\(\d+, \d+\) [\d.]+ %/);
});
