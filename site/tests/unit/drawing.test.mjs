// What the drawings are made of: contours, polar frames on a square raster, sections, the player.
import assert from 'node:assert/strict';
import { test } from 'node:test';

import { contour } from '../../.cache/ts/draw/contour.js';
import { PolarRaster, polarSection } from '../../.cache/ts/draw/polar.js';
import { sectionPath } from '../../.cache/ts/draw/section.js';
import { Player } from '../../.cache/ts/respond/player.js';

const raster = (size, f) => Float32Array.from({ length: size * size }, (_, i) => f(i % size, Math.floor(i / size)));

test('the contour of a cone is its circle', () => {
  const size = 64;
  const centre = (size - 1) / 2;
  const pieces = contour(raster(size, (x, y) => Math.hypot(x - centre, y - centre)), size, 20);
  assert.ok(pieces.length > 0);
  let length = 0;
  for (let i = 0; i < pieces.length; i += 4) {
    for (const at of [i, i + 2]) {
      // Along an edge of a cell the cone is bent by at most 1 / (8 R): linear interpolation errs by no more.
      assert.ok(Math.abs(Math.hypot(pieces[at] - centre, pieces[at + 1] - centre) - 20) < 1 / (8 * 19), `${pieces[at]}, ${pieces[at + 1]}`);
    }
    length += Math.hypot(pieces[i + 2] - pieces[i], pieces[i + 3] - pieces[i + 1]);
  }
  // Chords of at most sqrt(2) on R = 20: shorter than the circle by (chord / R)^2 / 24 at most.
  assert.ok(length < 40 * Math.PI * 1.01 && length > 40 * Math.PI * (1 - 2 / 400 / 24 - 0.01), `${length}`);
});

test('contours keep off values that are not finite, and a saddle is joined by its mean', () => {
  assert.equal(contour(new Float32Array([1, -1, NaN, 1]), 2, 0).length, 0);
  // Corners + - / - +, all alike: two pieces; which corners they cut off follows the mean.
  const cutsFirst = (values) => {
    const pieces = contour(new Float32Array(values), 2, 0);
    assert.equal(pieces.length, 8);
    return [...pieces.slice(0, 4)].every((v) => v >= 0 && v <= 1) && pieces[0] === 0 && pieces[3] === 0;
  };
  assert.equal(cutsFirst([1, -2, -2, 1]), true, 'a negative mean separates the positive corners');
  assert.equal(cutsFirst([2, -1, -1, 2]), false, 'a positive mean joins them');
});

test('a polar frame of a plane is that plane on the raster', () => {
  const radii = 41;
  const angles = 80;
  const frame = new Float32Array(radii * angles);
  for (let j = 0; j < radii; j++) {
    for (let k = 0; k < angles; k++) {
      frame[j * angles + k] = (j / (radii - 1)) * Math.cos((2 * Math.PI * k) / angles);
    }
  }
  const size = 60;
  const polar = new PolarRaster(size, radii, angles);
  const filled = polar.fill(frame, 0);
  for (let y = 0; y < size; y++) {
    for (let x = 0; x < size; x++) {
      const u = (2 * x + 1) / size - 1;
      const v = 1 - (2 * y + 1) / size;
      if (Math.hypot(u, v) > 1) {
        continue;
      }
      // Linear in the radius; in the angle r cos is interpolated over steps of 2 pi / 80: (2 pi / 80)^2 / 8 at most.
      assert.ok(Math.abs(filled[y * size + x] - u) < (2 * Math.PI / angles) ** 2 / 8 + 1e-6, `${x}, ${y}`);
    }
  }
  assert.ok(Number.isNaN(filled[0]), 'the corner is outside the disc');

  const section = polarSection(frame, 0, radii, angles, 0);
  assert.equal(section.length, 2 * radii - 1);
  assert.deepEqual([section[0], section[radii - 1], section[2 * radii - 2]].map((v) => Math.round(v * 1e6) / 1e6), [-1, 0, 1]);
  const across = polarSection(frame, 0, radii, angles, Math.PI / 2);
  assert.ok(across.every((v) => Math.abs(v) < 1e-6));
});

test('a section is drawn rim to rim, up is up', () => {
  assert.equal(sectionPath(new Float32Array([0, 1, 0]), 1, 1, 104, 28, 2), 'M2.0 14.0L52.0 4.0L102.0 14.0');
  assert.equal(sectionPath(new Float32Array([0, 1, 0]), -1, 1, 104, 28, 2), 'M2.0 14.0L52.0 24.0L102.0 14.0');
  assert.equal(sectionPath(new Float32Array([1]), 1, 1, 100, 28, 2), '');
});

test('the player goes forwards and starts again', () => {
  const player = new Player(10, 0.5);
  player.advance(0.5, 1);
  assert.equal(player.frame, 4);
  for (let i = 0; i < 1000; i++) {
    player.advance(0.037, 1);
    assert.ok(player.frame >= 0 && player.frame < 10);
  }
  player.position = 9;
  player.load(5, 0.25);
  assert.equal(player.frame, 4);
  assert.equal(player.slowness(9), 36);
});
