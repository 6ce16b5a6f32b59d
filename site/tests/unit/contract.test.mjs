// The committed TypeScript types are those that follow from the committed schema.
import assert from 'node:assert/strict';
import { readFile } from 'node:fs/promises';
import { test } from 'node:test';

import { contractTypes } from '../../contract/types.mjs';

test('site/src/contract.ts is fresh', async () => {
  const committed = await readFile(new URL('../../src/contract.ts', import.meta.url), 'utf8');
  assert.ok(await contractTypes() === committed, 'site/src/contract.ts is older than contract.schema.json: run make generate');
});
