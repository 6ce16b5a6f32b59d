// What the pages weigh: raw, gzip and brotli of the wasm, of each script and style sheet, and of the fonts. Fails over
// the budget. Run by `make size` on site/dist.
import { readdirSync, readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { brotliCompressSync, constants, gunzipSync, gzipSync } from 'node:zlib';

const assets = fileURLToPath(new URL('../dist/assets/', import.meta.url));

// Bytes, 1 kB = 1000.
const budgets = { wasm: 1_100_000, 'scripts and styles': 100_000, fonts: 150_000 };

const kindOf = (name) =>
  name.endsWith('.bin') ? 'wasm' : /\.(js|css)$/.test(name) ? 'scripts and styles' : name.endsWith('.woff2') ? 'fonts' : null;

const brotli = (bytes) => brotliCompressSync(bytes, {
  params: {
    [constants.BROTLI_PARAM_QUALITY]: 11,
    [constants.BROTLI_PARAM_LGWIN]: 24,
    [constants.BROTLI_PARAM_SIZE_HINT]: bytes.length,
  },
}).length;

const sums = Object.fromEntries(Object.keys(budgets).map((kind) => [kind, 0]));
const row = (name, ...figures) => console.log(name.padEnd(52), ...figures.map((f) => String(f).padStart(10)));
row('file', 'raw', 'gzip', 'brotli');
for (const name of readdirSync(assets).sort()) {
  const kind = kindOf(name);
  if (kind === null) {
    continue;
  }
  const shipped = readFileSync(assets + name);
  const bytes = kind === 'wasm' && shipped[0] === 0x1f ? gunzipSync(shipped) : shipped;
  // A font is compressed already and served as it is.
  const small = kind === 'fonts' ? bytes.length : brotli(bytes);
  sums[kind] += small;
  row(name, bytes.length, kind === 'fonts' ? bytes.length : gzipSync(bytes, { level: 9 }).length, small);
}
let over = 0;
for (const [kind, budget] of Object.entries(budgets)) {
  const fits = sums[kind] > 0 && sums[kind] <= budget;
  over += fits ? 0 : 1;
  console.log(`${kind}: ${sums[kind]} of ${budget} bytes ${fits ? 'fits' : 'DOES NOT FIT'}`);
}
process.exitCode = over;
