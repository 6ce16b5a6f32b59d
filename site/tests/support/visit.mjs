/**
 * The built site in Chromium, watched: whatever a page does that it must not - a request to elsewhere, a violation of
 * its policy, an error on the console - fails the test that caused it.
 */
import assert from 'node:assert/strict';
import path from 'node:path';

import { chromium } from 'playwright-core';

import { executablePath, flags } from './chromium.mjs';
import { serveSite, siteDir } from './engine-page.mjs';
import { root, serve } from './server.mjs';

export { siteDir };

/** A file of testdata/. */
export const testdata = (...names) => path.join(root, 'testdata', ...names);

/** Longest wait for anything that must happen, ms. The machine may be busy; no test is about this time. */
export const patience = Number(process.env.PATIENCE ?? 40_000);

/**
 * One server and one browser for a test file. Each `visit` is a fresh profile; `close` ends everything. `args` are
 * further flags of the browser; `dir` is another copy of the site.
 */
export async function openSite({ prefix = '/', args = [], dir } = {}) {
  const server = dir ? await serve(dir, { prefix }) : await serveSite({ prefix });
  const browser = await chromium.launch({ executablePath, args: [...flags, ...args] });
  return {
    server,
    address: server.address,
    browser,
    async visit(options = {}) {
      const context = await browser.newContext({ viewport: { width: 1280, height: 900 }, ...options });
      return new Visit(context, server.address);
    },
    async close() {
      await browser.close();
      await server.stop();
    },
  };
}

/** A profile on the site. */
export class Visit {
  faults = [];
  #allowed = [];

  constructor(context, address) {
    this.context = context;
    this.address = address;
    context.setDefaultTimeout(patience);
    this.origins = new Set([new URL(address).origin]);
    context.on('request', (request) => {
      const url = new URL(request.url());
      if (!['data:', 'blob:', 'about:', 'file:'].includes(url.protocol) && !this.origins.has(url.origin)) {
        this.faults.push(`a request left the origin: ${request.url()}`);
      }
    });
    context.on('console', (message) => {
      if (message.type() === 'error' || /Content.Security.Policy/.test(message.text())) {
        this.faults.push(`console: ${message.text()} (${message.location().url})`);
      }
    });
    context.on('weberror', (error) => this.faults.push(`uncaught: ${error.error().stack ?? error.error().message}`));
  }

  /** Faults that match are what this test is about. */
  allow(pattern) {
    this.#allowed.push(pattern);
  }

  /** Opens a page of the site by its name and file ending: "modes.html". */
  async open(name, page) {
    page ??= await this.context.newPage();
    await page.goto(new URL(name, this.address).href);
    return page;
  }

  /** Ends the visit, and fails if a page did what it must not. */
  async end() {
    await this.context.close();
    this.check();
  }

  check() {
    const faults = this.faults.filter((fault) => !this.#allowed.some((pattern) => pattern.test(fault)));
    this.faults = [];
    assert.deepEqual(faults, []);
  }
}

/** Waits until `probe` gives something true, asking again and again. */
export async function until(probe, what = 'it') {
  const end = Date.now() + patience;
  for (;;) {
    const answer = await probe();
    if (answer) {
      return answer;
    }
    if (Date.now() > end) {
      assert.fail(`${what} did not come about`);
    }
    await new Promise((resolve) => setTimeout(resolve, 50));
  }
}

/** The row of a field on Specify or Modes, or of a typed control with the same attribute. */
export const field = (page, name) => page.locator(`[data-field="${name}"]`);

/** The text box of a field. */
export const box = (page, name) => field(page, name).locator('#box');

/** Waits until the bar says that the working copy is on the device. */
export const saved = (page) => page.locator('hoop-bar [data-keeping=saved]').waitFor();

/**
 * Does one thing that changes the working copy, and waits until it has been saved since. (That a save is due or runs may
 * have passed before a test looks.)
 */
export async function edited(page, change) {
  const bar = page.locator('hoop-bar [data-stamp]');
  const before = Number(await bar.getAttribute('data-stamp'));
  await change();
  await until(async () => Number(await bar.getAttribute('data-stamp')) > before, 'a save');
  await saved(page);
}

/** Waits until the text of an element matches, and gives it with white space made single. */
export async function text(locator, pattern) {
  let last = '';
  try {
    await until(async () => {
      last = (await locator.allInnerTexts()).join(' ').replace(/\s+/g, ' ').trim();
      return pattern.test(last);
    }, `text like ${pattern}`);
  } catch (error) {
    error.message += `; last read: ${last.slice(0, 400)}`;
    throw error;
  }
  return last;
}

/** Waits until a box holds a value that matches, and gives it. */
export async function value(locator, pattern) {
  let last = '';
  try {
    await until(async () => pattern.test(last = await locator.inputValue()), `value like ${pattern}`);
  } catch (error) {
    error.message += `; last read: ${last}`;
    throw error;
  }
  return last;
}
