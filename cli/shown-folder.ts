/** A folder as it is told to a person: from where they stand when it lies below, else whole. */
import { relative } from 'node:path';

export function shownFolder(from: string, folder: string): string {
  const below = relative(from, folder);
  if (below === '') return '.';
  return below.startsWith('..') ? folder : below;
}
