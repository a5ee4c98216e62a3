/** Whether a process that was met before is still the same one. */
import { readFile } from 'node:fs/promises';
import { isErrno } from './faults.ts';

interface Status {
  readonly born: string;
  /** It has ended, and whoever started it has not asked how. */
  readonly ended: boolean;
}

/** By the files of the kernel where it has them (proc(5): fields 3 and 22 of `stat`, `boot_id`); else null. */
async function statusOf(pid: number): Promise<Status | null> {
  try {
    const [stat, boot] = await Promise.all([
      readFile(`/proc/${pid}/stat`, 'utf8'),
      readFile('/proc/sys/kernel/random/boot_id', 'utf8'),
    ]);
    // The second field, the name of the program in brackets, may hold blanks and brackets of its own.
    const fields = stat.slice(stat.lastIndexOf(')') + 2).split(' ');
    const [state, started] = [fields[0], fields[19]];
    if (state === undefined || started === undefined) return null;
    return { born: `${boot.trim()} ${started}`, ended: state === 'Z' || state === 'X' };
  } catch {
    return null;
  }
}

/** What tells the process from a later one with the same number; null where the system does not say. */
export async function birthOf(pid: number): Promise<string | null> {
  return (await statusOf(pid))?.born ?? null;
}

/** Whether the process with this number, born then if that is known, is no more. In doubt it lives. */
export async function isGone(pid: number, born: string | null): Promise<boolean> {
  try {
    process.kill(pid, 0);
  } catch (error) {
    if (isErrno(error, 'ESRCH')) return true;
  }
  const status = await statusOf(pid);
  return status !== null && (status.ended || (born !== null && born !== status.born));
}
