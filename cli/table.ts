/** Plain tables and paragraphs for a page so many characters wide. */

export interface Column<T> {
  readonly title: string;
  readonly cell: (row: T) => string;
  /** Numbers stand to the right. */
  readonly right?: boolean;
}

const GAP = '  ';

/** Breaks at blanks; a word longer than the page stands alone. */
export function wrap(text: string, columns: number): readonly string[] {
  const lines: string[] = [];
  let line = '';
  for (const word of text.split(' ')) {
    if (line !== '' && line.length + 1 + word.length > columns) {
      lines.push(line);
      line = word;
    } else {
      line = line === '' ? word : `${line} ${word}`;
    }
  }
  return [...lines, line];
}

/** A header, a rule, the rows; columns as wide as their widest cell. */
export function lay(
  header: readonly string[],
  body: readonly (readonly string[])[],
  right: readonly boolean[],
): string[] {
  const rows = [header, ...body];
  const widths = header.map((_, i) => rows.reduce((most, row) => Math.max(most, row[i]!.length), 0));
  const pad = (text: string, i: number) => (right[i] ? text.padStart(widths[i]!) : text.padEnd(widths[i]!));
  const lines = rows.map((row) => row.map(pad).join(GAP).trimEnd());
  return [lines[0]!, widths.map((width) => '-'.repeat(width)).join(GAP), ...lines.slice(1)];
}

/**
 * The rows under their titles, where each comes from (standard, status) behind. On a page too narrow for that, a number
 * leads to a note under the table.
 */
export function layTable<T>(
  rows: readonly T[],
  columns: readonly Column<T>[],
  source: (row: T) => readonly string[],
  pageColumns: number,
): string {
  const right = columns.map((column) => column.right ?? false);
  const titles = columns.map((column) => column.title);
  const cells = rows.map((row) => columns.map((column) => column.cell(row)));
  const sources = rows.map(source);
  const sourceTitles = (sources[0]?.length ?? 0) > 1 ? ['standard', 'status'] : ['status'];
  const wide = lay(
    [...titles, ...sourceTitles],
    cells.map((row, i) => [...row, ...sources[i]!]),
    right,
  );
  if (wide.every((line) => line.length <= pageColumns)) return `${wide.join('\n')}\n`;
  const written = sources.map(([standard, status]) =>
    status === undefined ? `${standard}` : `${standard} (${status})`,
  );
  const notes = [...new Set(written)];
  const narrow = lay(
    [...titles, 'note'],
    cells.map((row, i) => [...row, String(notes.indexOf(written[i]!) + 1)]),
    [...right, true],
  );
  const legend = notes.flatMap((note, i) =>
    wrap(note, pageColumns - 4).map((line, part) => `${part === 0 ? String(i + 1).padStart(2) : '  '}  ${line}`),
  );
  return `${[...narrow, '', ...legend].join('\n')}\n`;
}
