/**
 * The parts sheet: the list of what is printed and how it was taken, then every part as a dimensioned drawing with pictures
 * from two sides. It reads the record and the pictures and nothing else: same record, same bytes.
 */
import { PARTS_SHEET } from '../../templates/wording/parts-sheet.ts';
import type { Measure } from '../drawing/boxes.ts';
import { boxViews } from '../drawing/parts/box-views.ts';
import { viewsOf } from '../drawing/parts/views.ts';
import type { View } from '../drawing/views.ts';
import type { CoilRecord } from '../record/schema.ts';
import { type Block, beside, paragraph, stack } from './block.ts';
import { type Card, GAP_MM, plain, shifted } from './cards.ts';
import { PAPER_MM, type Page, Paper } from './page.ts';
import { type Picture, partCards } from './parts-sheet-card.ts';
import * as blocks from './parts-sheet-list.ts';
import { frameOf, MARGIN_MM } from './sheet-frame.ts';
import { titleBlock } from './title-block.ts';
import { unitsOf } from './units.ts';

export type { Picture } from './parts-sheet-card.ts';

const GAP = 3.5;
const COLUMN_GAP = 6;

/** A sheet without its head: what it is called, and what stands on it from the top. */
interface Body {
  readonly part: string;
  readonly cards: readonly Card[];
}

const height = (all: readonly Block[], gapMm: number) =>
  all.reduce((sum, each) => sum + each.heightMm, Math.max(0, all.length - 1) * gapMm);

/** A table of `count` rows in parts that are no higher than a page. */
function parted(count: number, heightMm: number, rows: (from: number, to: number) => Block): Block[] {
  const found: Block[] = [];
  for (let from = 0; from < count; ) {
    let to = count;
    while (to > from + 1 && rows(from, to).heightMm > heightMm) to--;
    found.push(rows(from, to));
    from = to;
  }
  return found;
}

interface Room {
  readonly widthMm: number;
  readonly heightMm: number;
}

/** The list and all that belongs to it, over as many pages as it needs. */
function listed(record: CoilRecord, sheetOf: (part: string) => number, room: Room, measure: Measure): Body[] {
  const { widthMm, heightMm } = room;
  if (record.parts.length === 0) return flow([paragraph(PARTS_SHEET.none, widthMm, measure)], heightMm);
  const column = (widthMm - COLUMN_GAP) / 2;
  const tables = [
    ...parted(record.parts.length, heightMm, (from, to) =>
      blocks.partList(record, from, to, sheetOf, widthMm, measure),
    ),
    blocks.totals(record, widthMm, measure),
    ...parted(record.beds.length, heightMm, (from, to) => blocks.bedList(record, from, to, widthMm, measure)),
  ];
  const measured = blocks.finished(record, column, measure);
  const printer = blocks.printer(record, column, measure);
  const narrow = blocks.cautions(record, column, 1, measure);
  const right = measured ? stack([measured, narrow], GAP) : narrow;
  const together = flow([...tables, beside([printer, right], COLUMN_GAP)], heightMm);
  if (together.length === 1 || !measured) return together;
  // What is high moves to the next page whole: cautions of the full width leave more of the rest on this one.
  const wide = blocks.cautions(record, widthMm, 2, measure);
  return flow([...tables, beside([printer, measured], COLUMN_GAP), wide], heightMm);
}

function flow(all: readonly Block[], heightMm: number): Body[] {
  const bodies: Body[] = [];
  let here: Block[] = [];
  const close = () => {
    const part = bodies.length === 0 ? PARTS_SHEET.list : PARTS_SHEET.more;
    bodies.push({ part, cards: [plain(stack(here, GAP))] });
    here = [];
  };
  for (const block of all) {
    if (here.length > 0 && height([...here, block], GAP) > heightMm) close();
    here.push(block);
  }
  close();
  return bodies;
}

/**
 * Cards on pages after those of the list: each where it fits first, so that small parts share what larger ones, and the
 * list, leave free. With each part goes the page on which it begins, counted from 1.
 */
function filled(
  list: readonly Body[],
  parts: readonly (readonly Card[])[],
  room: Room,
): { bodies: Body[]; sheets: number[] } {
  const before = list.length - 1;
  const pages: Card[][] = [[...list[before]!.cards]];
  const sheets = parts.map((cards) => {
    const at = cards.map((card) => {
      const free = pages.findIndex((page) => height([...page, card], GAP_MM) <= room.heightMm + 1e-9);
      if (free >= 0) pages[free]!.push(card);
      else pages.push([card]);
      return free >= 0 ? free : pages.length - 1;
    });
    return before + 1 + Math.min(...at);
  });
  const bodies = pages.map((cards, i) => ({ part: i === 0 ? list[before]!.part : PARTS_SHEET.drawings, cards }));
  return { bodies: [...list.slice(0, before), ...bodies], sheets };
}

/** Views, if there are any. */
const drawable = (views: readonly View[] = []) => (views.length > 0 ? views : null);

function bodiesOf(
  record: CoilRecord,
  views: ReadonlyMap<string, readonly View[]>,
  pictures: ReadonlyMap<string, readonly Picture[]>,
  room: Room,
  measure: Measure,
): Body[] {
  const cards = record.parts.map((entry) =>
    partCards(
      {
        entry,
        units: unitsOf(record),
        beds: blocks.bedsWith(record, entry.part),
        views: drawable(views.get(entry.part)) ?? boxViews(entry.sizeMm),
        pictures: pictures.get(entry.part) ?? [],
      },
      room.widthMm,
      room.heightMm,
      measure,
    ),
  );
  // How high the list is does not hang on the sheets named in it: they are put in once they are known.
  const { sheets } = filled(
    listed(record, () => 10, room, measure),
    cards,
    room,
  );
  const index = new Map(record.parts.map(({ part }, i) => [part, sheets[i]!]));
  return filled(
    listed(record, (part) => index.get(part)!, room, measure),
    cards,
    room,
  ).bodies;
}

/**
 * The pages as drawings.
 * @param pictures of each part, by its id; a part that is not there has none
 */
export function layOutPartsSheet(
  record: CoilRecord,
  pictures: ReadonlyMap<string, readonly Picture[]>,
  measure: Measure,
  views: ReadonlyMap<string, readonly View[]> = viewsOf(record),
): Page[] {
  const [paperWidth, paperHeight] = PAPER_MM[record.paper];
  const widthMm = paperWidth - 2 * MARGIN_MM.across;
  const headOf = (part: string, sheet: string) =>
    titleBlock(record, { document: PARTS_SHEET.document, part, sheet }, widthMm, measure);
  const head = headOf(PARTS_SHEET.more, PARTS_SHEET.sheet(10, 10));
  const room = { widthMm, heightMm: paperHeight - 2 * MARGIN_MM.along - head.heightMm - GAP };
  const bodies = bodiesOf(record, views, pictures, room, measure);
  return bodies.map((body, i) => {
    const top = headOf(body.part, PARTS_SHEET.sheet(i + 1, bodies.length));
    const placed = [shifted(plain(top), MARGIN_MM.across, paperHeight - MARGIN_MM.along)];
    let y = paperHeight - MARGIN_MM.along - head.heightMm - GAP;
    for (const card of body.cards) {
      placed.push(shifted(card, MARGIN_MM.across, y));
      y -= card.heightMm + GAP_MM;
    }
    return {
      widthMm: paperWidth,
      heightMm: paperHeight,
      shapes: placed.flatMap((card) => card.shapes),
      pictures: placed.flatMap((card) => card.pictures),
    };
  });
}

export { frameOf as partsFrame };

/** The parts sheet of a record as the bytes of a PDF. */
export async function partsSheet(
  record: CoilRecord,
  pictures: ReadonlyMap<string, readonly Picture[]>,
): Promise<Uint8Array> {
  const paper = new Paper({
    title: `${PARTS_SHEET.document}: ${record.job}`,
    subject: PARTS_SHEET.record(record.hash.slice(0, 12)),
  });
  return paper.write(layOutPartsSheet(record, pictures, paper));
}
