/** One writer a folder. The lock is a file beside the folder that names its process. */
import { randomBytes } from 'node:crypto';
import { lstat, open, readdir, readFile, rename, rm } from 'node:fs/promises';
import { hostname } from 'node:os';
import { basename, dirname, join } from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import { Fault } from '../fault.ts';
import { isErrno } from './faults.ts';

interface Holder {
  readonly pid: number;
  readonly host: string;
  readonly token: string;
}

/** A lock without a readable holder is being made, or was left half made; after this it counts as left. */
const HALF_MADE_MS = 5_000;
const PAUSE_MS = 25;

/**
 * Takes the lock; a lock whose process is gone is taken over. Waits for a living one up to `patienceMs`, then throws a
 * Fault with exit code 5. Returns what releases it.
 */
export async function lock(path: string, target: string, patienceMs = 10_000): Promise<() => Promise<void>> {
  const mine: Holder = { pid: process.pid, host: hostname(), token: randomBytes(8).toString('hex') };
  const until = Date.now() + patienceMs;
  for (;;) {
    if (await create(path, mine)) {
      await sweep(path);
      return () => release(path, mine);
    }
    const text = await readFile(path, 'utf8').catch(() => null);
    if (text !== null && (await isStale(path, text))) {
      await remove(path, text);
    } else if (Date.now() >= until) {
      const holder = parse(text ?? '');
      throw new Fault(5, {
        code: 'locked',
        place: { file: target },
        got:
          holder === null
            ? 'another run that is writing it'
            : `another run that is writing it, process ${holder.pid} on ${holder.host}`,
        expected: 'one run at a time for one folder',
        todo: `wait for it to end; if there is no such run, remove ${path}`,
      });
    } else {
      await wait(PAUSE_MS);
    }
  }
}

async function create(path: string, mine: Holder): Promise<boolean> {
  try {
    const handle = await open(path, 'wx');
    try {
      await handle.writeFile(JSON.stringify(mine));
    } finally {
      await handle.close();
    }
    return true;
  } catch (error) {
    if (isErrno(error, 'EEXIST')) return false;
    throw error;
  }
}

async function isStale(path: string, text: string): Promise<boolean> {
  const holder = parse(text);
  if (holder === null) {
    const found = await lstat(path).catch(() => null);
    return found !== null && Date.now() - found.mtimeMs > HALF_MADE_MS;
  }
  if (holder.host !== hostname()) return false;
  try {
    process.kill(holder.pid, 0);
    return false;
  } catch (error) {
    return isErrno(error, 'ESRCH');
  }
}

/** Removes the lock that was read, and not one that another run has put there since. */
async function remove(path: string, text: string): Promise<void> {
  const aside = `${path}-${randomBytes(4).toString('hex')}`;
  try {
    await rename(path, aside);
  } catch (error) {
    if (isErrno(error, 'ENOENT')) return;
    throw error;
  }
  const found = await readFile(aside, 'utf8').catch(() => null);
  // Gone: another run has swept it, which it does only with a lock that nobody holds.
  if (found === null || found === text) await rm(aside, { force: true });
  else await rename(aside, path);
}

/** Clears away locks of processes that are gone, which a run killed in {@link remove} had put aside. */
async function sweep(path: string): Promise<void> {
  const folder = dirname(path);
  const aside = `${basename(path)}-`;
  for (const name of await readdir(folder).catch(() => [])) {
    if (!name.startsWith(aside) || !/^[0-9a-f]{8}$/.test(name.slice(aside.length))) continue;
    const left = join(folder, name);
    const text = await readFile(left, 'utf8').catch(() => null);
    if (text !== null && (await isStale(left, text))) await rm(left, { force: true });
  }
}

async function release(path: string, mine: Holder): Promise<void> {
  const text = await readFile(path, 'utf8').catch(() => '');
  if (parse(text)?.token === mine.token) await rm(path, { force: true });
}

function parse(text: string): Holder | null {
  try {
    const found: unknown = JSON.parse(text);
    if (typeof found !== 'object' || found === null) return null;
    const { pid, host, token } = found as Record<string, unknown>;
    return typeof pid === 'number' &&
      Number.isInteger(pid) &&
      pid > 0 &&
      typeof host === 'string' &&
      typeof token === 'string'
      ? { pid, host, token }
      : null;
  } catch {
    return null;
  }
}
