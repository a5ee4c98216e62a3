/**
 * Readings as CSV (see csv/write.ts, also for what is done about formulas), UTF-8 without a mark, units in ASCII. Columns of
 * numbers (tap, value, low, high) hold nothing but a number or nothing.
 */
import { readCsv } from '../csv/read.ts';
import { csvText, unguarded } from '../csv/write.ts';
import { Fault } from '../fault.ts';
import type { Judgement, Question, ReadingRow } from './api.ts';

type Column = keyof ReadingRow;

/** In the order of the file; its header is these names. The unit of each figure has a column of its own. */
export const COLUMNS = [
  'record',
  'serial',
  'tap',
  'quantity',
  'condition',
  'value',
  'unit',
  'low',
  'high',
  'verdict',
  'remark',
] as const satisfies readonly Column[];

const NUMBERS: ReadonlySet<Column> = new Set<Column>(['tap', 'value', 'low', 'high']);

/**
 * The file, header and a line a row, each ended. Same rows, same bytes.
 * @throws RangeError for what is no number in a column of them
 */
export function toCsv(rows: readonly ReadingRow[]): string {
  return csvText([COLUMNS, ...rows.map((row) => COLUMNS.map((column) => row[column]))]);
}

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

const ASCII_UNITS: Readonly<Record<string, string>> = { µH: 'uH', Ω: 'ohm' };

export interface About {
  readonly serial: string;
  /** Of the coil, for a resistance. */
  readonly celsius?: number | null;
  readonly remark?: string;
}

/** What the two that are taken with a probe have in the column `condition`. */
const PROBED = 'probe';

function conditionOf({ quantity, capacitancePf, frequencyKhz }: Question, celsius: number | null): string {
  if (quantity === 'probed resonance' || quantity === 'width') return `${capacitancePf} pF, ${PROBED}`;
  if (capacitancePf !== null) return `${capacitancePf} pF`;
  if (frequencyKhz !== null) return `${frequencyKhz} kHz`;
  return quantity === 'resistance' && celsius !== null ? `${celsius} degC` : '';
}

/** The row of a judged reading. `key` of the question tells 20 turns and former, which have no tap, apart. */
export function rowOf(
  record: { readonly hash: string },
  question: Question,
  value: number | null,
  { verdict, low, high }: Judgement,
  { serial, celsius = null, remark = '' }: About,
): ReadingRow {
  const { key, tap, quantity, unit } = question;
  return {
    record: record.hash,
    serial,
    tap,
    quantity: tap === null ? `${quantity} ${key}` : quantity === 'probed resonance' ? 'resonance' : quantity,
    condition: conditionOf(question, celsius),
    value,
    unit: ASCII_UNITS[unit] ?? unit,
    low,
    high,
    verdict,
    remark,
  };
}
