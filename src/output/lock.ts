/** One writer a folder. The lock is a file beside the folder that names its process. */
import { randomBytes } from 'node:crypto';
import { lstat, open, readFile, rm } from 'node:fs/promises';
import { hostname } from 'node:os';
import { setTimeout as wait } from 'node:timers/promises';
import { Fault } from '../fault.ts';
import { isErrno } from './faults.ts';
import { birthOf, isGone } from './process.ts';

interface Holder {
  readonly pid: number;
  readonly host: string;
  readonly token: string;
  /** Tells it from a later process with the same number; null where the system does not say. */
  readonly born: string | null;
}

/** A lock without a readable holder is being made, or was left half made; after this it counts as left. */
const HALF_MADE_MS = 5_000;
const PAUSE_MS = 25;

/**
 * Takes the lock; a lock whose process is gone is taken over. Waits for a living one up to `patienceMs`, then throws a
 * Fault with exit code 5. Returns what releases it.
 */
export async function lock(path: string, target: string, patienceMs = 10_000): Promise<() => Promise<void>> {
  const token = randomBytes(8).toString('hex');
  const mine: Holder = { pid: process.pid, host: hostname(), token, born: await birthOf(process.pid) };
  const until = Date.now() + patienceMs;
  for (;;) {
    if (await create(path, mine)) {
      await removeLeft(breaking(path));
      return () => release(path, mine);
    }
    const text = await readFile(path, 'utf8').catch(() => null);
    if (text !== null && (await isLeft(path, text))) await takeAway(path, mine);
    if (Date.now() >= until) {
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
    }
    await wait(PAUSE_MS);
  }
}

/** Whether it was made; not when one is there. Nothing is left of one that could not be written. */
async function create(path: string, mine: Holder): Promise<boolean> {
  const handle = await open(path, 'wx').catch((error: unknown) => {
    if (isErrno(error, 'EEXIST')) return null;
    throw error;
  });
  if (handle === null) return false;
  try {
    await handle.writeFile(JSON.stringify(mine)).finally(() => handle.close());
  } catch (error) {
    await rm(path, { force: true }).catch(() => undefined);
    throw error;
  }
  return true;
}

/** The process that wrote it is no more, or wrote nothing for long. */
async function isLeft(path: string, text: string): Promise<boolean> {
  const holder = parse(text);
  if (holder === null) {
    const found = await lstat(path).catch(() => null);
    return found !== null && Date.now() - found.mtimeMs > HALF_MADE_MS;
  }
  return holder.host === hostname() && (await isGone(holder.pid, holder.born));
}

async function removeLeft(path: string): Promise<void> {
  const text = await readFile(path, 'utf8').catch(() => null);
  if (text !== null && (await isLeft(path, text))) await rm(path, { force: true });
}

const breaking = (path: string): string => `${path}-breaking`;

/**
 * Removes a lock that was left, unless another run does. Whoever looks and then removes must be alone in it: another that has
 * looked before would remove the lock that was made since.
 */
async function takeAway(path: string, mine: Holder): Promise<void> {
  const alone = breaking(path);
  if (!(await create(alone, mine))) return removeLeft(alone);
  try {
    await removeLeft(path);
  } finally {
    await rm(alone, { force: true });
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
    const { pid, host, token, born = null } = found as Record<string, unknown>;
    return typeof pid === 'number' &&
      Number.isInteger(pid) &&
      pid > 0 &&
      typeof host === 'string' &&
      typeof token === 'string' &&
      (typeof born === 'string' || born === null)
      ? { pid, host, token, born }
      : null;
  } catch {
    return null;
  }
}
