/**
 * One folder, written whole or not at all, for every verb that writes.
 *
 *     lock -> mend what a killed run left -> judge the folder that is there -> write a new one beside it, synced
 *          -> give what is not ours a second name in it -> old to backup -> new into place -> what came late -> backup away
 *          -> unlock
 *
 * At every moment the old folder or the new one is whole, under its name or as the backup; the next run puts a backup
 * back. A folder is ours when its record says so; the files that lists are what may be replaced. A run that takes long holds
 * the lock from its start, and may keep what is finished beside the folder, to be linked into it in the end.
 */
import { access, constants, lstat, mkdir, readdir, rename, rm, rmdir } from 'node:fs/promises';
import { basename, dirname, join, resolve } from 'node:path';
import { carryLate, carryOver, secondName } from './carry.ts';
import { sync, writeSynced } from './disk.ts';
import { isErrno, outputFault, refuseFolder } from './faults.ts';
import { lock } from './lock.ts';
import { filesOf } from './ours.ts';

export interface FromMemory {
  /** Relative, with forward slashes. */
  readonly path: string;
  readonly bytes: Uint8Array;
}

interface FromDisk {
  readonly path: string;
  /** Absolute path of a file that is whole and synced and never written to again: it gets a second name in the folder. */
  readonly source: string;
}

export type OutputFile = FromMemory | FromDisk;

export interface Names {
  readonly temporary: string;
  readonly backup: string;
  readonly lock: string;
  /** What a long run has finished so far. */
  readonly work: string;
}

/** A place that is locked for one run. */
export interface Held {
  /** Absolute path of the folder to be. */
  readonly target: string;
  /** Beside it, on the same disk: where a long run keeps what is finished. The run makes it. */
  readonly work: string;
  /** Takes the work folder away: all of it is written. */
  readonly finished: () => Promise<void>;
  /** The whole folder, replacing a folder of ours that is there. */
  readonly write: (files: readonly OutputFile[]) => Promise<void>;
}

/** Names beside the folder that a killed run may leave. */
export function namesBeside(dir: string): Names {
  const target = resolve(dir);
  const beside = join(dirname(target), `.${basename(target)}.coilwright`);
  return { temporary: `${beside}-new`, backup: `${beside}-old`, lock: `${beside}-lock`, work: `${beside}-work` };
}

/**
 * Writes `files` as the folder `dir`, replacing a folder of ours that is there. Returns its absolute path.
 * Throws a Fault with exit code 5; what was there is then there still.
 */
export async function writeFolder(dir: string, files: readonly OutputFile[]): Promise<string> {
  for (const { path } of files) checked(path);
  return holding(dir, async ({ target, write }) => {
    await write(files);
    return target;
  });
}

/**
 * Does `run` while no other run can write the folder `dir`. Throws a Fault with exit code 5 when the place cannot be used or
 * is not free, and whatever `run` throws.
 */
export async function holding<T>(dir: string, run: (held: Held) => Promise<T>): Promise<T> {
  const target = resolve(dir);
  if (dirname(target) === target) {
    throw refuseFolder(target, 'the root of the file system', 'choose a folder below it');
  }
  const names = namesBeside(target);
  let begun = false;
  try {
    await mkdir(dirname(target), { recursive: true });
    begun = true;
    const unlock = await lock(names.lock, target);
    try {
      await mend(target, names);
      await judge(target);
      return await run({
        target,
        work: names.work,
        write: (files) => replace(target, names, files),
        finished: () => takeAway(names.work, target),
      });
    } finally {
      // What cannot be cleared away now the next run clears away; how this one has ended counts.
      await rm(names.temporary, { recursive: true, force: true }).catch(() => undefined);
      await unlock().catch(() => undefined);
    }
  } catch (error) {
    if (begun && isErrno(error, 'ENOENT'))
      throw refuseFolder(target, 'a folder that was taken away while it was written, or one above it', 'run again');
    throw outputFault(error, target);
  }
}

async function replace(target: string, names: Names, files: readonly OutputFile[]): Promise<void> {
  const written = new Set(files.map(({ path }) => checked(path)));
  const ours = await judge(target);
  await writeAll(names.temporary, files);
  if (ours === null) {
    await demandAll(names.temporary, files);
    await rename(names.temporary, target);
    await sync(dirname(target)).catch((error: unknown) => {
      throw outputFault(error, target, 'the new folder is there, and may not outlast a loss of power');
    });
  } else {
    await carryOver(target, names.temporary, ours, written);
    await demandAll(names.temporary, files);
    await swap(target, names, ours, written);
  }
}

/**
 * Whether `dir` could be written as things stand: what can be refused without writing is refused here, before the work
 * is done. Throws a Fault with exit code 5. The answer may be out of date when {@link writeFolder} is called.
 */
export async function checkFolder(dir: string): Promise<void> {
  const target = resolve(dir);
  try {
    await judge(target);
    // Renaming needs the folder above, whether ours is there or not.
    await access(await nearestThere(dirname(target)), constants.W_OK);
  } catch (error) {
    throw outputFault(error, target);
  }
}

/** The folder itself, or the nearest above it that is there. */
async function nearestThere(folder: string): Promise<string> {
  return (await kindOf(folder)) === 'nothing' ? nearestThere(dirname(folder)) : folder;
}

/** A path of our own making; one that leads elsewhere is a mistake of the program. */
function checked(path: string): string {
  if (!path.split('/').every((part) => /^[A-Za-z0-9_][A-Za-z0-9._-]*$/.test(part))) {
    throw new Error(`not a plain relative path: ${path}`);
  }
  return path;
}

/** Puts back, or clears away, what a killed run left. */
async function mend(target: string, names: Names): Promise<void> {
  await rm(names.temporary, { recursive: true, force: true });
  if ((await kindOf(names.backup)) !== 'folder') return;
  const there = await kindOf(target);
  // Killed between the two renames: the old folder lies under the backup name only.
  if (there === 'nothing') return rename(names.backup, target);
  if (there === 'folder') {
    // Killed while clearing away: the new folder has all that was not ours, but for what came at the last moment.
    if ((await filesOf(target)) !== null) {
      const ours = await filesOf(names.backup);
      if (ours !== null) await carryLate(names.backup, target, ours, new Set());
      return rm(names.backup, { recursive: true, force: true });
    }
    if ((await readdir(target)).length === 0) {
      await rmdir(target);
      return rename(names.backup, target);
    }
  }
  throw refuseFolder(
    target,
    `something that coilwright did not make, while the folder of an interrupted run waits as ${names.backup}`,
    'move one of the two elsewhere',
  );
}

/** Paths of ours in the folder that is there; null when there is none. */
async function judge(target: string): Promise<ReadonlySet<string> | null> {
  const there = await kindOf(target);
  if (there === 'nothing') return null;
  if (there === 'link')
    throw refuseFolder(target, 'a symbolic link', 'give the folder that it leads to, or another one');
  if (there === 'other') throw refuseFolder(target, 'a file', 'choose another name with --out');
  const ours = await filesOf(target);
  if (ours !== null) return ours;
  if ((await readdir(target)).length === 0) return new Set();
  throw refuseFolder(
    target,
    'a folder that coilwright did not make',
    'choose a new or empty folder with --out, or move what is in it elsewhere; nothing was changed',
  );
}

async function kindOf(path: string): Promise<'nothing' | 'folder' | 'link' | 'other'> {
  try {
    const found = await lstat(path);
    if (found.isSymbolicLink()) return 'link';
    return found.isDirectory() ? 'folder' : 'other';
  } catch (error) {
    if (isErrno(error, 'ENOENT')) return 'nothing';
    throw error;
  }
}

/** Folders are made once: one that is taken away meanwhile must not come again with the rest of the files alone. */
async function writeAll(folder: string, files: readonly OutputFile[]): Promise<void> {
  const folders = new Set([folder]);
  for (const { path } of files)
    for (let cut = path.indexOf('/'); cut > 0; cut = path.indexOf('/', cut + 1))
      folders.add(join(folder, path.slice(0, cut)));
  for (const one of folders) await mkdir(one);
  for (const file of files) {
    const full = join(folder, file.path);
    if ('bytes' in file) await writeSynced(full, file.bytes);
    else await secondName(file.source, full);
  }
  for (const one of folders) await sync(one);
}

/** Somebody may clear away the folder above while it is written; what would come into place then is no whole. */
async function demandAll(folder: string, files: readonly OutputFile[]): Promise<void> {
  for (const { path } of files) await lstat(join(folder, path));
}

/** When the second rename fails the first is undone. */
async function swap(
  target: string,
  names: Names,
  ours: ReadonlySet<string>,
  written: ReadonlySet<string>,
): Promise<void> {
  await rename(target, names.backup);
  try {
    await rename(names.temporary, target);
  } catch (error) {
    await rename(names.backup, target).catch(() => {
      throw outputFault(error, target, `the folder that was there waits as ${names.backup}; the next run puts it back`);
    });
    throw error;
  }
  try {
    await sync(dirname(target));
    await carryLate(names.backup, target, ours, written);
  } catch (error) {
    throw outputFault(error, target, `the new folder is whole; the one before it still lies as ${names.backup}`);
  }
  await takeAway(names.backup, target);
}

/** Removes what is needed no more once the new folder is in its place. */
async function takeAway(path: string, target: string): Promise<void> {
  try {
    await rm(path, { recursive: true, force: true });
  } catch (error) {
    throw outputFault(error, target, `the new folder is whole; only ${path} could not be removed, remove it yourself`);
  }
}
