// Measures in Chromium, on the built site, how fast frames of a response come and are drawn. Prints lines of JSON; the
// argument is the module that draws.
import { readFile } from 'node:fs/promises';

import { launch } from '../tests/support/chromium.mjs';
import { enginePage, serveSite } from '../tests/support/engine-page.mjs';

const drawing = await readFile(process.argv[2], 'utf8');
const server = await serveSite();
const browser = await launch();
try {
  const { page } = await enginePage(browser.context, server.address);
  await page.route('**/drawing.js', (route) => route.fulfill({ contentType: 'text/javascript', body: drawing }));
  for (const line of await page.evaluate(measure)) {
    console.log(JSON.stringify(line));
  }
} finally {
  await browser.close();
  await server.stop();
}

async function measure() {
  const lines = [];
  const ask = async (name, request) => {
    const answer = await engine.call(name, request);
    if (answer.kind !== 'result') {
      throw new Error(JSON.stringify(answer));
    }
    return answer.result;
  };
  const median = (list) => list.sort((a, b) => a - b)[list.length >> 1];
  const { document: diaphragm } = await ask('demo', {});
  const shape = (kind, peak) => ({ kind, peak, radius: 0.4, angle: 0.5, width: 0.1, formula: '' });
  const radii = 128;
  const angles = 256;
  const respond = {
    document: diaphragm, displacement: shape('point', 0.005), velocity: shape('rest', 0),
    without: ['stiffness', 'fluid', 'sound', 'cavity', 'masses', 'unevenness'],
    orders: 39, circles: 40, duration: 0, frames: 2000, stream: true, radii, angles, points: [],
  };

  // A first call also lets the browser compile the program well.
  const whole = [];
  let result;
  for (let i = 0; i < 3; i++) {
    respond.displacement.radius = 0.4 + i / 50;
    const start = performance.now();
    result = await ask('respond', respond);
    whole.push((performance.now() - start) / 1000);
  }
  lines.push({ name: 'envelope over 2,000 frames, largest travel, energies', seconds: median(whole), goal: '7 s' });

  const step = result.times[1];
  for (const count of [1, 8, 32]) {
    const each = [];
    for (let i = 0; i < 15; i++) {
      const start = performance.now();
      await ask('frames', { respond, from: step * count * i, step, count });
      each.push((performance.now() - start) / 1000 / count);
    }
    lines.push({ name: `a frame, asked for ${count === 1 ? 'alone' : `with ${count - 1} others`}`, seconds: median(each), goal: '3 ms' });
  }

  // The replay: frames asked for eight at a time, ahead of what is drawn.
  const { PolarRaster, paint, signedMap } = await import(new URL('drawing.js', location.href).href);
  const size = 320;
  const canvas = document.createElement('canvas');
  canvas.width = canvas.height = size;
  document.body.append(canvas);
  const context = canvas.getContext('2d');
  const image = context.createImageData(size, size);
  const pixels = new Uint32Array(image.data.buffer);
  const map = signedMap({ paper: [255, 255, 255], down: [160, 60, 20], up: [0, 110, 120] });
  const raster = new PolarRaster(size, radii, angles);
  const chunk = 8;
  const chunks = new Map();
  const want = (k) => {
    if (!chunks.has(k)) {
      chunks.set(k, null);
      ask('frames', { respond, from: step * chunk * k, step, count: chunk }).then(({ motion }) => chunks.set(k, motion));
    }
  };
  const painting = [];
  let drawn = 0;
  let late = 0;
  const seconds = await new Promise((resolve) => {
    const began = performance.now();
    const tick = (now) => {
      const k = Math.floor(drawn / chunk);
      want(k);
      want(k + 1);
      const frames = chunks.get(k);
      if (frames) {
        const start = performance.now();
        paint(pixels, raster.fill(frames, (drawn % chunk) * radii * angles), 1, 0.005, map);
        context.putImageData(image, 0, 0);
        painting.push((performance.now() - start) / 1000);
        drawn++;
        chunks.delete(k - 1);
      } else {
        late++;
      }
      if (now - began < 5000) {
        requestAnimationFrame(tick);
      } else {
        resolve((now - began) / 1000);
      }
    };
    requestAnimationFrame(tick);
  });
  lines.push({ name: `drawing one on a canvas of ${size} x ${size}`, seconds: median(painting), goal: '' });
  lines.push({
    name: 'replay, computed and drawn as it goes', goal: '50 a second',
    text: `${(drawn / seconds).toFixed(1)} a second; ${late} of ${drawn + late} turns of the browser found none ready`,
  });
  return lines;
}
