// The built site, served, with pages on which the engine can be asked directly.
import { access } from 'node:fs/promises';
import path from 'node:path';

import { root, serve } from './server.mjs';

/** Where the built site is: $HOOPSHEET_SITE, else site/dist. */
export const siteDir = process.env.HOOPSHEET_SITE ?? path.join(root, 'site/dist');

/** Serves the built site. */
export async function serveSite(options) {
  await access(path.join(siteDir, 'hoopsheet.js')).catch(() => {
    throw new Error(`${siteDir} holds no site: build it first (make build)`);
  });
  return serve(siteDir, options);
}

/**
 * A page of the site's origin with nothing on it but the module hoopsheet.js. Its functions `ask` and `keep` call the
 * engine and the store, and `states` collects what the status says.
 */
export async function enginePage(context, address) {
  const page = await context.newPage();
  const url = new URL('blank.html', address).href;
  await page.route(url, (route) => route.fulfill({ contentType: 'text/html', body: '<!doctype html><title>blank</title>' }));
  await page.goto(url);
  await page.evaluate(async () => {
    const { engine } = await import(new URL('hoopsheet.js', location.href).href);
    globalThis.engine = engine;
    globalThis.states = [];
    engine.addEventListener('status', () => globalThis.states.push({ ...engine.status }));
  });
  return {
    page,
    /** Result of a call to the engine; rejects when it is refused. */
    ask: (name, request = {}, options = {}) => result(page.evaluate(([n, r, o]) => globalThis.engine.call(n, r, o), [name, request, options])),
    /** Result of a call to the store; rejects when it is refused. */
    keep: (name, request = {}) => result(page.evaluate(([n, r]) => globalThis.engine.store(n, r), [name, request])),
    /** Outcome of a call to the store. */
    tell: (name, request = {}) => page.evaluate(([n, r]) => globalThis.engine.store(n, r), [name, request]),
  };
}

async function result(answer) {
  const outcome = await answer;
  if (outcome.kind !== 'result') {
    throw new Error(`${outcome.kind}: ${outcome.problems?.map((p) => `${p.code} ${p.message}`).join(' ')}`);
  }
  return outcome.result;
}

/** Puts code before the worker's own, which no test could reach otherwise. */
export async function beforeWorker(context, code) {
  await context.route(/\/assets\/engine-[^/]*\.js$/, async (route) => {
    const response = await route.fetch();
    await route.fulfill({ response, body: `${code}\n${await response.text()}` });
  });
}
