/**
 * A file system that refuses each call of a run in turn, once or from there on: what was there is there still or is under the
 * backup name, the message is true, and the next run ends as if nothing had been.
 */
import { existsSync, mkdirSync, rmSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { expect, it } from 'vitest';
import { namesBeside } from '../../src/output/transaction.ts';
import { failing } from './counted.ts';
import { below, output, scratch } from './folder.ts';

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
/** Calls that need room on the disk; looking, and taking away, work on a full one. */
const GROWS = /^(?:handle\.writeFile|handle\.sync|copyFile|link|mkdir|symlink|writeFile|openNew)$/;
const CHANGES = /^(?:handle\.writeFile|copyFile|link|mkdir|rename|rm|rmdir|symlink|utimes|writeFile|openNew)$/;

interface Trouble {
  readonly code: string;
  readonly calls: RegExp;
  /** Every call from the n-th on is refused, not that alone. */
  readonly lasting: boolean;
}
const TROUBLES: readonly Trouble[] = [
  { code: 'ENOSPC', calls: GROWS, lasting: true },
  { code: 'EROFS', calls: CHANGES, lasting: true },
  { code: 'EIO', calls: /./, lasting: true },
  { code: 'EIO', calls: /./, lasting: false },
];

/** One text for the same files, in whatever order they were listed. */
const sorted = (files: Readonly<Record<string, string>>): string =>
  JSON.stringify(Object.entries(files).sort(([a], [b]) => (a < b ? -1 : 1)));

const belowOrNone = (path: string): string => (existsSync(path) ? sorted(below(path)) : '');

it('is survived at whatever call it sets in', async () => {
  const base = scratch();
  const { writeFolder: write, hook } = await failing(base);
  let refused = 0;
  const whole = [sorted(OLD_BELOW), sorted(NEW_BELOW)];
  const flaws: string[] = [];
  for (const [t, { code, calls, lasting }] of TROUBLES.entries()) {
    for (let at = 0, ended = false; !ended && at < 200; at++) {
      const home = join(base, `${t}-${at}`);
      const coil = join(home, 'coil');
      mkdirSync(home);
      for (const { path, bytes } of OLD) {
        mkdirSync(dirname(join(coil, path)), { recursive: true });
        writeFileSync(join(coil, path), bytes);
      }
      for (const [path, text] of Object.entries(MINE)) writeFileSync(join(coil, path), text);
      const { backup, lock } = namesBeside(coil);
      let left = at;
      let where = '';
      hook.before = (name, given) => {
        const call = name === 'open' && given[1] === 'wx' ? 'openNew' : name;
        if (!calls.test(call)) return;
        if (left-- > 0 || (!lasting && where !== '')) return;
        if (where === '') where = `${call} ${call.startsWith('handle') ? '' : String(given[0]).replace(home, '')}`;
        throw Object.assign(new Error(`${code}: refused`), { code });
      };
      const error = (await write(coil, NEW).then(
        () => null,
        (reason: unknown) => reason,
      )) as {
        readonly exit?: number;
        readonly faults?: readonly { readonly todo: string; readonly got: string }[];
      } | null;
      ended = where === '';
      if (!ended) refused++;
      const told = `${code}${lasting ? ' lasting' : ''} at call ${at}, ${where}`;
      const here = belowOrNone(coil);
      const waits = belowOrNone(backup);
      if (!whole.includes(here) && !whole.includes(waits)) flaws.push(`${told}: nothing whole is left`);
      if (error === null && here !== whole[1]) flaws.push(`${told}: told of as done, and is not`);
      if (error !== null && error.exit !== 5) flaws.push(`${told}: no fault: ${String(error)}`);
      const todo = error?.faults?.[0]?.todo ?? '';
      if (error !== null && /nothing was changed/.test(todo) !== (here === whole[0]))
        flaws.push(
          `${told}: says ${todo}; ${here === whole[1] ? 'the new is there' : here === '' ? 'nothing is there' : 'the old is there'}`,
        );
      hook.before = () => {};
      // Its process would have ended by now; only where removing was refused can a lock be left, and never an empty one.
      if (existsSync(lock)) {
        const removing = lasting
          ? calls.test('rm')
          : where.startsWith('rm /.coil.coilwright-lock') || where.startsWith('readFile');
        if (!removing) flaws.push(`${told}: a lock is left`);
        rmSync(lock);
      }
      await write(coil, NEW);
      if (
        sorted(below(home)) !==
        sorted(Object.fromEntries(Object.entries(NEW_BELOW).map(([path, text]) => [`coil/${path}`, text])))
      )
        flaws.push(`${told}: the next run leaves ${sorted(below(home))}`);
    }
  }
  console.log(`calls refused, each another one or in another way: ${refused}`);
  expect(flaws).toEqual([]);
  expect(refused).toBeGreaterThan(120);
});
