/** Tables: every cell measured, rows as high as their highest cell, blanks to write in and boxes to tick. */
import type { Measure } from '../drawing/boxes.ts';
import type { Shape } from '../drawing/drawing.ts';
import { BODY_MM, CAP_SHARE, label, line, rectangle, SMALL_MM } from '../drawing/shapes.ts';
import { type Block, leadingOf, tickBox } from './block.ts';
import { wrap } from './text.ts';

export interface Column {
  readonly head: string;
  readonly widthMm: number;
  readonly align?: 'left' | 'centre' | 'right';
  /** `blank` is a place to write in, `tick` a box; their cells hold nothing. */
  readonly kind?: 'text' | 'blank' | 'tick';
  readonly bold?: boolean;
}

export interface TableOptions {
  readonly rowMm?: number;
  readonly sizeMm?: number;
}

/** Left free beside every cell's text, and the least of it where the figures would not go into the width otherwise. */
const PAD_MM = [1.2, 1, 0.8, 0.6] as const;
/** Least width of a column of boxes. */
const TICK_MM = 4.4;
/** In a column of boxes: this row has none. */
export const NO_BOX = '-';

/** Widths that fill `totalMm` in the given shares. */
export function shares(totalMm: number, parts: readonly number[]): number[] {
  const sum = parts.reduce((all, part) => all + part, 0);
  return parts.map((part) => (totalMm * part) / sum);
}

/** Where a cell's text is set, and how it is aligned there. */
function place(column: Column, x: number, pad: number): { x: number; align: 'left' | 'centre' | 'right' } {
  const align = column.align ?? 'left';
  const at = align === 'left' ? x + pad : align === 'right' ? x + column.widthMm - pad : x + column.widthMm / 2;
  return { x: at, align };
}

function cellLines(
  column: Column,
  text: string,
  sizeMm: number,
  bold: boolean,
  pad: number,
  measure: Measure,
): string[] {
  return wrap(text, column.widthMm - 2 * pad, sizeMm, bold, measure);
}

/** Widths at which no word of a head and no figure (in columns that are centred or to the right) is broken, without the room beside it. */
function leastWidths(
  columns: readonly Column[],
  rows: readonly (readonly string[])[],
  sizeMm: number,
  measure: Measure,
): number[] {
  return columns.map((column, c) => {
    const words = (column.align ?? 'left') === 'left' ? [] : rows.flatMap((row) => (row[c] ?? '').split('\n'));
    const head = column.head.split(' ').map((word) => measure.width(word, SMALL_MM, true));
    const cells = words.map((word) => measure.width(word, sizeMm, column.bold));
    return Math.max(...head, ...cells) + 0.01;
  });
}

/**
 * Columns in which nothing is broken: one that is too narrow takes what it lacks from those that have some to spare, and all have
 * less room beside their text where that does not do.
 */
function fitted(
  asked: readonly Column[],
  rows: readonly (readonly string[])[],
  sizeMm: number,
  measure: Measure,
): { columns: Column[]; pad: number } {
  const bare = leastWidths(asked, rows, sizeMm, measure);
  const total = asked.reduce((sum, column) => sum + column.widthMm, 0);
  const leastAt = (pad: number) =>
    asked.map((column, c) => Math.max(bare[c]! + 2 * pad, column.kind === 'tick' ? TICK_MM : 0));
  const sum = (widths: readonly number[]) => widths.reduce((all, width) => all + width, 0);
  const pad = PAD_MM.find((each) => sum(leastAt(each)) <= total) ?? PAD_MM.at(-1)!;
  const least = leastAt(pad);
  const lacking = sum(asked.map((column, c) => Math.max(0, least[c]! - column.widthMm)));
  const spare = sum(asked.map((column, c) => Math.max(0, column.widthMm - least[c]!)));
  const share = spare > 0 ? Math.min(1, lacking / spare) : 0;
  const columns = asked.map((column, c) => {
    const over = column.widthMm - least[c]!;
    return { ...column, widthMm: over < 0 ? least[c]! : column.widthMm - over * share };
  });
  return { columns, pad };
}

export function table(
  asked: readonly Column[],
  rows: readonly (readonly string[])[],
  measure: Measure,
  options: TableOptions = {},
): Block {
  const sizeMm = options.sizeMm ?? BODY_MM;
  const rowMm = options.rowMm ?? 5.2;
  const leading = leadingOf(measure);
  const { columns, pad } = fitted(asked, rows, sizeMm, measure);
  const widthMm = columns.reduce((sum, column) => sum + column.widthMm, 0);
  const shapes: Shape[] = [];
  const heads = columns.map((column) => cellLines(column, column.head, SMALL_MM, true, pad, measure));
  const deepest = Math.max(...heads.map((lines) => lines.length));
  const headMm = deepest * SMALL_MM * leading + 1.6;
  shapes.push(rectangle(0, -headMm, widthMm, headMm, 'hair', 0.92));
  let x = 0;
  columns.forEach((column, c) => {
    const lines = heads[c]!;
    const at = place(column, x, pad);
    lines.forEach((text, i) => {
      const up = (lines.length - 1 - i) * SMALL_MM * leading;
      shapes.push(label(at.x, -headMm + 1.5 + up, text, { align: at.align, bold: true }));
    });
    x += column.widthMm;
  });
  let y = -headMm;
  for (const row of rows) {
    const cells = columns.map((column, c) =>
      cellLines(column, row[c] ?? '', sizeMm, column.bold ?? false, pad, measure),
    );
    const most = Math.max(...cells.map((lines) => lines.length));
    const height = Math.max(rowMm, most * sizeMm * leading + (most > 1 ? 1.2 : 0.4));
    x = 0;
    columns.forEach((column, c) => {
      if (column.kind === 'tick') {
        if (row[c] !== NO_BOX) shapes.push(tickBox(x + column.widthMm / 2 - 1.7, y - height / 2 - 1.7));
      } else if (column.kind !== 'blank') {
        const lines = cells[c]!;
        const at = place(column, x, pad);
        const middle = y - height / 2 + ((lines.length - 1) * sizeMm * leading) / 2;
        lines.forEach((text, i) => {
          if (text === '') return;
          const base = middle - i * sizeMm * leading - (CAP_SHARE * sizeMm) / 2;
          shapes.push(label(at.x, base, text, { align: at.align, sizeMm, bold: column.bold ?? false }));
        });
      }
      x += column.widthMm;
    });
    y -= height;
    shapes.push(line(0, y, widthMm, y, 'hair'));
  }
  // Blanks stand between rules, so that it is plain where to write.
  x = 0;
  for (const column of columns) {
    if (column.kind === 'blank')
      shapes.push(line(x, -headMm, x, y, 'hair'), line(x + column.widthMm, -headMm, x + column.widthMm, y, 'hair'));
    x += column.widthMm;
  }
  shapes.push(
    line(0, 0, widthMm, 0, 'thin'),
    line(0, -headMm, widthMm, -headMm, 'thin'),
    line(0, y, widthMm, y, 'thin'),
  );
  return { widthMm, heightMm: -y, shapes };
}
