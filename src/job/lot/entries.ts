/** The coils of a lot, from its file or from a table: how many of each job, and their serials. */
import { dirname, isAbsolute, join, normalize } from 'node:path';
import type { FaultParts, Place } from '../../fault.ts';
import type { LotFileEntry } from './file.ts';
import type { ReadEntry } from './schema.ts';
import { MOST_COILS, numberLot } from './serials.ts';

/** One entry, and where each of its keys was written. */
export interface WrittenEntry {
  readonly entry: ReadEntry;
  readonly place: (key: string) => Place;
}

export interface About {
  /** The file that names the jobs. */
  readonly file: string;
  readonly pattern: string | null;
  readonly first: number;
  /** Of the lot. */
  readonly name: string;
  /** Of the table, from the folder of the lot file, when the jobs are in one. */
  readonly table?: string;
}

/** A path that stands in `file`, from where that file was named from. */
export const readFromFolder = (file: string, path: string): string =>
  isAbsolute(path) ? normalize(path) : join(dirname(file), path);

export function numberedEntries(
  written: readonly WrittenEntry[],
  about: About,
): { readonly entries: readonly LotFileEntry[]; readonly faults: readonly FaultParts[] } {
  const faults: FaultParts[] = [];
  const quantities = written.map(({ entry, place }) => {
    if (entry.quantity !== undefined) return entry.quantity;
    if (entry.serials !== undefined && 'list' in entry.serials) return entry.serials.list.length;
    faults.push({
      code: 'missing-key',
      place: place('quantity'),
      got: 'nothing: the key is missing',
      expected: `a whole number from 1 to ${MOST_COILS}`,
      todo: 'add the key quantity',
    });
    return 1;
  });
  const total = quantities.reduce((sum, one) => sum + one, 0);
  if (total > MOST_COILS)
    return {
      entries: [],
      faults: [
        ...faults,
        {
          code: 'too-many-coils',
          place: { ...written[0]!.place('quantity'), key: undefined },
          got: `${total} coils in one lot`,
          expected: `at most ${MOST_COILS}`,
          todo: `take ${total - MOST_COILS} out, or make two lots`,
        },
      ],
    };
  const asked = written.map(({ entry }, i) => ({
    quantity: quantities[i]!,
    numbering: entry.serials ?? null,
    first: entry['first-serial'] ?? null,
  }));
  const { serials, faults: found } = numberLot(asked, about.pattern, about.first, about.name);
  for (const { at, other, key, code, got, expected, todo } of found) {
    const line = other === undefined ? undefined : written[other]!.place('job').line;
    const again = other === at ? ', in the same list' : `, after line ${line}`;
    faults.push({
      code,
      place: written[at]!.place(key),
      got: other === undefined ? got : `${got}${again}`,
      expected,
      todo,
    });
  }
  const entries = written.map(
    ({ entry: { job }, place }, i): LotFileEntry => ({
      path: about.table === undefined ? job : readFromFolder(about.table, job),
      readFrom: readFromFolder(about.file, job),
      quantity: quantities[i]!,
      serials: serials[i]!,
      place: place('job'),
    }),
  );
  return { entries, faults };
}
