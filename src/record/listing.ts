/** The record with the list of what else is written, as the first of the files itself. */
import { createHash } from 'node:crypto';

export interface OutputFile {
  readonly path: string;
  readonly kind: string;
  readonly bytes: Uint8Array;
  /** For people: size and use, printed after the run. */
  readonly note: string;
}

export interface Output<R> {
  readonly record: R;
  /** plan.json first. */
  readonly files: readonly OutputFile[];
}

const sha256 = (bytes: Uint8Array) => createHash('sha256').update(bytes).digest('hex');

export function listed<R extends { files: { path: string; kind: string; sha256: string }[] }>(
  record: R,
  files: readonly OutputFile[],
): Output<R> {
  const entries = files.map(({ path, kind, bytes }) => ({ path, kind, sha256: sha256(bytes) }));
  const all = { ...record, files: entries };
  const json = new TextEncoder().encode(`${JSON.stringify(all, null, 2)}\n`);
  return { record: all, files: [{ path: 'plan.json', kind: 'json', bytes: json, note: 'the record' }, ...files] };
}
