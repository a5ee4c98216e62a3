// Places that fail: a disk that is full, one that is read-only, folders that are taken away or changed while a run is at work.
import { spawnSync } from 'node:child_process';
import {
  existsSync,
  lstatSync,
  mkdirSync,
  readFileSync,
  renameSync,
  rmSync,
  statfsSync,
  symlinkSync,
  unlinkSync,
  watch,
  writeFileSync,
} from 'node:fs';
import { join } from 'node:path';
import { coilwright, demand, leftIn, must, putMine, told, withoutMine } from './ground.mjs';

/** Disks that are mounted now; a run that is broken off takes them away too. */
const mounted = new Set();

function mount(...words) {
  if (spawnSync('mount', words, { stdio: 'ignore' }).status !== 0) return false;
  mounted.add(words.at(-1));
  return true;
}

function unmount(path) {
  spawnSync('umount', [path], { stdio: 'ignore' });
  mounted.delete(path);
}

for (const signal of ['SIGINT', 'SIGTERM'])
  process.once(signal, () => {
    for (const path of mounted) unmount(path);
    process.exit(130);
  });

/** Whether a disk in memory can be mounted here: only the root of a machine that lets it. */
export function canMount(base) {
  const path = join(base, 'may-mount');
  mkdirSync(path, { recursive: true });
  const may = mount('-t', 'tmpfs', '-o', 'size=64k', 'tmpfs', path);
  if (may) unmount(path);
  return may;
}

/**
 * Disks with room for 0, 1, .. `steps` parts of what a run writes: the run fails with a message, or has room; what was there is
 * whole, and with room the next run ends as ever. `keeps` says what may wait for that run. @returns how many runs found the disk full
 */
export async function fillDisk({ base, words, expected, steps, keeps = /^$/ }) {
  const disk = join(base, 'disk');
  let full = 0;
  mkdirSync(disk, { recursive: true });
  demand(mount('-t', 'tmpfs', '-o', 'size=64m', 'tmpfs', disk), 'no disk in memory');
  try {
    const coil = join(disk, 'coil');
    const given = [...words, '--out', coil];
    const roomOf = () => {
      const { bavail, bsize } = statfsSync(disk);
      return bavail * bsize;
    };
    const before = roomOf();
    await must(base, given);
    const needs = before - roomOf();
    for (const there of [false, true])
      for (let step = 0; step <= steps; step++) {
        rmSync(coil, { recursive: true, force: true });
        if (there) {
          await must(base, given);
          putMine(coil);
        }
        const old = told(coil);
        const ballast = join(disk, 'ballast');
        // A tmpfs counts in pages; the last of them is left out of no step.
        const size = Math.max(0, roomOf() - Math.floor((needs * step) / steps / 4096) * 4096);
        demand(spawnSync('fallocate', ['-l', String(size), ballast]).status === 0, 'the disk cannot be filled');
        const { code, err } = await coilwright(base, given);
        rmSync(ballast);
        if (code !== 0) {
          full++;
          demand(code === 5 && /got +a full disk/.test(err) && /make room/.test(err), `ended with ${code}: ${err}`);
          demand(told(coil) === old, `a full disk changed the folder:\n${told(coil)}`);
          const left = leftIn(disk).filter((one) => !keeps.test(one));
          demand(left.length === 0, `left on a full disk: ${left.join(', ')}`);
        }
        await must(base, given);
        const { rest, all } = withoutMine(told(coil));
        demand(rest === expected && all === there, `with room again the run left\n${told(coil)}`);
      }
    return full;
  } finally {
    unmount(disk);
  }
}

/** A disk that is read-only from the start, without and with a folder of ours on it. */
export async function readOnly({ base, words }) {
  const disk = join(base, 'sealed');
  mkdirSync(disk, { recursive: true });
  demand(mount('-t', 'tmpfs', '-o', 'size=64m', 'tmpfs', disk), 'no disk in memory');
  try {
    await must(base, [...words, '--out', join(disk, 'coil')]);
    const old = told(disk);
    demand(mount('-o', 'remount,ro', disk), 'the disk cannot be made read-only');
    for (const name of ['new', 'coil', 'deep/er']) {
      const { code, err } = await coilwright(base, [...words, '--out', join(disk, name)]);
      demand(code === 5 && /read-only/.test(err) && /another disk/.test(err), `${name} ended with ${code}: ${err}`);
      demand(told(disk) === old, 'a read-only disk was changed');
    }
    return 3;
  } finally {
    unmount(disk);
  }
}

/** Removes a folder so that it is gone at once; file by file, the prank alone could make a mixture. */
function vanish(path) {
  const away = `${path}-away`;
  rmSync(away, { recursive: true, force: true });
  renameSync(path, away);
  rmSync(away, { recursive: true, force: true });
}

/** What is done to the folder, its successor or the folder above, while a run is at work. */
const PRANKS = {
  'the folder is removed': ({ coil }) => vanish(coil),
  'the folder becomes a file': ({ coil }) => {
    if (existsSync(coil)) vanish(coil);
    writeFileSync(coil, 'mine', { flag: 'wx' });
  },
  'the folder becomes a link': ({ coil, other }) => {
    if (existsSync(coil)) vanish(coil);
    symlinkSync(other, coil);
  },
  'the folder is another one': ({ coil }) => {
    if (existsSync(coil)) vanish(coil);
    mkdirSync(coil);
    writeFileSync(join(coil, 'thesis.txt'), 'mine', { flag: 'wx' });
  },
  'the folder above is removed': ({ home }) => vanish(home),
  'the folder above is moved': ({ home }) => renameSync(home, `${home}-moved`),
  'what is written is removed': ({ home }) => vanish(join(home, '.coil.coilwright-new')),
  'the lock is removed': ({ home }) => unlinkSync(join(home, '.coil.coilwright-lock')),
};
export const PRANK_NAMES = Object.keys(PRANKS);

/** Plays a prank when the run begins, or a while after its lock is there. It ends with 0 or 5, what is not ours is untouched. */
export async function prank({ base, words, expected, name, next }) {
  const home = join(base, 'home');
  const other = join(base, 'other');
  for (const path of [home, other, `${home}-moved`]) rmSync(path, { recursive: true, force: true });
  mkdirSync(home, { recursive: true });
  mkdirSync(other);
  writeFileSync(join(other, 'thesis.txt'), 'mine');
  const coil = join(home, 'coil');
  const given = [...words, '--out', coil];
  const later = next() < 0.7;
  const after = next() * (later ? 30 : 600);
  if (next() < 0.6) await must(base, given);
  let played = false;
  const play = () => {
    try {
      PRANKS[name]({ home, coil, other });
      played = true;
    } catch (error) {
      // The run was quicker and has put something in the way.
      if (!['ENOENT', 'EEXIST', 'ENOTEMPTY', 'EISDIR'].includes(error.code)) throw error;
    }
  };
  const { code, err } = await coilwright(base, given, {
    onStart(child) {
      if (!later) return setTimeout(play, after).unref();
      const watcher = watch(home, (_, changed) => {
        if (!changed?.includes('-lock')) return;
        watcher.close();
        setTimeout(play, after).unref();
      });
      child.on('close', () => watcher.close());
    },
  });
  demand(code === 0 || code === 5, `ended with ${code}: ${err}`);
  if (code === 5) demand(/ got /.test(err) && / to do /.test(err), `no help in: ${err}`);
  demand(
    readFileSync(join(other, 'thesis.txt'), 'utf8') === 'mine' && told(other).split('\n').length === 2,
    'a link was followed',
  );
  const isOurs = existsSync(join(coil, 'thesis.txt')) === false && existsSync(coil) && lstatSync(coil).isDirectory();
  if (isOurs) demand(told(coil) === '' || told(coil) === expected, `a mixture after the prank:\n${told(coil)}`);
  // Whoever plays puts it right again; the next run is as ever.
  if (!isOurs) rmSync(coil, { recursive: true, force: true });
  await must(base, given);
  demand(told(coil) === expected, `the next run left\n${told(coil)}`);
  demand(leftIn(home).length === 0, `left beside: ${leftIn(home).join(', ')}`);
  return played;
}
