/** A file of readings read back strictly, as the bench page and a lot write it; `prove` reads much more. */
import type { ReadingRow } from '../../src/bench/api.ts';
import { COLUMNS } from '../../src/bench/readings-csv.ts';
import { readCsv, unguarded } from '../../src/csv/read.ts';
import { Fault } from '../../src/fault.ts';

type Column = keyof ReadingRow;

const NUMBERS: ReadonlySet<Column> = new Set<Column>(['tap', 'value', 'low', 'high']);

const fault = (line: number, got: string, expected: string, todo: string) =>
  new Fault(3, { code: 'readings-not-read', place: { line }, got, expected, todo });

/** As numbers are written here; a comma for the point is refused, not guessed at. */
const NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i;

function read(column: Column, cell: string, line: number): string | number | null {
  if (!NUMBERS.has(column)) return unguarded(cell);
  const text = cell.trim();
  if (text === '') return null;
  if (!NUMBER.test(text))
    throw fault(line, `${column} ${JSON.stringify(cell)}`, 'a number such as 12.5', 'write it with a decimal point');
  const value = Number(text);
  return value === 0 ? 0 : value;
}

/**
 * Rows of a file of readings. Columns are known by their names in the header, in any order; others are passed over. A mark at
 * the start and empty lines do no harm.
 * @throws Fault (exit 3) where it is not such a file
 */
export function fromCsv(text: string): ReadingRow[] {
  const { separator, header, rows } = readCsv(text, {
    code: 'readings-not-read',
    todo: 'save the file anew from the bench page',
  });
  // As the page writes it; a file with other separators went through hands that may have changed its numbers as well.
  const head = separator === ',' ? header.cells.map((cell) => cell.trim()) : [];
  const missing = COLUMNS.filter((column) => !head.includes(column));
  if (missing.length > 0)
    throw fault(
      1,
      `a header without ${missing.join(', ')}`,
      `the columns ${COLUMNS.join(', ')}`,
      'save the readings from the bench page, with commas between the cells',
    );
  return rows.map(({ line, cells }) => {
    if (cells.length !== head.length)
      throw fault(line, `${cells.length} cells`, `${head.length}, as in the header`, 'quote cells that hold a comma');
    const entries = COLUMNS.map((column) => [column, read(column, cells[head.indexOf(column)]!, line)] as const);
    return Object.fromEntries(entries) as unknown as ReadingRow;
  });
}
