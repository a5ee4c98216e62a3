/** Carries what is not ours from the old folder into the new one. */
import { copyFile, link, lstat, mkdir, readdir, readlink, rename, symlink, utimes } from 'node:fs/promises';
import { join } from 'node:path';
import { sync } from './disk.ts';
import { isErrno, refuseFolder } from './faults.ts';

/**
 * Gives every file under `from` that is not in `ours` a second name under `to`; nothing is taken away from `from`, so
 * that a run killed at any moment loses nothing. Symbolic links are carried as links, never followed.
 * Throws a Fault when something that is not ours lies where a file of `written` goes.
 */
export async function carryOver(
  from: string,
  to: string,
  ours: ReadonlySet<string>,
  written: ReadonlySet<string>,
): Promise<void> {
  await carryFolder('');

  async function carryFolder(below: string): Promise<void> {
    for (const entry of await readdir(join(from, below), { withFileTypes: true })) {
      const path = below === '' ? entry.name : `${below}/${entry.name}`;
      if (entry.isDirectory()) {
        if (written.has(path)) throw inTheWay(path);
        const onlyOurs = [...ours].some((one) => one.startsWith(`${path}/`));
        // A folder that the program made comes again only when something is in it.
        if (!onlyOurs) await mkdir(join(to, path), { recursive: true });
        await carryFolder(path);
      } else if (!ours.has(path)) {
        if (written.has(path) || [...written].some((one) => one.startsWith(`${path}/`))) throw inTheWay(path);
        await mkdir(join(to, below), { recursive: true });
        if (entry.isSymbolicLink()) await symlink(await readlink(join(from, path)), join(to, path));
        else if (entry.isFile()) await secondName(join(from, path), join(to, path));
        else
          throw refuseFolder(join(from, path), 'neither a file nor a folder', 'move it elsewhere; nothing was changed');
      }
    }
  }

  function inTheWay(path: string): Error {
    return refuseFolder(
      join(from, path),
      'something that coilwright did not make, where it would write a file of its own',
      'rename it or move it elsewhere; nothing was changed',
    );
  }
}

/**
 * Gives what was put into the old folder, or saved anew there, between {@link carryOver} and the change of names its second name
 * as well. `from` is the backup, `to` the new folder in its place.
 */
export async function carryLate(
  from: string,
  to: string,
  ours: ReadonlySet<string>,
  written: ReadonlySet<string>,
  below = '',
): Promise<void> {
  for (const entry of await readdir(join(from, below), { withFileTypes: true })) {
    const path = below === '' ? entry.name : `${below}/${entry.name}`;
    const [source, goal] = [join(from, path), join(to, path)];
    if (entry.isDirectory()) await carryLate(from, to, ours, written, path);
    else if (!ours.has(path) && !written.has(path) && (entry.isFile() || entry.isSymbolicLink())) {
      const [late, there] = await Promise.all([lstat(source), lstat(goal).catch(() => null)]);
      if (there !== null && (there.ino === late.ino || there.mtimeMs >= late.mtimeMs)) continue;
      await mkdir(join(to, below), { recursive: true });
      await rename(source, goal);
    }
  }
}

/** A hard link; a copy with the same times where the file system has no links. */
export async function secondName(from: string, to: string): Promise<void> {
  try {
    await link(from, to);
  } catch (error) {
    if (!isErrno(error, 'EPERM', 'ENOTSUP', 'EOPNOTSUPP', 'ENOSYS', 'EMLINK', 'EXDEV')) throw error;
    await copyFile(from, to);
    await sync(to);
    const { atime, mtime } = await lstat(from);
    await utimes(to, atime, mtime);
  }
}
