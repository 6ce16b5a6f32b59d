// Serves a directory with the site's own server (site/serve), compiled once per test process.
import { execFile, spawn } from 'node:child_process';
import { mkdtemp } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import readline from 'node:readline';
import { fileURLToPath } from 'node:url';
import { promisify } from 'node:util';

/** Root of the repository. */
export const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '../../..');

const run = promisify(execFile);

/** Runs a program in the root of the repository; rejects with its output. */
export async function command(file, args, env = {}) {
  try {
    const { stdout } = await run(file, args, { cwd: root, env: { ...process.env, ...env }, maxBuffer: 64 << 20 });
    return stdout;
  } catch (error) {
    throw new Error(`${file} ${args.join(' ')}\n${error.stdout ?? ''}${error.stderr ?? ''}`, { cause: error });
  }
}

let program;

/** Starts a server. Returns its address with a slash at the end, and `stop`. */
export async function serve(dir, { prefix = '/', csp = true } = {}) {
  program ??= (async () => {
    const file = path.join(await mkdtemp(path.join(tmpdir(), 'hoopsheet-serve-')), 'serve');
    await command('go', ['build', '-o', file, './site/serve']);
    return file;
  })();
  const child = spawn(await program, ['-dir', dir, '-addr', '127.0.0.1:0', '-prefix', prefix, `-csp=${csp}`], {
    stdio: ['ignore', 'pipe', 'inherit'],
  });
  const address = await new Promise((resolve, reject) => {
    readline.createInterface({ input: child.stdout }).once('line', resolve);
    child.once('exit', (code) => reject(new Error(`the server ended with ${code}`)));
  });
  return {
    address,
    stop: () => new Promise((resolve) => {
      child.once('exit', resolve);
      child.kill();
    }),
  };
}
