/** Whether a folder is one that this program made, and which files in it are its own. */
import { lstat, readFile } from 'node:fs/promises';
import { join } from 'node:path';

/** Any of these marks a folder as ours. */
const RECORD_NAMES = ['plan.json', 'lot.json', 'proof.json'] as const;
/** No record is larger; what is, is not ours. */
const LARGEST_BYTES = 64_000_000;

/** Relative paths that the records list, and the records themselves; null when the folder is not ours. */
export async function filesOf(folder: string): Promise<ReadonlySet<string> | null> {
  const found = await Promise.all(RECORD_NAMES.map((name) => listedBy(folder, name)));
  return found.every((paths) => paths === null) ? null : new Set(found.flatMap((paths) => paths ?? []));
}

async function listedBy(folder: string, name: string): Promise<readonly string[] | null> {
  const path = join(folder, name);
  try {
    const found = await lstat(path);
    if (!found.isFile() || found.size > LARGEST_BYTES) return null;
    const record: unknown = JSON.parse(await readFile(path, 'utf8'));
    if (typeof record !== 'object' || record === null || !('record' in record) || record.record !== 1) return null;
    if (!('program' in record) || typeof record.program !== 'string' || !/^coilwright\b/.test(record.program))
      return null;
    const listed = 'files' in record && Array.isArray(record.files) ? record.files : [];
    return [name, ...listed.flatMap(pathOf)];
  } catch {
    return null;
  }
}

function pathOf(file: unknown): string[] {
  return typeof file === 'object' && file !== null && 'path' in file && typeof file.path === 'string'
    ? [file.path]
    : [];
}
