// Starts Chromium for a test: a fresh profile, no traffic of its own.
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';

import { chromium } from 'playwright-core';

/** What every Chromium here is started with. */
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
