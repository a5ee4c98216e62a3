/**
 * Tables in CSV as programs and spreadsheets write them: RFC 4180 cells between commas, semicolons or tabs, with or without
 * the mark of UTF-8, lines ended by LF, CRLF or CR.
 */
import { Fault } from '../fault.ts';

export { unguarded } from './write.ts';

export interface CsvRow {
  /** Line of the file that it begins on, from 1. */
  readonly line: number;
  /** As written, quotes and doubled quotes resolved; neither trimmed nor unguarded. */
  readonly cells: readonly string[];
}

export interface CsvTable {
  /** What stands most often in the header, outside quotes. */
  readonly separator: ',' | ';' | '\t';
  /** The first line that is not empty; without cells when there is none. */
  readonly header: CsvRow;
  readonly rows: readonly CsvRow[];
}

/** How the file is spoken of when it cannot be read. */
export interface CsvWhat {
  readonly code: string;
  /** What to do about a quote that is never closed. */
  readonly todo: string;
  readonly file?: string | undefined;
}

/**
 * The table. Lines in which nothing stands are left out; a row keeps its own number of cells, and a row of separators alone
 * stays (see {@link isBlank}).
 * @throws Fault (exit 3) with its line: a quote that is never closed, text behind a closing quote
 */
export function readCsv(text: string, what: CsvWhat): CsvTable {
  const source = text.replace(/^\ufeff/, '');
  const separator = separatorOf(source);
  const [header = { line: 1, cells: [] }, ...rows] = rowsOf(source, separator, what);
  return { separator, header, rows };
}

/** Nothing but blanks in any cell: a row that a spreadsheet left behind. */
export const isBlank = ({ cells }: CsvRow): boolean => cells.every((cell) => cell.trim() === '');

/** Two hundred thousand rows of a dozen cells; each takes some dozens of bytes. */
const MOST_CELLS = 4_000_000;
const MOST_COLUMNS = 2000;
const FEWER = 'check that this is the right file; save the table anew without what is empty';

const SEPARATORS = [',', ';', '\t'] as const;

function separatorOf(source: string): CsvTable['separator'] {
  const counts = { ',': 0, ';': 0, '\t': 0 };
  let quoted = false;
  for (const character of source.trimStart()) {
    if (character === '"') quoted = !quoted;
    if (quoted) continue;
    if (character === '\n' || character === '\r') break;
    if (character in counts) counts[character as keyof typeof counts]++;
  }
  return SEPARATORS.reduce((best, one) => (counts[one] > counts[best] ? one : best));
}

/** How many lines a text inside quotes spans beyond its first. */
const breaks = (text: string): number => text.match(/\r\n|\r|\n/g)?.length ?? 0;

function rowsOf(source: string, separator: CsvTable['separator'], what: CsvWhat): CsvRow[] {
  const rows: CsvRow[] = [];
  const plain = new RegExp(`[^${separator}\r\n]*`, 'y');
  const fault = (line: number, got: string, expected: string, todo: string) =>
    new Fault(3, { code: what.code, place: { file: what.file, line }, got, expected, todo });
  let cells: string[] = [];
  let [line, begun, at] = [1, 1, 0];
  let written = false;
  let all = 0;
  const end = () => {
    // An empty row takes as much as one with a cell.
    all += Math.max(1, cells.length);
    if (all > MOST_CELLS) throw fault(begun, `more than ${MOST_CELLS} cells`, 'a table of at most so many', FEWER);
    if (written) rows.push({ line: begun, cells });
    line++;
    begun = line;
    cells = [];
    written = false;
  };
  while (at < source.length || cells.length > 0) {
    if (source[at] === '"') {
      const { cell, next } = quotedCell(source, at);
      if (next === null) throw fault(line, 'a quote that is never closed', 'a closing quote', what.todo);
      line += breaks(source.slice(at, next));
      at = next;
      cells.push(cell);
      written = true;
    } else {
      plain.lastIndex = at;
      const cell = plain.exec(source)![0];
      at += cell.length;
      cells.push(cell);
      if (cell.trim() !== '') written = true;
    }
    if (cells.length > MOST_COLUMNS)
      throw fault(begun, `more than ${MOST_COLUMNS} cells in one line`, 'a line of at most so many', FEWER);
    const stop = source[at];
    if (stop === separator) {
      at++;
      written = true;
      continue;
    }
    if (stop !== undefined && stop !== '\r' && stop !== '\n') {
      const name = separator === ',' ? 'a comma' : separator === ';' ? 'a semicolon' : 'a tab';
      throw fault(line, `${JSON.stringify(stop)} after a cell`, `${name} or the end of the line`, 'quote the cell');
    }
    at += stop === '\r' && source[at + 1] === '\n' ? 2 : 1;
    end();
  }
  return rows;
}

/** The cell whose opening quote is at the place; `next` is behind the closing one, null when there is none. */
function quotedCell(source: string, from: number): { readonly cell: string; readonly next: number | null } {
  const parts: string[] = [];
  for (let at = from + 1; ; ) {
    const quote = source.indexOf('"', at);
    if (quote < 0) return { cell: '', next: null };
    parts.push(source.slice(at, quote));
    if (source[quote + 1] !== '"') return { cell: parts.join(''), next: quote + 1 };
    parts.push('"');
    at = quote + 2;
  }
}

/** Digits in groups of three keep their spaces: common, no-break, thin, narrow no-break, figure. */
const NUMBER = /^([+\-−]?)((?:\d{1,3}(?:[ \u00a0\u2009\u202f\u2007]\d{3})+|\d+)?)(?:[.,](\d*))?(e[+-]?\d+)?$/i;

/**
 * A cell as a number: a decimal point or comma, groups of thousands by spaces only, a true minus too, guarded or not.
 * Null when it is empty; undefined when it is no number. `1,234` is 1.234: a comma is never for thousands.
 */
export function csvNumber(cell: string): number | null | undefined {
  const text = cell.trim().replace(/^'(?=[+\-−])/, '');
  if (text === '') return null;
  const [, sign, whole, part = '', power = ''] = NUMBER.exec(text) ?? [];
  if (whole === undefined || whole + part === '') return undefined;
  const value = Number(`${whole.replace(/\D/g, '')}.${part}${power}`.replace(/^\./, '0.'));
  if (!Number.isFinite(value)) return undefined;
  return sign === '' || sign === '+' || value === 0 ? value : -value;
}
