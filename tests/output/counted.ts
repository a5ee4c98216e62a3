/** The transaction bundled with a file system that is told when to fail: a module of `files` and hooks around each call. */
import { mkdirSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { pathToFileURL } from 'node:url';
import { build } from 'esbuild';
import type { writeFolder } from '../../src/output/transaction.ts';

/** What the transaction takes from the file system. */
const CALLS =
  'access copyFile link lstat mkdir open readdir readFile readlink rename rm rmdir symlink utimes writeFile'.split(' ');
/** And from an open file. */
const HANDLE_CALLS = 'writeFile sync close'.split(' ');

const FAILING = `
import * as real from 'real-fs';
export { constants } from 'real-fs';
export const hook = { before: () => {} };
const hooked = (name, call) => async (...given) => {
  hook.before(name, given);
  return call(...given);
};
function watched(handle) {
  for (const name of ${JSON.stringify(HANDLE_CALLS)}) {
    const call = handle[name].bind(handle);
    // A file that cannot be closed is closed none the less, as close(2) does it.
    handle[name] = async (...given) => {
      let failed = null;
      try { hook.before('handle.' + name, given); } catch (error) { failed = error; }
      if (failed !== null && name !== 'close') throw failed;
      // Nothing here loses power, and waiting for the disk takes the longest.
      const answer = name === 'sync' ? undefined : await call(...given);
      if (failed !== null) throw failed;
      return answer;
    };
  }
  return handle;
}
${CALLS.filter((name) => name !== 'open')
  .map((name) => `export const ${name} = hooked('${name}', real.${name});`)
  .join('\n')}
const opened = hooked('open', real.open);
export const open = async (...given) => watched(await opened(...given));
`;

export interface Failing {
  readonly writeFolder: typeof writeFolder;
  /** Called before each call with its name and arguments; what it throws is the answer of the file system. */
  readonly hook: { before: (call: string, given: readonly unknown[]) => void };
}

/** The transaction with such a file system, bundled below `folder`. */
export async function failing(folder: string): Promise<Failing> {
  const script = join(folder, 'bundle', 'failing.mjs');
  mkdirSync(join(folder, 'bundle'), { recursive: true });
  await build({
    stdin: {
      contents: `
        export { writeFolder } from ${JSON.stringify(resolve('src/output/transaction.ts'))};
        export { hook } from 'node:fs/promises';`,
      resolveDir: folder,
    },
    bundle: true,
    platform: 'node',
    format: 'esm',
    outfile: script,
    plugins: [
      {
        name: 'failing file system',
        setup(one) {
          one.onResolve({ filter: /^node:fs\/promises$/ }, () => ({ path: 'fs', namespace: 'failing' }));
          one.onResolve({ filter: /^real-fs$/ }, () => ({ path: 'node:fs/promises', external: true }));
          one.onLoad({ filter: /.*/, namespace: 'failing' }, () => ({ contents: FAILING, loader: 'js' }));
        },
      },
    ],
  });
  return (await import(/* @vite-ignore */ pathToFileURL(script).href)) as Failing;
}
