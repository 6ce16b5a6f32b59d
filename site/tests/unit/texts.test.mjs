// Texts of the pages: figures, tables as TSV and CSV, what Respond remembers, the file of a recording.
import assert from 'node:assert/strict';
import { test } from 'node:test';

import { wavFile } from '../../.cache/ts/capture/wav-file.js';
import { brief, figure, percent } from '../../.cache/ts/elements/number-text.js';
import { asCsv, asTsv } from '../../.cache/ts/elements/table-copy.js';
import { controlsOf, firstSetup, kindNames, placeTexts, readItems } from '../../.cache/ts/respond/setup.js';

test('figures', () => {
  for (const [value, digits, words] of [
    [0, 4, '0'], [56.804, 4, '56.80'], [-56.804, 3, '−56.8'], [1234.5678, 4, '1235'], [0.00123, 2, '0.0012'], [999.96, 4, '1000'],
    [NaN, 4, '–'], [Infinity, 4, '–'], [2.5e7, 3, '2.50 × 10⁷'], [-2.5e-7, 2, '−2.5 × 10⁻⁷'],
  ]) {
    assert.equal(figure(value, digits), words);
  }
  assert.equal(brief(50), '50');
  assert.equal(brief(171.5), '171.5');
  assert.equal(brief(1000), '1000');
  assert.equal(percent(0.0523, 2), '5.2 %');
  assert.equal(percent(0.0523, 2, true), '+5.2 %');
  assert.equal(percent(-0.0523, 2), '−5.2 %');
});

const table = { name: 't', heads: ['a', 'b, c'], rows: [['say "hm"', 1.5], ['two\nlines', -3], ['=SUM(A1)', '-x'], ['\ttab', '+1']] };

test('CSV as in RFC 4180, and no cell runs as a formula', () => {
  assert.equal(asCsv(table), 'a,"b, c"\r\n"say ""hm""",1.5\r\n"two\nlines",-3\r\n\'=SUM(A1),\'-x\r\n\ttab,\'+1\r\n');
});

test('TSV has as many lines and columns as the table', () => {
  const lines = asTsv(table).trimEnd().split('\r\n');
  assert.equal(lines.length, 5);
  assert.ok(lines.every((line) => line.split('\t').length === 2), JSON.stringify(lines));
});

test('places dragged on the plan become texts that stay on the sheet', () => {
  assert.deepEqual(placeTexts(0.7, (200 * Math.PI) / 180), { radius: '0.7', angle: '200°' });
  assert.deepEqual(placeTexts(1.4, -Math.PI / 2), { radius: '0.98', angle: '270°' });
  assert.deepEqual(placeTexts(0, 0), { radius: '0', angle: '0°' });
});

test('only the controls that a start has are read', () => {
  const setup = firstSetup();
  const fields = (kind) => readItems({ ...setup, points: [], displacement: { ...setup.displacement, kind } }).map((i) => i.field);
  assert.deepEqual(fields('rest'), []);
  assert.deepEqual(fields('bulge'), ['displacement.peak']);
  assert.deepEqual(fields('point'), ['displacement.peak', 'displacement.radius', 'displacement.angle', 'displacement.width']);
  for (const part of ['displacement', 'velocity']) {
    for (const kind of Object.keys(kindNames[part])) {
      assert.equal(typeof controlsOf(kind).peak, 'boolean');
    }
  }
});

test('a recording is written as a WAV file of 32-bit floats', () => {
  // Layout: RIFF/WAVE, Multimedia Programming Interface and Data Specifications 1.0 (1991); format 3 is IEEE float.
  const bytes = wavFile([new Float32Array([0, 0.5]), new Float32Array([-1])], 44100);
  const view = new DataView(bytes.buffer);
  const text = (at) => String.fromCharCode(...bytes.slice(at, at + 4));
  assert.deepEqual([text(0), text(8), text(12), text(36)], ['RIFF', 'WAVE', 'fmt ', 'data']);
  assert.equal(view.getUint32(4, true), bytes.length - 8);
  assert.equal(view.getUint16(20, true), 3);
  assert.equal(view.getUint32(24, true), 44100);
  assert.equal(view.getUint32(28, true), 4 * 44100);
  assert.equal(view.getUint32(40, true), 12);
  assert.deepEqual([44, 48, 52].map((at) => view.getFloat32(at, true)), [0, 0.5, -1]);
});
