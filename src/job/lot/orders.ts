/** The table of jobs in CSV: `job` and `quantity`, and where wanted `serials` and `first-serial`, a row each. */
import { type CsvRow, isBlank, readCsv, unguarded } from '../../csv/read.ts';
import { Fault, type FaultParts } from '../../fault.ts';
import { cut, type Parsed, visible } from '../../quantity/parse.ts';
import { shown } from '../field.ts';
import { nearest } from '../nearest.ts';
import { readPath } from './path.ts';
import type { ReadEntry } from './schema.ts';
import { LARGEST_NUMBER, MOST_COILS, readNumbering } from './serials.ts';

const COLUMNS = ['job', 'quantity', 'serials', 'first-serial'] as const;
type Column = (typeof COLUMNS)[number];
const NEEDED: readonly Column[] = ['job', 'quantity'];

/** What the columns are called elsewhere. */
const MEANT: Readonly<Record<string, Column>> = {
  file: 'job',
  coil: 'job',
  kind: 'job',
  qty: 'quantity',
  count: 'quantity',
  number: 'quantity',
  pieces: 'quantity',
  pattern: 'serials',
  first: 'first-serial',
};

export interface Ordered {
  readonly entry: ReadEntry;
  readonly line: number;
}

const tidy = (cell: string): string => unguarded(cell).trim();
const keyOf = (cell: string): string => tidy(cell).toLowerCase().replace(/[_ ]+/g, '-');

/** Whether the text begins as such a table does. */
export function looksLikeOrders(text: string): boolean {
  const head = (/^[^\r\n]*/.exec(text.replace(/^\ufeff/, ''))?.[0] ?? '')
    .split(/[,;\t]/)
    .map((cell) => keyOf(cell.replaceAll('"', '')));
  return (
    head.length > 1 && NEEDED.every((column) => head.some((cell) => cell === column || cell.startsWith(`${column}-`)))
  );
}

/** The rows of the table. Rows in which nothing stands are passed over. Throws a {@link Fault} with exit code 3. */
export function readOrders(text: string, file: string): readonly Ordered[] {
  const { header, rows } = readCsv(text, {
    code: 'not-csv',
    todo: 'close the quote, or write a quote inside quotes twice',
    file,
  });
  const at = columnsOf(header, file);
  const faults: FaultParts[] = [];
  const found: Ordered[] = [];
  for (const row of rows) {
    if (isBlank(row)) continue;
    const entry = entryOf(row, at, header.cells.length, file, faults);
    if (entry !== null) found.push({ entry, line: row.line });
  }
  if (faults.length > 0) throw new Fault(3, faults);
  if (found.length === 0)
    throw new Fault(3, {
      code: 'empty',
      place: { file, line: header.line },
      got: 'a table without rows',
      expected: 'a row for each job',
      todo: 'write below the header, for example: low-bench-receiver.yaml,12',
    });
  return found;
}

/** Which cell of a row is which column. */
function columnsOf({ line, cells }: CsvRow, file: string): ReadonlyMap<Column, number> {
  const at = new Map<Column, number>();
  const meantBy = new Set<string | null>();
  const faults: FaultParts[] = [];
  const expected = `the columns ${NEEDED.join(', ')}, and where wanted ${COLUMNS.slice(NEEDED.length).join(', ')}`;
  const fault = (code: string, key: string | undefined, got: string, todo: string) =>
    faults.push({ code, place: { file, line, key }, got, expected, todo });
  cells.forEach((cell, index) => {
    const key = keyOf(cell);
    const column = COLUMNS.find((one) => one === key);
    if (column !== undefined && at.has(column))
      fault('key-twice', column, 'a column that was there before', 'remove one of the two');
    else if (column !== undefined) at.set(column, index);
    else if (key !== '') {
      const meant = MEANT[key] ?? nearest(key, COLUMNS);
      meantBy.add(meant);
      fault(
        'unknown-key',
        visible(cut(key, 80)),
        'a column that is not known',
        meant === null ? 'remove the column' : `did you mean ${meant}?`,
      );
    }
  });
  // One that was called otherwise has been told of.
  const missing = NEEDED.filter((column) => !at.has(column) && !meantBy.has(column));
  if (missing.length > 0)
    fault(
      'missing-key',
      undefined,
      cells.length === 0 ? 'an empty file' : `a header without ${missing.join(' and ')}`,
      `write as the first line: ${NEEDED.join(',')}`,
    );
  if (faults.length > 0) throw new Fault(3, faults);
  return at;
}

function entryOf(
  row: CsvRow,
  at: ReadonlyMap<Column, number>,
  width: number,
  file: string,
  faults: FaultParts[],
): ReadEntry | null {
  const before = faults.length;
  const add = (code: string, key: string | undefined, got: string, expected: string, todo: string) =>
    faults.push({ code, place: { file, line: row.line, key }, got, expected, todo });
  const cell = (column: Column): string => tidy(row.cells[at.get(column) ?? -1] ?? '');
  function take<T>(column: Column, read: (text: string) => Parsed<T>): T | undefined {
    const parsed = read(cell(column));
    if (parsed.ok) return parsed.value;
    add('value', column, parsed.got, parsed.expected, parsed.todo);
    return undefined;
  }
  row.cells.forEach((text, index) => {
    if (text.trim() !== '' && ![...at.values()].includes(index))
      add(
        'cells',
        undefined,
        `${shown(text)} in column ${index + 1}, ${index < width ? 'which has no name' : `of a table of ${width}`}`,
        'a name in the header for every column',
        'remove it, or put quotes around a cell that holds the sign between cells',
      );
  });
  const job = take('job', readPath);
  const serials = cell('serials') === '' ? undefined : take('serials', readNumbering);
  // A list tells how many there are.
  const counted = cell('quantity') === '' && serials !== undefined && 'list' in serials;
  const quantity = counted ? undefined : take('quantity', whole(1, MOST_COILS));
  const first = cell('first-serial') === '' ? undefined : take('first-serial', whole(0, LARGEST_NUMBER));
  if (faults.length > before || job === undefined) return null;
  return {
    job,
    ...(quantity === undefined ? {} : { quantity }),
    ...(serials === undefined ? {} : { serials }),
    ...(first === undefined ? {} : { 'first-serial': first }),
  };
}

/** Digits alone: a comma or a point would part thousands here and decimals there. */
const whole =
  (low: number, high: number) =>
  (text: string): Parsed<number> => {
    const value = /^\d{1,12}$/.test(text) ? Number(text) : Number.NaN;
    if (value >= low && value <= high) return { ok: true, value };
    return {
      ok: false,
      got: shown(text),
      expected: `a whole number from ${low} to ${high}`,
      todo: Number.isNaN(value) ? 'write digits alone' : 'write a number within these limits',
    };
  };
