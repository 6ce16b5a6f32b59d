// Starts Chromium for a test: a fresh profile, no traffic of its own.
import { spawn } from 'node:child_process';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import readline from 'node:readline';

import { chromium } from 'playwright-core';

/** What every start of Chromium gets. */
export const flags = [
  '--headless', '--no-sandbox', '--disable-gpu', '--disable-quic', '--no-first-run',
  '--disable-background-networking', '--disable-component-update', '--disable-sync',
];

/** The browser's binary: $CHROMIUM, else where Debian puts it. */
export const executablePath = process.env.CHROMIUM ?? '/usr/bin/chromium';

/**
 * Launches Chromium with a profile that is kept in a directory, so that it survives a restart. Returns the context and
 * `close`, which also removes the profile unless `profile` was given.
 */
export async function launch({ profile, args = [], ...options } = {}) {
  const dir = profile ?? await newProfile();
  const context = await chromium.launchPersistentContext(dir, { executablePath, args: [...flags, ...args], ...options });
  return {
    context,
    profile: dir,
    close: async () => {
      await context.close();
      if (!profile) {
        await removeProfile(dir);
      }
    },
  };
}

/** A directory for a profile. */
export function newProfile() {
  return mkdtemp(path.join(tmpdir(), 'hoopsheet-profile-'));
}

export function removeProfile(dir) {
  return rm(dir, { recursive: true, force: true, maxRetries: 5 });
}

/**
 * Starts Chromium on a profile in such a way that it can be killed as a crash kills it: `kill` gives it no time to say
 * good-bye. Playwright joins it over its debugging port.
 */
export async function launchToKill(profile) {
  const child = spawn(executablePath, [...flags, `--user-data-dir=${profile}`, '--remote-debugging-port=0', 'about:blank'], { stdio: ['ignore', 'ignore', 'pipe'] });
  const lines = readline.createInterface({ input: child.stderr });
  const endpoint = await new Promise((resolve, reject) => {
    lines.on('line', (line) => {
      const match = /DevTools listening on (ws:\S+)/.exec(line);
      if (match) {
        resolve(match[1]);
      }
    });
    child.once('exit', (code) => reject(new Error(`Chromium ended with ${code}`)));
  });
  const browser = await chromium.connectOverCDP(endpoint);
  return {
    context: browser.contexts()[0],
    kill: () => new Promise((resolve) => {
      child.once('exit', resolve);
      child.kill('SIGKILL');
    }),
  };
}
