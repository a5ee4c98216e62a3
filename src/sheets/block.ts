/** Pieces of a page, measured before they are placed. The origin of a block is its upper left corner, Y up (so below 0). */
import type { Measure } from '../drawing/boxes.ts';
import type { Shape } from '../drawing/drawing.ts';
import { BODY_MM, CAP_SHARE, label, moved, rectangle, SMALL_MM } from '../drawing/shapes.ts';
import { wrap } from './text.ts';

export interface Block {
  readonly widthMm: number;
  readonly heightMm: number;
  readonly shapes: readonly Shape[];
}

export interface Style {
  readonly sizeMm?: number;
  readonly bold?: boolean;
}

/** Baseline to baseline as a share of the size, as a rule and where room is short. */
export const LEADING = 1.3;
const CLOSE_LEADING = 1.2;

export const leadingOf = (measure: Measure): number => measure.leading ?? LEADING;

/** The same type, its lines nearer to one another. */
export const closer = (measure: Measure): Measure => ({
  width: (text, sizeMm, bold) => measure.width(text, sizeMm, bold),
  leading: CLOSE_LEADING,
});

/** Running text in a column. */
export function paragraph(text: string, widthMm: number, measure: Measure, style: Style = {}): Block {
  const sizeMm = style.sizeMm ?? BODY_MM;
  const bold = style.bold ?? false;
  const leading = leadingOf(measure);
  const lines = wrap(text, widthMm, sizeMm, bold, measure);
  const shapes = lines.map((line, i) => label(0, -(CAP_SHARE + 0.1 + i * leading) * sizeMm, line, { sizeMm, bold }));
  return { widthMm, heightMm: lines.length * leading * sizeMm, shapes };
}

export function heading(text: string, widthMm: number, measure: Measure): Block {
  const block = paragraph(text, widthMm, measure, { sizeMm: HEADING_MM, bold: true });
  return { ...block, heightMm: block.heightMm + 1 };
}

/** Type of headings, 10.5 pt. */
const HEADING_MM = (10.5 * 25.4) / 72;

/** An empty box to tick, its lower left corner given. */
export const tickBox = (x: number, y: number): Shape => rectangle(x, y, 3.4, 3.4, 'thin');

/** One below the other. */
export function stack(blocks: readonly Block[], gapMm: number): Block {
  const shapes: Shape[] = [];
  let y = 0;
  let widthMm = 0;
  for (const block of blocks) {
    if (y < 0) y -= gapMm;
    for (const shape of block.shapes) shapes.push(moved(shape, 0, y));
    y -= block.heightMm;
    widthMm = Math.max(widthMm, block.widthMm);
  }
  return { widthMm, heightMm: -y, shapes };
}

/** Side by side, tops in line. */
export function beside(blocks: readonly Block[], gapMm: number): Block {
  const shapes: Shape[] = [];
  let x = 0;
  for (const block of blocks) {
    if (x > 0) x += gapMm;
    for (const shape of block.shapes) shapes.push(moved(shape, x, 0));
    x += block.widthMm;
  }
  return { widthMm: x, heightMm: Math.max(0, ...blocks.map((block) => block.heightMm)), shapes };
}

/** A list in one column: mark, then text that hangs. */
export function list(
  items: readonly { mark: string; text: string }[],
  widthMm: number,
  measure: Measure,
  sizeMm = SMALL_MM,
): Block[] {
  const indent = Math.max(3, ...items.map((item) => measure.width(item.mark, sizeMm) + 1.5));
  return items.map((item) => {
    const text = paragraph(item.text, widthMm - indent, measure, { sizeMm });
    const mark = paragraph(item.mark, indent, measure, { sizeMm });
    return beside([{ ...mark, widthMm: indent }, text], 0);
  });
}

/** Items in `columns` columns of about the same height, in order down the first column, then the next. */
export function columns(items: readonly Block[], count: number, gapMm: number, spaceMm: number): Block {
  const widthMm = Math.max(0, ...items.map((item) => item.widthMm));
  const within = (limit: number): Block[][] | null => {
    const found: Block[][] = [[]];
    let height = 0;
    for (const item of items) {
      const last = found[found.length - 1]!;
      const grown = height + (last.length > 0 ? spaceMm : 0) + item.heightMm;
      if (grown <= limit + 1e-9 || last.length === 0) {
        last.push(item);
        height = grown;
      } else {
        found.push([item]);
        height = item.heightMm;
      }
    }
    return found.length <= count ? found : null;
  };
  const total = items.reduce((sum, item) => sum + item.heightMm + spaceMm, 0);
  let limit = total / count;
  while (!within(limit)) limit += 0.5;
  const stacks = within(limit)!.map((each) => ({ ...stack(each, spaceMm), widthMm }));
  return beside(stacks, gapMm);
}
