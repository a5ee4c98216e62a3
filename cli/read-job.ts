/** The bytes of a job file, or of standard input for `-`. */
import { open, readdir } from 'node:fs/promises';
import { basename, dirname, join, resolve } from 'node:path';
import { Fault } from '../src/fault.ts';
import { type FileKind, JOB_FILE } from '../src/job/file-kind.ts';
import { nearest } from '../src/job/nearest.ts';
import { decode, LARGEST_BYTES } from '../src/job/tree.ts';
import type { Terminal } from './terminal.ts';

/** Text of the job, or of what else the file is. Throws a Fault with exit code 3. */
export async function readJobText(file: string, terminal: Terminal, kind: FileKind = JOB_FILE): Promise<string> {
  const bytes =
    file === '-' ? await terminal.input(LARGEST_BYTES) : await readBytes(resolve(terminal.folder, file), file, kind);
  return decode(bytes, file, kind);
}

/** No more is read than says that the file is too large; a pipe or a device is read as a file is. Throws a Fault with exit code 3. */
export async function readBytes(
  path: string,
  file: string,
  kind: FileKind,
  largest = LARGEST_BYTES,
): Promise<Uint8Array> {
  try {
    const handle = await open(path, 'r');
    try {
      const buffer = Buffer.alloc(largest + 1);
      let length = 0;
      for (;;) {
        const { bytesRead } = await handle.read(buffer, length, buffer.length - length, null);
        length += bytesRead;
        if (bytesRead === 0 || length === buffer.length) return buffer.subarray(0, length);
      }
    } finally {
      await handle.close();
    }
  } catch (error) {
    throw await asFault(error, path, file, kind);
  }
}

async function asFault(error: unknown, path: string, file: string, kind: FileKind): Promise<unknown> {
  if (!(error instanceof Error) || !('code' in error)) return error;
  const fault = (code: string, got: string, todo: string) =>
    new Fault(3, { code, place: { file }, got, expected: `${kind.file} in ${kind.form}`, todo });
  switch (error.code) {
    case 'ENOENT':
    case 'ENOTDIR': {
      const names = await readdir(dirname(path)).catch(() => []);
      const near = nearest(
        basename(path),
        names.filter((name) => /\.(?:ya?ml|json|csv)$/i.test(name)),
      );
      const meant = near === null ? null : `did you mean ${join(dirname(file), near)}?`;
      return fault(
        'no-such-file',
        'no file of this name',
        meant ?? `check the path; "${kind.begin}" writes ${kind.noun} to begin with`,
      );
    }
    case 'EISDIR':
      return fault('is-a-folder', 'a folder', kind === JOB_FILE ? 'name the job file in it' : 'name the file in it');
    case 'EACCES':
    case 'EPERM':
      return fault('not-readable', 'a file that may not be read', 'change its permissions');
    default:
      return fault('not-readable', `a file that cannot be read (${String(error.code)})`, 'check the path');
  }
}
