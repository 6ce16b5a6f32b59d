// Sets TeX as MathML: a JSON list of {tex, display, page} in, a JSON list of strings out, in the same order.
import { readFileSync } from 'node:fs';

import temml from 'temml';

const requests = JSON.parse(readFileSync(0, 'utf8'));
const answers = requests.map(({ tex, display, page }) => {
  try {
    return temml.renderToString(tex, { displayMode: display, throwOnError: true });
  } catch (error) {
    console.error(`${page}.md: ${tex}\n${error.message}`);
    process.exit(1);
  }
});
process.stdout.write(JSON.stringify(answers));
