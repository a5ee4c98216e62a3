/** What `prove` says: coils that passed, failed and lack readings, what to do, what the coils have in common, what was written. */

import type { ProofRecord } from '../src/prove/schema.ts';
import type { Output } from '../src/record/listing.ts';
import { RESCUE } from '../templates/wording/proof.ts';
import { fileList } from './file-list.ts';
import { type Figure, list, type Page, pageText, table } from './page.ts';

/** Failing coils that are shown one by one; all stand on the sheet. */
const MOST_COILS = 12;
/** Notes on the file that are shown. */
const MOST_NOTES = 20;

/** `folder` is where the files went. */
export function showProof({ record, files }: Output<ProofRecord>, folder: string, page: Page): string {
  const { kinds, tally } = record;
  const all = kinds.length > 1 ? [{ job: 'all', tally }] : [];
  const rows = [...kinds, ...all].map(({ job, tally: counts }) => ({ job, ...counts }));
  const failing = kinds.flatMap(({ coils }) => coils.filter(({ rescue }) => rescue !== null));
  const told = failing.slice(0, MOST_COILS).map(({ serial, rescue, taps }) => {
    const { can, causes, actions, out } = rescue!;
    const head = `${serial === '' ? 'no serial' : serial}: can be saved: ${can}.`;
    const stays = out.length === 0 ? [] : [`Outside stay: ${RESCUE.several(out, taps.length)}.`];
    const todo = actions.length === 0 ? [] : [`To do: ${actions.map(({ doing }) => doing).join('; ')}.`];
    return [head, ...causes.slice(0, 2), ...todo, ...stays].join(' ');
  });
  if (failing.length > MOST_COILS) told.push(`and ${failing.length - MOST_COILS} more, on the proof sheet`);
  const common = kinds.flatMap(({ job, systematic }) =>
    (systematic?.diagnosis ?? []).map((text) => (kinds.length > 1 ? `${job}: ${text}` : text)),
  );
  return pageText([
    table(page, 'Finished coils', COUNTS, rows),
    list(page, 'Coils that fail', told, 'trouble'),
    list(page, 'What the coils have in common', common),
    fileList(
      page,
      folder,
      files.map(({ path, bytes, note }) => ({ path, size: bytes.length, note })),
    ),
  ]);
}

type Counts = { readonly job: string } & ProofRecord['tally'];
const COUNTS: readonly Figure<Counts>[] = [
  ['kind', ({ job }) => job, 'left'],
  ['coils', ({ coils }) => `${coils}`],
  ['pass', ({ pass }) => `${pass}`],
  ['fail', ({ fail }) => `${fail}`],
  ['missing', ({ missing }) => `${missing}`],
];

/** Lines of the file that were left out or are to be looked at, for standard error; those left out alone when it is to be quiet. */
export function showNotes({ notes: all, count, input }: ProofRecord, page: Page, quiet: boolean): string {
  const notes = quiet ? all.filter(({ fate }) => fate !== 'kept') : all;
  if (notes.length === 0) return '';
  const ordered = [...notes].sort((a, b) => Number(a.fate === 'kept') - Number(b.fate === 'kept') || a.line - b.line);
  const items = ordered.slice(0, MOST_NOTES).map(({ line, column, fate, got, expected, todo }) => {
    const place = column === null || column === '' ? `line ${line}` : `line ${line}, ${column}`;
    return `${place}, ${fate}: ${got}; expected ${expected}; ${todo}`;
  });
  if (notes.length > MOST_NOTES) items.push(`and ${notes.length - MOST_NOTES} more, in proof.json`);
  const head = `${input.file}: ${count.leftOut} of ${count.figures - count.missing} figures left out`;
  return pageText([list(page, head, items, 'trouble')]);
}
