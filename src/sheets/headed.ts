/** Blocks that were filled into pages, each page under its head: document, what is on it, sheet n of m. */
import type { Measure } from '../drawing/boxes.ts';
import { moved } from '../drawing/shapes.ts';
import type { CoilRecord } from '../record/schema.ts';
import { stack } from './block.ts';
import { PAPER_MM, type Page } from './page.ts';
import { type Body, GAP_MM } from './parted.ts';
import { MARGIN_MM } from './sheet-frame.ts';
import { type Headed, titleBlock } from './title-block.ts';

export interface HeadWords {
  readonly document: string;
  readonly sheet: (n: number, many: number) => string;
  /** What the name in the head is the name of; a job when left out. */
  readonly of?: string;
}

/** `longest` is the widest name of a page: it decides how high the heads are. */
export function headedPages(
  record: Headed & Pick<CoilRecord, 'paper'>,
  { document, sheet, of }: HeadWords,
  longest: string,
  measure: Measure,
  fill: (widthMm: number, heightMm: number) => readonly Body[],
): Page[] {
  const [paperWidth, paperHeight] = PAPER_MM[record.paper];
  const widthMm = paperWidth - 2 * MARGIN_MM.across;
  const headOf = (part: string, n: string) =>
    titleBlock(record, { document, part, sheet: n, ...(of === undefined ? {} : { of }) }, widthMm, measure);
  const head = headOf(longest, sheet(10, 10));
  const bodies = fill(widthMm, paperHeight - 2 * MARGIN_MM.along - head.heightMm - GAP_MM);
  return bodies.map((body, i) => {
    const top = { ...headOf(body.part, sheet(i + 1, bodies.length)), heightMm: head.heightMm };
    const { shapes } = stack([top, ...body.blocks], GAP_MM);
    return {
      widthMm: paperWidth,
      heightMm: paperHeight,
      shapes: shapes.map((shape) => moved(shape, MARGIN_MM.across, paperHeight - MARGIN_MM.along)),
    };
  });
}
