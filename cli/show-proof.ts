/** What `prove` says: coils that passed, failed and lack readings, what to do, what the coils have in common, what was written. */

import type { ProofRecord } from '../src/prove/schema.ts';
import type { Output } from '../src/record/listing.ts';
import { RESCUE } from '../templates/wording/proof.ts';
import { inAscii } from './show-survey.ts';
import { lay, wrap } from './table.ts';

/** Failing coils that are shown one by one; all stand on the sheet. */
const MOST_COILS = 12;
/** Notes on the file that are shown. */
const MOST_NOTES = 20;

/** Plain text, no wider than `columns` where words allow. */
export function showProof(
  { record, files }: Output<ProofRecord>,
  folder: string,
  columns: number,
  plain: boolean,
): string {
  const { kinds, tally } = record;
  const rows = kinds.map(({ job, tally: { coils, pass, fail, missing } }) => [
    job,
    ...[coils, pass, fail, missing].map(String),
  ]);
  if (kinds.length > 1) rows.push(['all', ...[tally.coils, tally.pass, tally.fail, tally.missing].map(String)]);
  const table = lay(['kind', 'coils', 'pass', 'fail', 'missing'], rows, [false, true, true, true, true]);
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
  const sections = [
    table,
    list('Coils that fail', told, columns),
    list('What the coils have in common', common, columns),
    [
      `Written to ${folder}:`,
      ...lay(
        ['file', 'what for'],
        files.map(({ path, note }) => [path, note]),
        [false, false],
      )
        .slice(2)
        .map((line) => `  ${line}`),
    ],
  ];
  const text = sections
    .filter((lines) => lines.length > 0)
    .map((lines) => lines.join('\n'))
    .join('\n\n');
  return `${plain ? inAscii(text) : text}\n`;
}

/** Lines of the file that were left out or are to be looked at, for standard error; empty when every line was understood. */
export function showNotes({ notes, count, input }: ProofRecord, columns: number): string {
  if (notes.length === 0) return '';
  const ordered = [...notes].sort((a, b) => Number(a.fate === 'kept') - Number(b.fate === 'kept') || a.line - b.line);
  const items = ordered.slice(0, MOST_NOTES).map(({ line, column, fate, got, expected, todo }) => {
    const place = column === null || column === '' ? `line ${line}` : `line ${line}, ${column}`;
    return `${place}, ${fate}: ${got}; expected ${expected}; ${todo}`;
  });
  if (notes.length > MOST_NOTES) items.push(`and ${notes.length - MOST_NOTES} more, in proof.json`);
  const head = `${input.file}: ${count.leftOut} of ${count.figures - count.missing} figures left out`;
  return `${list(head, items, columns).join('\n')}\n`;
}

function list(title: string, items: readonly string[], columns: number): string[] {
  if (items.length === 0) return [];
  return [
    ...wrap(title, columns),
    ...items.flatMap((text) => wrap(text, columns - 4).map((line, i) => (i === 0 ? `  - ${line}` : `    ${line}`))),
  ];
}
