/**
 * A run that is killed before each of its operations on the file system in turn. The transaction is bundled with a
 * file system that ends the process at the n-th call; then the next run must find all it needs.
 */
import { spawn } from 'node:child_process';
import { mkdirSync, writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { build } from 'esbuild';
import { expect, it } from 'vitest';
import { namesBeside, writeFolder } from '../../src/output/transaction.ts';
import { below, output, scratch } from './folder.ts';

/** What the transaction takes from the file system. */
const CALLS = 'access copyFile link lstat mkdir open readdir readFile readlink rename rm rmdir symlink utimes'.split(
  ' ',
);
const COUNTED = `
import * as real from 'real-fs';
export { constants } from 'real-fs';
let left = Number(process.env.KILL_AT);
const counted = (call) => (...given) => {
  if (left-- <= 0) process.kill(process.pid, 'SIGKILL');
  return call(...given);
};
${CALLS.map((name) => `export const ${name} = counted(real.${name});`).join('\n')}
`;

const OLD = output({ 'sheet.pdf': 'old', 'parts/former.stl': 'old', 'dropped.txt': 'old' });
const NEW = output({ 'sheet.pdf': 'new', 'parts/former.stl': 'new' });
const MINE = { 'notes.txt': 'mine', 'parts/photo.jpg': 'mine' };
const OLD_BELOW = {
  'plan.json': 'record',
  'sheet.pdf': 'old',
  'parts/former.stl': 'old',
  'dropped.txt': 'old',
  ...MINE,
};
const NEW_BELOW = { 'plan.json': 'record', 'sheet.pdf': 'new', 'parts/former.stl': 'new', ...MINE };

async function bundle(folder: string): Promise<string> {
  const script = join(folder, 'run.mjs');
  await build({
    stdin: {
      contents: `
        import { writeFolder } from ${JSON.stringify(resolve('src/output/transaction.ts'))};
        const files = JSON.parse(process.env.FILES).map(([path, text]) => ({ path, bytes: Buffer.from(text) }));
        await writeFolder(process.env.TARGET, files);`,
      resolveDir: folder,
    },
    bundle: true,
    platform: 'node',
    format: 'esm',
    outfile: script,
    plugins: [
      {
        name: 'counted file system',
        setup(one) {
          one.onResolve({ filter: /^node:fs\/promises$/ }, () => ({ path: 'fs', namespace: 'counted' }));
          one.onResolve({ filter: /^real-fs$/ }, () => ({ path: 'node:fs/promises', external: true }));
          one.onLoad({ filter: /.*/, namespace: 'counted' }, () => ({ contents: COUNTED, loader: 'js' }));
        },
      },
    ],
  });
  return script;
}

it('loses nothing, whatever the moment', async () => {
  const base = scratch();
  const script = await bundle(base);
  const files = JSON.stringify(NEW.map(({ path, bytes }) => [path, Buffer.from(bytes).toString()]));
  let killed = 0;
  let ended = false;

  const runAt = async (at: number): Promise<void> => {
    const coil = join(base, `run-${at}`, 'coil');
    mkdirSync(join(base, `run-${at}`));
    await writeFolder(coil, OLD);
    for (const [path, text] of Object.entries(MINE)) writeFileSync(join(coil, path), text);
    const child = spawn(process.execPath, [script], {
      env: { ...process.env, KILL_AT: String(at), TARGET: coil, FILES: files },
      stdio: 'ignore',
    });
    const [code, signal] = await new Promise<[number | null, string | null]>((done) => {
      child.on('exit', (...how) => done(how));
    });
    if (signal === 'SIGKILL') killed += 1;
    else {
      expect(code).toBe(0);
      ended = true;
    }
    // Under its name, or else as the backup, one of the two is whole.
    const here = [coil, namesBeside(coil).backup].map((path) => {
      try {
        return below(path);
      } catch {
        return {};
      }
    });
    expect(here.map(sorted).some((found) => found === sorted(OLD_BELOW) || found === sorted(NEW_BELOW))).toBe(true);
    await writeFolder(coil, NEW);
    expect(below(join(coil, '..'))).toEqual(
      Object.fromEntries(Object.entries(NEW_BELOW).map(([path, text]) => [`coil/${path}`, text])),
    );
  };

  // Two at a time, until a run is no longer killed.
  for (let at = 0; !ended && at < 200; at += 2) await Promise.all([runAt(at), runAt(at + 1)]);
  console.log(`runs killed, each at another operation: ${killed}`);
  expect(killed).toBeGreaterThan(20);
  expect(ended).toBe(true);
});

/** One text for the same files, in whatever order they were listed. */
function sorted(files: Readonly<Record<string, string>>): string {
  return JSON.stringify(Object.entries(files).sort(([a], [b]) => (a < b ? -1 : 1)));
}
