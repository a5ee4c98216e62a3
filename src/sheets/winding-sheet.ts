/**
 * The winding sheet: page 1 to wind from, page 2 to check by; more pages only when the content does not fit. It reads
 * the record and nothing else: same record, same bytes.
 */
import { STEPS, TITLE } from '../../templates/wording/winding-sheet.ts';
import type { Box, Measure } from '../drawing/boxes.ts';
import type { Shape } from '../drawing/drawing.ts';
import { BODY_MM, moved, SMALL_MM } from '../drawing/shapes.ts';
import type { CoilRecord } from '../record/schema.ts';
import { type Block, beside, columns, heading, stack } from './block.ts';
import * as check from './check-blocks.ts';
import * as advice from './check-blocks-advice.ts';
import { twoCapacitors } from './check-blocks-line.ts';
import { PAPER_MM, type Page, Paper } from './page.ts';
import { titleBlock } from './title-block.ts';
import * as wind from './wind-blocks.ts';

/** Left free round every sheet: across, and along. */
export const MARGIN_MM = { across: 12, along: 11 } as const;
const GAP = 3.5;
const COLUMN_GAP = 6;

/** A sheet without its head: what it is called, and its blocks from the top. */
interface Body {
  readonly part: string;
  readonly blocks: Block[];
  /** Stands at the foot of the sheet. */
  readonly foot?: Block;
}

interface Room {
  readonly widthMm: number;
  readonly heightMm: number;
}

const height = (blocks: readonly Block[]) =>
  blocks.reduce((sum, block) => sum + block.heightMm, Math.max(0, blocks.length - 1) * GAP);
const present = (block: Block | null): Block[] => (block === null ? [] : [block]);

/** A page in two columns over an optional foot that takes the whole width. */
interface Arrangement {
  readonly left: readonly Block[];
  readonly right: readonly Block[];
  readonly foot?: Block;
}

function fits(arrangement: Arrangement, heightMm: number): boolean {
  const foot = arrangement.foot ? arrangement.foot.heightMm + GAP : 0;
  return Math.max(height(arrangement.left), height(arrangement.right)) + foot <= heightMm + 1e-9;
}

/** Steps under their heading, in one column or two. */
function stepsBlock(items: readonly Block[], words: string, count: 1 | 2, gapMm: number, measure: Measure): Block {
  const head = heading(words, items[0]!.widthMm, measure);
  return stack([head, columns(items, count, COLUMN_GAP, gapMm)], 0.3);
}

/** Height of the drawing of the coil on page 1, the largest first. */
const DRAWING_MM = [90, 84, 72, 60, 48, 42, 30];
/** How closely the rest is set: a row of the tap table, the space between steps, and their type. */
const CLOSENESS = [
  { rowMm: 5.4, gapMm: 1.4, sizeMm: BODY_MM },
  { rowMm: 5, gapMm: 1, sizeMm: BODY_MM },
  { rowMm: 4.7, gapMm: 0.6, sizeMm: BODY_MM },
  { rowMm: 4.5, gapMm: 0.4, sizeMm: BODY_MM },
  { rowMm: 4.5, gapMm: 0.4, sizeMm: SMALL_MM },
] as const;

/** The most leading steps that `holds` lets pass; 0 when not one. */
function mostSteps(items: readonly Block[], holds: (first: readonly Block[]) => boolean): number {
  let count = items.length;
  while (count > 0 && !holds(items.slice(0, count))) count--;
  return count;
}

/** Steps that found no place on the first page, in two columns a page. */
function moreSteps(rest: readonly Block[], first: boolean, heightMm: number, measure: Measure): Body[] {
  const bodies: Body[] = [];
  let left = rest;
  while (left.length > 0) {
    const words = first && bodies.length === 0 ? STEPS.heading : STEPS.more;
    const count = Math.max(
      1,
      mostSteps(left, (some) => stepsBlock(some, words, 2, 1.4, measure).heightMm <= heightMm),
    );
    bodies.push({ part: TITLE.more, blocks: [stepsBlock(left.slice(0, count), words, 2, 1.4, measure)] });
    left = left.slice(count);
  }
  return bodies;
}

/** Least height of a row of the tap table where it is long. */
const TAP_ROW_MM = 4.7;

/** The tap table in parts that are no higher than a page. */
function tapTables(record: CoilRecord, widthMm: number, heightMm: number, measure: Measure): [Block, ...Block[]] {
  const rows = wind.tapRows(record);
  const part = (from: number, count: number) =>
    wind.tapTable(record, widthMm, TAP_ROW_MM, measure, from, Math.min(from + count, rows));
  const whole = part(0, rows);
  if (whole.heightMm <= heightMm) return [whole];
  const least = part(rows - 1, 1).heightMm;
  const most = 1 + Math.floor((heightMm - least) / ((whole.heightMm - least) / (rows - 1)));
  const more: Block[] = [];
  for (let from = most; from < rows; from += most) more.push(part(from, most));
  return [part(0, most), ...more];
}

function pairs(blocks: readonly Block[]): Block[][] {
  return Array.from({ length: Math.ceil(blocks.length / 2) }, (_, i) => blocks.slice(2 * i, 2 * i + 2));
}

/** Page 1: of the arrangements that hold everything the first, set as widely as it allows; else the steps run on. */
function toWindFrom(record: CoilRecord, room: Room, measure: Measure): Body[] {
  const column = (room.widthMm - COLUMN_GAP) / 2;
  const strip = wind.facts(record, room.widthMm, measure);
  const free = room.heightMm - strip.heightMm - GAP;
  const method = wind.tapMethod(record, column, measure);
  const brief = wind.tapMethod(record, column, measure, true);
  const angles = present(wind.tapAngles(record, column, measure));
  const wide = wind.cautions(record, room.widthMm, 2, measure);
  const narrow = wind.cautions(record, column, 1, measure);
  const items = wind.stepItems(record, column, measure);
  const page = ({ left, right, foot }: Arrangement): Body => ({
    part: TITLE.wind,
    blocks: [strip, beside([{ ...stack(left, GAP), widthMm: column }, stack(right, GAP)], COLUMN_GAP)],
    ...(foot ? { foot } : {}),
  });
  // Most sheets take the first size: the others are drawn only when asked for.
  const drawn: Block[] = [];
  const drawingOf = (size: number) => {
    drawn[size] ??= wind.coilDrawing(record, column, DRAWING_MM[size]!, measure);
    return drawn[size];
  };
  for (const { rowMm, gapMm, sizeMm } of CLOSENESS) {
    const items = wind.stepItems(record, column, measure, sizeMm);
    const taps = wind.tapTable(record, column, rowMm, measure, 0, undefined, sizeMm);
    const steps = stepsBlock(items, STEPS.heading, 1, gapMm, measure);
    for (const size of DRAWING_MM.keys()) {
      const drawing = drawingOf(size);
      const whole: Arrangement[] = [
        { left: [drawing, method, ...angles], right: [taps, steps], foot: wide },
        { left: [drawing, method], right: [taps, ...angles, steps], foot: wide },
        { left: [drawing, ...angles], right: [taps, steps, method], foot: wide },
        { left: [drawing, method, narrow], right: [taps, ...angles, steps] },
        { left: [drawing, method, ...angles, narrow], right: [taps, steps] },
        { left: [drawing, ...angles, narrow], right: [taps, steps, method] },
        { left: [drawing, taps], right: [steps, method, ...angles], foot: wide },
        { left: [drawing, taps, ...angles], right: [steps, method], foot: wide },
        // The pictures alone tell how a tap is made, when there is no room for more.
        ...(sizeMm === SMALL_MM
          ? [
              { left: [drawing, brief, ...angles], right: [taps, steps], foot: wide },
              { left: [drawing, brief], right: [taps, ...angles, steps], foot: wide },
              { left: [drawing, taps], right: [steps, brief, ...angles], foot: wide },
              { left: [drawing, taps, ...angles], right: [steps, brief], foot: wide },
              { left: [drawing, taps], right: [steps, brief, ...angles, narrow] },
              { left: [drawing, brief, narrow], right: [taps, ...angles, steps] },
            ]
          : []),
      ];
      const found = whole.find((each) => fits(each, free));
      if (found) return [page(found)];
    }
  }

  // Not all of it fits: the steps run on over the next pages, and what is left finds its place there too.
  const [taps, ...moreTaps] = tapTables(record, column, free, measure);
  const some: ((drawing: Block) => Arrangement)[] = [
    (drawing) => ({ left: [drawing, method, ...angles], right: [taps], foot: wide }),
    (drawing) => ({ left: [drawing, method], right: [taps, ...angles], foot: wide }),
    (drawing) => ({ left: [drawing, method, narrow], right: [taps, ...angles] }),
    (drawing) => ({ left: [drawing, method], right: [taps], foot: wide }),
    (drawing) => ({ left: [drawing, narrow], right: [taps, ...angles] }),
    (drawing) => ({ left: [drawing], right: [taps], foot: wide }),
  ];
  const tries = some.flatMap((arranged) => [1, 2, 3, 4, 6].map((size) => arranged(drawingOf(size))));
  const first = tries.find((each) => fits(each, free)) ?? { left: [drawingOf(3)], right: [taps] };
  const under = (begun: readonly Block[]) => ({
    ...first,
    right: [...first.right, stepsBlock(begun, STEPS.heading, 1, 1, measure)],
  });
  const most = mostSteps(items, (begun) => fits(under(begun), free));
  // A few steps torn off from the rest are worse than all of them on the next page.
  const count = most >= 4 ? most : 0;
  const placed = new Set([...first.left, ...first.right, first.foot, ...(first.left.includes(narrow) ? [wide] : [])]);
  const bodies: Body[] = [
    page(count > 0 ? under(items.slice(0, count)) : first),
    ...pairs(moreTaps).map((pair) => ({ part: TITLE.more, blocks: [beside(pair, COLUMN_GAP)] })),
    ...moreSteps(items.slice(count), count === 0, room.heightMm, measure),
  ];
  for (const block of [method, ...angles, wide]) {
    if (placed.has(block)) continue;
    const last = bodies[bodies.length - 1]!;
    if (bodies.length > 1 && height([...last.blocks, block]) <= room.heightMm) last.blocks.push(block);
    else bodies.push({ part: TITLE.more, blocks: [block] });
  }
  return bodies;
}

/** How the page to check by is set, the widest first: a row to write in, and the graph. */
const CHECK_SIZES = [
  { rowMm: 6.6, graphMm: 58 },
  { rowMm: 6.6, graphMm: 48 },
  { rowMm: 6, graphMm: 42 },
  { rowMm: 5.4, graphMm: 36 },
  { rowMm: 4.9, graphMm: 36 },
  { rowMm: 4.9, graphMm: 30 },
  { rowMm: 4.8, graphMm: 25 },
  { rowMm: 4.8, graphMm: 21 },
] as const;
/** Share of the width that the left column takes. */
const CHECK_SHARE = 0.48;

/** Taps whose advice goes into their rows, where one unit of length leaves the room. */
const ADVISED_FROM = 9;

/** The page to check by: the taps over the whole width, below them two columns. Null when one page does not hold it. */
function checkPage(record: CoilRecord, room: Room, measure: Measure): Body | null {
  const many = record.windings[0]!.taps.length >= ADVISED_FROM && record.units !== 'both';
  return (
    (many ? null : checkPageWith(record, room, measure, false)) ??
    (record.units === 'both' ? null : checkPageWith(record, room, measure, true))
  );
}

function checkPageWith(record: CoilRecord, room: Room, measure: Measure, advised: boolean): Body | null {
  const settings = check.settings(record, room.widthMm, 4.9, measure);
  const sign = check.signature(room.widthMm, measure);
  const left = (room.widthMm - COLUMN_GAP) * CHECK_SHARE;
  const right = room.widthMm - COLUMN_GAP - left;
  const doing = advice.corrections(record, right, measure);
  const sections = advised ? [] : advice.sections(record, right, measure);
  const sizes = check.formerSizes(record, left, measure);
  for (const { rowMm, graphMm } of CHECK_SIZES) {
    const wide = [...check.tapChecks(record, room.widthMm, rowMm, measure, advised), ...settings];
    const free = room.heightMm - height(wide) - sign.heightMm - 2 * GAP;
    if (free < 0) continue;
    const before = check.checks(record, left, rowMm, measure);
    const line = twoCapacitors(record, left, graphMm, measure);
    const tries: Arrangement[] = [
      { left: [before, ...line, sizes], right: [doing, ...sections] },
      { left: [...line, sizes], right: [check.checks(record, right, rowMm, measure), doing, ...sections] },
      { left: [before, ...line], right: [doing, ...sections] },
      { left: line, right: [check.checks(record, right, rowMm, measure), doing, ...sections] },
    ];
    const found = tries.find((each) => fits(each, free));
    if (!found) continue;
    const columns = beside([{ ...stack(found.left, GAP), widthMm: left }, stack(found.right, GAP)], COLUMN_GAP);
    return { part: TITLE.check, blocks: [...wide, columns], foot: sign };
  }
  return null;
}

/** Blocks over as many pages as they need. */
function flow(blocks: readonly Block[], first: string, more: string, heightMm: number): Body[] {
  const bodies: Body[] = [];
  let here: Block[] = [];
  const close = () => bodies.push({ part: bodies.length === 0 ? first : more, blocks: here });
  for (const block of blocks) {
    if (here.length > 0 && height([...here, block]) > heightMm) {
      close();
      here = [];
    }
    here.push(block);
  }
  close();
  return bodies;
}

/** Page 2; with more taps than it holds, as many pages as they need: the taps first, then what to do about them. */
function toCheckBy(record: CoilRecord, room: Room, measure: Measure): Body[] {
  const page = checkPage(record, room, measure);
  if (page !== null) return [page];
  const half = (room.widthMm - COLUMN_GAP) / 2;
  const { rowMm, graphMm } = CHECK_SIZES[2];
  const blocks = [
    ...check.tapChecks(record, room.widthMm, CHECK_SIZES[3].rowMm, measure),
    ...check.settings(record, room.widthMm, 5.2, measure),
    ...pairs([
      stack([check.checks(record, half, rowMm, measure), check.formerSizes(record, half, measure)], GAP),
      stack(twoCapacitors(record, half, graphMm, measure), GAP),
    ]).map((pair) => beside(pair, COLUMN_GAP)),
    advice.corrections(record, room.widthMm, measure),
    ...advice.sections(record, room.widthMm, measure),
    check.signature(room.widthMm, measure),
  ];
  return flow(blocks, TITLE.check, TITLE.checkMore, room.heightMm);
}

/** The pages as drawings. */
export function layOutWindingSheet(record: CoilRecord, measure: Measure): Page[] {
  const [paperWidth, paperHeight] = PAPER_MM[record.paper];
  const widthMm = paperWidth - 2 * MARGIN_MM.across;
  const headOf = (part: string, sheet: string) =>
    titleBlock(record, { document: TITLE.document, part, sheet }, widthMm, measure);
  const head = headOf(TITLE.more, TITLE.sheet(10, 10));
  const room = { widthMm, heightMm: paperHeight - 2 * MARGIN_MM.along - head.heightMm - GAP };
  const bodies = [...toWindFrom(record, room, measure), ...toCheckBy(record, room, measure)];
  return bodies.map((body, i) => {
    const top = { ...headOf(body.part, TITLE.sheet(i + 1, bodies.length)), heightMm: head.heightMm };
    const content = stack([top, ...body.blocks], GAP);
    const shapes: Shape[] = content.shapes.map((shape) =>
      moved(shape, MARGIN_MM.across, paperHeight - MARGIN_MM.along),
    );
    if (body.foot)
      for (const shape of body.foot.shapes)
        shapes.push(moved(shape, MARGIN_MM.across, MARGIN_MM.along + body.foot.heightMm));
    return { widthMm: paperWidth, heightMm: paperHeight, shapes };
  });
}

/** What a page keeps free of ink. */
export function sheetFrame(page: Page): Box {
  return {
    left: MARGIN_MM.across,
    right: page.widthMm - MARGIN_MM.across,
    bottom: MARGIN_MM.along,
    top: page.heightMm - MARGIN_MM.along,
  };
}

/** The winding sheet of a record as the bytes of a PDF. */
export async function windingSheet(record: CoilRecord): Promise<Uint8Array> {
  const paper = new Paper({
    title: `${TITLE.document}: ${record.job}`,
    subject: TITLE.record(record.hash.slice(0, 12)),
  });
  return paper.write(layOutWindingSheet(record, paper));
}
