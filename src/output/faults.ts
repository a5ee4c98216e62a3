/** What can go wrong while writing, as faults with exit code 5. */
import { Fault } from '../fault.ts';

/** The place cannot be used; `what` it is. */
export function refuseFolder(target: string, what: string, todo: string): Fault {
  return new Fault(5, {
    code: 'output-place',
    place: { file: target },
    got: what,
    expected: 'a folder to write to',
    todo,
  });
}

const CAUSES: Readonly<Record<string, readonly [got: string, todo: string]>> = {
  EACCES: ['a place that may not be written to', 'choose another folder with --out, or change its permissions'],
  EPERM: ['a place that may not be written to', 'choose another folder with --out, or change its permissions'],
  EROFS: ['a file system that is read-only', 'choose a folder on another disk with --out'],
  ENOSPC: ['a full disk', 'make room, or choose a folder on another disk with --out'],
  EDQUOT: ['a full quota', 'make room, or choose a folder on another disk with --out'],
  ENOTDIR: ['a path that leads through a file', 'choose another folder with --out'],
  EEXIST: ['a path that leads through a file', 'choose another folder with --out'],
  ENAMETOOLONG: ['a path that is too long for the file system', 'choose a shorter folder with --out'],
  ELOOP: ['a path of symbolic links that lead in a circle', 'choose another folder with --out'],
  ENOTEMPTY: ['a folder that something else was put into meanwhile', 'run again, or choose another folder with --out'],
  EBUSY: [
    'a folder that is in use, or at which a disk is mounted',
    'close what has it open, or choose a folder below it with --out',
  ],
  ENOENT: ['a path that cannot be made', 'choose another folder with --out'],
};

/**
 * A fault for what the file system answered; anything else is handed back as it is. `outcome` says how things stand now, behind
 * what to do.
 */
export function outputFault(error: unknown, target: string, outcome = 'nothing was changed'): unknown {
  if (!(error instanceof Error) || !('code' in error) || typeof error.code !== 'string' || error instanceof Fault) {
    return error;
  }
  // Codes of Node's own, such as that of a thread out of memory, are no answers of the file system.
  if (error.code.startsWith('ERR_')) return error;
  const [got, todo] = CAUSES[error.code] ?? [
    `an error of the file system, ${error.code}`,
    'choose another folder with --out',
  ];
  return new Fault(5, {
    code: 'not-written',
    place: { file: target },
    got,
    expected: 'a folder that can be written',
    todo: `${todo}; ${outcome}`,
  });
}

/** Whether the file system answered with one of these codes. */
export function isErrno(error: unknown, ...codes: readonly string[]): boolean {
  return error instanceof Error && 'code' in error && typeof error.code === 'string' && codes.includes(error.code);
}
