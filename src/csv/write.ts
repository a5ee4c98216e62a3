/**
 * Tables as CSV (RFC 4180: commas, CRLF, quotes doubled), a decimal point always.
 *
 * **Formulas.** Spreadsheets work out a cell that begins with = + - @, a tab or a return. Text that begins so, in the wide
 * forms of these signs too, gets an apostrophe in front, which spreadsheets hide or show but never work out; text that begins
 * with apostrophes and then so gets one more, so that {@link unguarded} takes exactly one off. A cell given as a number is
 * never guarded: a negative number stays one.
 */

const GUARDED = /^'*[=+\-@\t\r\n＝＋－＠]/u;
const GUARD = /^'+[=+\-@\t\r\n＝＋－＠]/u;
/** Other separators and the mark of UTF-8 are quoted as well: nothing in a header may be taken for what separates. */
const QUOTED = /[",;\t\r\n\ufeff]/;

function textCell(text: string): string {
  const guarded = GUARDED.test(text) ? `'${text}` : text;
  return QUOTED.test(guarded) ? `"${guarded.replaceAll('"', '""')}"` : guarded;
}

function numberCell(value: number): string {
  if (!Number.isFinite(value)) throw new RangeError(`a cell holds a finite number, got ${value}`);
  return String(value === 0 ? 0 : value);
}

export type CsvCell = string | number | null;

/**
 * The file, header first, every line ended. Null is an empty cell. Same rows, same bytes.
 * @throws RangeError for a number that is not finite
 */
export function csvText(rows: readonly (readonly CsvCell[])[]): string {
  return rows.map((row) => `${rowText(row)}\r\n`).join('');
}

function rowText(row: readonly CsvCell[]): string {
  const text = row
    .map((cell) => (cell === null ? '' : typeof cell === 'number' ? numberCell(cell) : textCell(cell)))
    .join(',');
  // A lone blank cell would be an empty line, which readers leave out.
  return row.length === 1 && text.trim() === '' ? `"${text}"` : text;
}

/** The text that {@link csvText} wrote as this cell: without the apostrophe in front of what would be a formula. */
export const unguarded = (cell: string): string => (GUARD.test(cell) ? cell.slice(1) : cell);
