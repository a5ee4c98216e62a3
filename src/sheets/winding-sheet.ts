/**
 * The winding sheet: page 1 to wind from, page 2 to check by; more pages only when the content does not fit. It reads
 * the record and nothing else: same record, same bytes.
 */
import { STEPS, TITLE } from '../../templates/wording/winding-sheet.ts';
import type { Measure } from '../drawing/boxes.ts';
import type { Shape } from '../drawing/drawing.ts';
import { moved, SMALL_MM } from '../drawing/shapes.ts';
import type { CoilRecord } from '../record/schema.ts';
import { type Block, beside, closer, stack } from './block.ts';
import * as check from './check-blocks.ts';
import * as advice from './check-blocks-advice.ts';
import { twoCapacitors } from './check-blocks-line.ts';
import { PAPER_MM, type Page, Paper } from './page.ts';
import { secondBlock } from './second-block.ts';
import { frameOf, MARGIN_MM } from './sheet-frame.ts';
import { titleBlock } from './title-block.ts';
import * as wind from './wind-blocks.ts';
import {
  type Arrangement,
  type Body,
  COLUMN_GAP,
  fits,
  GAP,
  height,
  type Room,
  stepsBlock,
} from './winding-sheet-body.ts';
import { toWindFrom } from './winding-sheet-first.ts';

/** Steps for when all is wound, across the page. */
function stepsBlockOver(items: readonly Block[], measure: Measure): Block {
  return stepsBlock(items, STEPS.after, 2, 0.4, measure);
}

/** How the page to check by is set, the widest first: a row to write in, the graph, the space between blocks and between lines. */
interface CheckSize {
  readonly rowMm: number;
  readonly graphMm: number;
  readonly gapMm?: number;
  readonly close?: true;
}
const CHECK_SIZES: readonly CheckSize[] = [
  { rowMm: 6.6, graphMm: 58 },
  { rowMm: 6.6, graphMm: 48 },
  { rowMm: 6, graphMm: 42 },
  { rowMm: 5.4, graphMm: 36 },
  { rowMm: 4.9, graphMm: 36 },
  { rowMm: 4.9, graphMm: 30 },
  { rowMm: 4.8, graphMm: 25 },
  { rowMm: 4.8, graphMm: 21 },
  { rowMm: 4.5, graphMm: 30, gapMm: 2.5 },
  { rowMm: 4.5, graphMm: 21, gapMm: 2.5 },
  { rowMm: 4.2, graphMm: 36, gapMm: 2 },
  { rowMm: 4.2, graphMm: 28, gapMm: 2 },
  { rowMm: 4.2, graphMm: 20, gapMm: 2 },
  { rowMm: 4.2, graphMm: 36, gapMm: 2, close: true },
  { rowMm: 4.2, graphMm: 28, gapMm: 2, close: true },
  { rowMm: 4.2, graphMm: 20, gapMm: 2, close: true },
];
/** Share of the width that the left column takes, the first that does. */
const CHECK_SHARES = [0.48, 0.44];

/** Taps whose advice goes into their rows, where one unit of length leaves the room. */
const ADVISED_FROM = 9;

/** The page to check by: the taps over the whole width, below them two columns. Null when one page does not hold it. */
function checkPage(record: CoilRecord, room: Room, measure: Measure, first: readonly Block[] = []): Body | null {
  const many = record.windings[0]!.taps.length >= ADVISED_FROM && record.units !== 'both';
  return (
    (many ? null : checkPageWith(record, room, measure, false, first)) ??
    (record.units === 'both' ? null : checkPageWith(record, room, measure, true, first))
  );
}

/** `first` stands above all. */
function checkPageWith(
  record: CoilRecord,
  room: Room,
  measure: Measure,
  advised: boolean,
  first: readonly Block[],
): Body | null {
  const at = ({ rowMm, graphMm, gapMm = GAP, close }: CheckSize): Body | null => {
    const set = close ? closer(measure) : measure;
    const sign = check.signature(room.widthMm, set);
    const wide = [
      ...first,
      ...check.tapChecks(record, room.widthMm, rowMm, set, advised),
      ...check.settings(record, room.widthMm, 4.9, set),
      ...secondBlock(record, room.widthMm, Math.min(rowMm, 4.6), set),
    ];
    const free = room.heightMm + GAP - height(wide, gapMm) - sign.heightMm - 3 * gapMm;
    if (free < 0) return null;
    for (const share of CHECK_SHARES) {
      const left = (room.widthMm - COLUMN_GAP) * share;
      const right = room.widthMm - COLUMN_GAP - left;
      const doing = advice.corrections(record, right, set, Math.min(4.6, rowMm));
      const sections = advised ? [] : advice.sections(record, right, set, Math.min(4.6, rowMm));
      const sizes = check.formerSizes(record, left, set);
      const before = check.checks(record, left, rowMm, set);
      const beforeRight = check.checks(record, right, rowMm, set);
      const line = twoCapacitors(record, left, graphMm, set);
      const tries: Arrangement[] = [
        { left: [before, ...line, sizes], right: [doing, ...sections] },
        { left: [...line, sizes], right: [beforeRight, doing, ...sections] },
        { left: [before, ...line], right: [doing, ...sections] },
        { left: line, right: [beforeRight, doing, ...sections] },
      ];
      const found = tries.find((each) => fits(each, free, gapMm));
      if (!found) continue;
      const columns = beside([{ ...stack(found.left, gapMm), widthMm: left }, stack(found.right, gapMm)], COLUMN_GAP);
      return { part: TITLE.check, blocks: [...wide, columns], foot: sign, gapMm };
    }
    return null;
  };
  // What does not go in at its closest is not tried at every size before.
  const closest = at(CHECK_SIZES.at(-1)!);
  if (closest === null) return null;
  for (const size of CHECK_SIZES) {
    const found = at(size);
    if (found !== null) return found;
  }
  return closest;
}

/** Blocks over as many pages as they need. */
function flow(blocks: readonly Block[], heightMm: number, gapMm: number): Body[] {
  const bodies: Body[] = [];
  let here: Block[] = [];
  const close = () => bodies.push({ part: bodies.length === 0 ? TITLE.check : TITLE.checkMore, blocks: here, gapMm });
  for (const block of blocks) {
    if (here.length > 0 && height([...here, block], gapMm) > heightMm + GAP - gapMm) {
      close();
      here = [];
    }
    here.push(block);
  }
  close();
  return bodies;
}

/**
 * Page 2, `first` above all; with more taps than it holds, as many pages as they need: the taps first, then what to do about them,
 * set as widely as goes without one page more.
 */
function toCheckBy(record: CoilRecord, room: Room, measure: Measure, first: readonly Block[] = []): Body[] {
  const page = checkPage(record, room, measure, first);
  if (page !== null) return [page];
  const half = (room.widthMm - COLUMN_GAP) / 2;
  const sizes = CHECK_SIZES.slice(2);
  const flowed = ({ rowMm, graphMm, gapMm = GAP, close }: CheckSize): Body[] => {
    const set = close ? closer(measure) : measure;
    const pair = [
      stack([check.checks(record, half, rowMm, set), check.formerSizes(record, half, set)], gapMm),
      stack(twoCapacitors(record, half, graphMm, set), gapMm),
    ];
    const blocks = [
      ...first,
      ...check.tapChecks(record, room.widthMm, Math.min(rowMm, 5.4), set),
      ...check.settings(record, room.widthMm, 5.2, set),
      ...secondBlock(record, room.widthMm, Math.min(rowMm, 4.6), set),
      beside(pair, COLUMN_GAP),
      advice.corrections(record, room.widthMm, set),
      ...advice.sections(record, room.widthMm, set),
      check.signature(room.widthMm, set),
    ];
    return flow(blocks, room.heightMm, gapMm);
  };
  const widest = flowed(sizes[0]!);
  const least = flowed(sizes.at(-1)!).length;
  if (widest.length === least) return widest;
  return flowed(sizes.find((size) => flowed(size).length === least)!);
}

/** The list with the fewest entries, the first of its like. */
const fewest = (lists: readonly Body[][]): Body[] =>
  lists.reduce((best, each) => (each.length < best.length ? each : best));

/**
 * All pages. What is done when the coil is wound moves to the page to check by where that saves a page: it is read then, and
 * there is where the measuring that it speaks of stands.
 */
function bodiesOf(record: CoilRecord, room: Room, measure: Measure): Body[] {
  const first = toWindFrom(record, room, measure);
  if (first.length === 1) return [...first, ...toCheckBy(record, room, measure)];
  const shorter = toWindFrom(record, room, measure, 'winding');
  const items = wind.stepItems(record, (room.widthMm - COLUMN_GAP) / 2, measure, SMALL_MM, 'after');
  const after = items.length > 0 ? [stepsBlockOver(items, measure)] : [];
  return fewest([
    [...shorter, ...toCheckBy(record, room, measure, after)],
    [...first, ...toCheckBy(record, room, measure)],
  ]);
}

/** The pages as drawings. */
export function layOutWindingSheet(record: CoilRecord, measure: Measure): Page[] {
  const [paperWidth, paperHeight] = PAPER_MM[record.paper];
  const widthMm = paperWidth - 2 * MARGIN_MM.across;
  const headOf = (part: string, sheet: string) =>
    titleBlock(record, { document: TITLE.document, part, sheet }, widthMm, measure);
  const head = headOf(TITLE.more, TITLE.sheet(10, 10));
  const room = { widthMm, heightMm: paperHeight - 2 * MARGIN_MM.along - head.heightMm - GAP };
  const bodies = bodiesOf(record, room, measure);
  return bodies.map((body, i) => {
    const top = { ...headOf(body.part, TITLE.sheet(i + 1, bodies.length)), heightMm: head.heightMm };
    const content = stack([top, ...body.blocks], body.gapMm ?? GAP);
    const shapes: Shape[] = content.shapes.map((shape) =>
      moved(shape, MARGIN_MM.across, paperHeight - MARGIN_MM.along),
    );
    if (body.foot)
      for (const shape of body.foot.shapes)
        shapes.push(moved(shape, MARGIN_MM.across, MARGIN_MM.along + body.foot.heightMm));
    return { widthMm: paperWidth, heightMm: paperHeight, shapes };
  });
}

export { frameOf as sheetFrame };

/** The winding sheet of a record as the bytes of a PDF. */
export async function windingSheet(record: CoilRecord): Promise<Uint8Array> {
  const paper = new Paper({
    title: `${TITLE.document}: ${record.job}`,
    subject: TITLE.record(record.hash.slice(0, 12)),
  });
  return paper.write(layOutWindingSheet(record, paper));
}
