/** Tables whose rows say where they come from. */
import { type Page, shown } from './page.ts';
import { lay, wrap } from './table.ts';

export interface Column<T> {
  readonly title: string;
  readonly cell: (row: T) => string;
  /** Numbers stand to the right. */
  readonly right?: boolean;
}

/**
 * The rows under their titles, where each comes from (standard, status) behind. On a page too narrow for that, a number
 * leads to a note under the table; on one narrower still, columns go from the right.
 */
export function layTable<T>(
  rows: readonly T[],
  columns: readonly Column<T>[],
  source: (row: T) => readonly string[],
  page: Page,
): string {
  const right = columns.map((column) => column.right ?? false);
  const titles = columns.map((column) => shown(page, column.title));
  const cells = rows.map((row) => columns.map((column) => shown(page, column.cell(row))));
  const sources = rows.map((row) => source(row).map((text) => shown(page, text)));
  const sourceTitles = (sources[0]?.length ?? 0) > 1 ? ['standard', 'status'] : ['status'];
  const fits = (lines: readonly string[]) => lines.every((line) => line.length <= page.columns);
  const wide = lay(
    [...titles, ...sourceTitles],
    cells.map((row, i) => [...row, ...sources[i]!]),
    right,
  );
  if (fits(wide)) return `${wide.join('\n')}\n`;
  const written = sources.map(([standard, status]) =>
    status === undefined ? `${standard}` : `${standard} (${status})`,
  );
  const notes = [...new Set(written)];
  const narrowed = (count: number): readonly string[] => {
    const lines = lay(
      [...titles.slice(0, count), 'note'],
      cells.map((row, i) => [...row.slice(0, count), String(notes.indexOf(written[i]!) + 1)]),
      [...right.slice(0, count), true],
    );
    return count === 1 || fits(lines) ? lines : narrowed(count - 1);
  };
  const legend = notes.flatMap((note, i) =>
    wrap(note, page.columns - 4).map((line, part) => `${part === 0 ? String(i + 1).padStart(2) : '  '}  ${line}`),
  );
  return `${[...narrowed(titles.length), '', ...legend].join('\n')}\n`;
}
