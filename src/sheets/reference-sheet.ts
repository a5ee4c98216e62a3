/**
 * The reference sheet: the chart of what every position tunes, the figures behind it, the switch kinds side by side, and what all
 * was taken with. It reads the record of any verb and nothing else: same record, same bytes.
 */
import { REFERENCE } from '../../templates/wording/reference-sheet.ts';
import type { Box, Measure } from '../drawing/boxes.ts';
import { moved } from '../drawing/shapes.ts';
import type { FiguresRecord } from '../record/survey-schema.ts';
import { type Block, stack } from './block.ts';
import { PAPER_MM, type Page, Paper } from './page.ts';
import * as blocks from './reference-ranges.ts';
import { titleBlock } from './title-block.ts';

/** Left free round every sheet: across, and along. */
const MARGIN_MM = { across: 12, along: 11 } as const;
const GAP = 3;
/** The chart leaves the rest of its page to the table of positions. */
const CHART_SHARE = 0.62;

interface Body {
  readonly part: string;
  readonly blocks: Block[];
}

/** Pages that are filled from the top. */
class Filling {
  readonly bodies: Body[] = [];
  #left = 0;
  readonly #heightMm: number;

  constructor(heightMm: number) {
    this.#heightMm = heightMm;
  }

  page(part: string): void {
    this.bodies.push({ part, blocks: [] });
    this.#left = this.#heightMm;
  }

  get left(): number {
    return this.#left - (this.bodies.at(-1)!.blocks.length > 0 ? GAP : 0);
  }

  put(block: Block, part: string): void {
    if (block.heightMm > this.left + 1e-9) this.page(part);
    this.#left = this.left - block.heightMm;
    this.bodies.at(-1)!.blocks.push(block);
  }

  /** As many groups as the page holds, the rest on the next; two at least, or none. */
  putParted(part: blocks.Parted, name: string): void {
    let from = 0;
    while (from < part.groups.length) {
      let to = part.groups.length;
      while (to > from && part.block(part.groups.slice(from, to), from > 0).heightMm > this.left + 1e-9) to--;
      const some = to - from;
      if (some < Math.min(2, part.groups.length - from) && this.bodies.at(-1)!.blocks.length > 0) {
        this.page(name);
        continue;
      }
      to = Math.max(to, from + 1);
      this.put(part.block(part.groups.slice(from, to), from > 0), name);
      from = to;
    }
  }
}

function fill(record: FiguresRecord, widthMm: number, heightMm: number, measure: Measure): Body[] {
  const pages = new Filling(heightMm);
  pages.page(REFERENCE.chart);
  pages.put(blocks.chart(record, widthMm, heightMm * CHART_SHARE, measure), REFERENCE.chart);
  pages.putParted(blocks.positions(record, widthMm, measure), REFERENCE.figures);
  pages.putParted(blocks.ends(record, widthMm, measure), REFERENCE.figures);
  pages.put(blocks.endsHow(widthMm, measure), REFERENCE.figures);
  const kinds = blocks.kinds(record, widthMm, measure);
  if (kinds !== null) {
    pages.putParted(kinds, REFERENCE.kinds);
    pages.put(stack(blocks.kindNotes(record, widthMm, measure), 0.8), REFERENCE.kinds);
  }
  for (const group of [blocks.taken(record, widthMm, measure), blocks.notes(record, widthMm, measure)])
    if (group.length > 0) putList(pages, group, REFERENCE.kinds);
  return pages.bodies;
}

/** A heading with its items; together when the page holds them, else item by item. */
function putList(pages: Filling, group: readonly Block[], part: string): void {
  const whole = stack(group, 0.5);
  if (whole.heightMm <= pages.left) {
    pages.put(whole, part);
    return;
  }
  const [head, first, ...rest] = group;
  if (head === undefined) return;
  pages.put(first === undefined ? head : stack([head, first], 0.5), part);
  for (const block of rest) pages.put(block, part);
}

/** The pages as drawings. */
export function layOutReferenceSheet(record: FiguresRecord, measure: Measure): Page[] {
  const [paperWidth, paperHeight] = PAPER_MM[record.paper];
  const widthMm = paperWidth - 2 * MARGIN_MM.across;
  const headOf = (part: string, sheet: string) =>
    titleBlock(record, { document: REFERENCE.document, part, sheet }, widthMm, measure);
  const head = headOf(REFERENCE.figures, REFERENCE.sheet(10, 10));
  const bodies = fill(record, widthMm, paperHeight - 2 * MARGIN_MM.along - head.heightMm - GAP, measure);
  return bodies.map((body, i) => {
    const top = { ...headOf(body.part, REFERENCE.sheet(i + 1, bodies.length)), heightMm: head.heightMm };
    const { shapes } = stack([top, ...body.blocks], GAP);
    return {
      widthMm: paperWidth,
      heightMm: paperHeight,
      shapes: shapes.map((shape) => moved(shape, MARGIN_MM.across, paperHeight - MARGIN_MM.along)),
    };
  });
}

/** What a page keeps free of ink. */
export function referenceFrame(page: Page): Box {
  return {
    left: MARGIN_MM.across,
    right: page.widthMm - MARGIN_MM.across,
    bottom: MARGIN_MM.along,
    top: page.heightMm - MARGIN_MM.along,
  };
}

/** The reference sheet of a record as the bytes of a PDF. */
export async function referenceSheet(record: FiguresRecord): Promise<Uint8Array> {
  const paper = new Paper({
    title: `${REFERENCE.document}: ${record.job}`,
    subject: REFERENCE.record(record.hash.slice(0, 12)),
  });
  return paper.write(layOutReferenceSheet(record, paper));
}
