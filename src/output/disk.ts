/** Bytes and names that outlast a loss of power. */
import { open } from 'node:fs/promises';
import { isErrno } from './faults.ts';

/** A new file whose bytes last; its name does once its folder is synced. */
export async function writeSynced(path: string, bytes: Uint8Array): Promise<void> {
  const handle = await open(path, 'wx');
  try {
    await handle.writeFile(bytes);
    await handle.sync();
  } finally {
    await handle.close();
  }
}

/** Makes the names in a folder, or the bytes of a file, last; some systems cannot, and need not. */
export async function sync(path: string): Promise<void> {
  const handle = await open(path, 'r').catch(() => null);
  if (handle === null) return;
  try {
    await handle.sync();
  } catch (error) {
    if (!isErrno(error, 'EINVAL', 'EPERM', 'EISDIR', 'EBADF', 'ENOTSUP')) throw error;
  } finally {
    await handle.close();
  }
}
