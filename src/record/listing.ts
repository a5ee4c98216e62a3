/** The record with the list of what else is written, as the first of the files itself. */
import { sha256 } from './hash.ts';

export interface OutputFile {
  readonly path: string;
  readonly kind: string;
  readonly bytes: Uint8Array;
  /** For people: size and use, printed after the run. */
  readonly note: string;
}

export interface Output<R> {
  readonly record: R;
  /** The record first. */
  readonly files: readonly OutputFile[];
}

export function listed<R extends { files: { path: string; kind: string; sha256: string }[] }>(
  record: R,
  files: readonly OutputFile[],
  name = 'plan.json',
): Output<R> {
  const entries = files.map(({ path, kind, bytes }) => ({ path, kind, sha256: sha256(bytes) }));
  const all = { ...record, files: entries };
  const json = new TextEncoder().encode(`${JSON.stringify(all, null, 2)}\n`);
  return { record: all, files: [{ path: name, kind: 'json', bytes: json, note: 'the record' }, ...files] };
}
