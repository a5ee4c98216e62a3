/**
 * Readings as CSV (RFC 4180: commas, CRLF, quotes doubled), UTF-8 without a mark, a decimal point always, units in ASCII.
 *
 * **Formulas.** Spreadsheets work out a cell that begins with = + - @, a tab or a return. Text that begins so, in the wide
 * forms of these signs too, gets an apostrophe in front, which spreadsheets hide or show but never work out; text that begins
 * with apostrophes and then so gets one more, so that reading takes exactly one off. Columns of numbers (tap, value, low, high)
 * hold nothing but a number or nothing: a negative number stays one and needs no apostrophe.
 */
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

const GUARDED = /^'*[=+\-@\t\r\n＝＋－＠]/u;
const GUARD = /^'+[=+\-@\t\r\n＝＋－＠]/u;

function textCell(text: string): string {
  const guarded = GUARDED.test(text) ? `'${text}` : text;
  return /[",\r\n]/.test(guarded) ? `"${guarded.replaceAll('"', '""')}"` : guarded;
}

/** @throws RangeError for what is no number: nothing else may stand in a column of them */
function numberCell(value: number | null): string {
  if (value === null) return '';
  if (!Number.isFinite(value)) throw new RangeError(`a reading is a number, got ${value}`);
  return String(value === 0 ? 0 : value);
}

/** The file, header and a line a row, each ended. Same rows, same bytes. */
export function toCsv(rows: readonly ReadingRow[]): string {
  const lines = rows.map((row) =>
    COLUMNS.map((column) => {
      const value = row[column];
      return typeof value === 'string' ? textCell(value) : numberCell(value);
    }).join(','),
  );
  return [COLUMNS.join(','), ...lines].map((line) => `${line}\r\n`).join('');
}

interface Line {
  /** Line of the file that it begins on, from 1. */
  readonly line: number;
  readonly cells: readonly string[];
}

const fault = (line: number, got: string, expected: string, todo: string) =>
  new Fault(3, { code: 'readings-not-read', place: { line }, got, expected, todo });

/** Cells of every line; lone LF ends a line as well, as editors write it. */
function linesOf(text: string): Line[] {
  const lines: Line[] = [];
  let cells: string[] = [];
  let [line, begun, at] = [1, 1, 0];
  while (at < text.length) {
    let cell = '';
    if (text[at] === '"') {
      for (at++; ; at++) {
        if (at >= text.length)
          throw fault(
            begun,
            'a quote that is never closed',
            'a closing quote',
            'save the file anew from the bench page',
          );
        if (text[at] === '\n') line++;
        if (text[at] !== '"') cell += text[at];
        else if (text[at + 1] === '"') {
          cell += '"';
          at++;
        } else break;
      }
      at++;
    } else {
      const end = /[,\r\n]/g;
      end.lastIndex = at;
      const stop = end.exec(text)?.index ?? text.length;
      cell = text.slice(at, stop);
      at = stop;
    }
    cells.push(cell);
    if (text[at] === ',') {
      at++;
      if (at >= text.length) cells.push('');
      else continue;
    } else if (text[at] === '\r' && text[at + 1] === '\n') at += 2;
    else if (text[at] === '\n') at++;
    else if (at < text.length)
      throw fault(line, `${JSON.stringify(text[at])} after a cell`, 'a comma or the end of the line', 'quote the cell');
    lines.push({ line: begun, cells });
    line++;
    begun = line;
    cells = [];
  }
  return lines;
}

/** As numbers are written here; a comma for the point is refused, not guessed at. */
const NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i;

function read(column: Column, cell: string, line: number): string | number | null {
  if (!NUMBERS.has(column)) return GUARD.test(cell) ? cell.slice(1) : cell;
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
  const lines = linesOf(text.replace(/^\ufeff/, '')).filter(({ cells }) => cells.length > 1 || cells[0]!.trim() !== '');
  const head = lines[0]?.cells.map((cell) => cell.trim()) ?? [];
  const missing = COLUMNS.filter((column) => !head.includes(column));
  if (missing.length > 0)
    throw fault(
      1,
      `a header without ${missing.join(', ')}`,
      `the columns ${COLUMNS.join(', ')}`,
      'save the readings from the bench page, with commas between the cells',
    );
  return lines.slice(1).map(({ line, cells }) => {
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

function conditionOf({ quantity, capacitancePf, frequencyKhz }: Question, celsius: number | null): string {
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
    quantity: tap === null ? `${quantity} ${key}` : quantity,
    condition: conditionOf(question, celsius),
    value,
    unit: ASCII_UNITS[unit] ?? unit,
    low,
    high,
    verdict,
    remark,
  };
}
