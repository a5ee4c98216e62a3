/** The contents before the travellers: kinds, then every coil with its page. */
import { CONTENTS, TRAVELLER } from '../../templates/wording/lot-traveller.ts';
import type { Measure } from '../drawing/boxes.ts';
import { SMALL_MM } from '../drawing/shapes.ts';
import type { LotRecord } from '../lot/schema.ts';
import { type Block, beside, heading, paragraph, stack } from './block.ts';
import { CENTRE, columnsOf, RIGHT } from './check-blocks-columns.ts';
import { headedPages } from './headed.ts';
import type { Page, PageLink } from './page.ts';
import { Filling, parted } from './parted.ts';
import { table } from './table.ts';
import { short } from './text.ts';
import { anchorOf } from './traveller-kind.ts';

const ROW_MM = 4.8;
const COLUMN_GAP_MM = 5;
/** In shares of a column: serial, page, kind, reel. */
const WIDTHS = [30, 11, 10, 22] as const;

type Row = readonly string[];

function rowsOf({ coils }: LotRecord, pageOf: (index: number) => number): Row[] {
  return coils.map(({ serial, kind, spool }, i) => [serial, `${pageOf(i)}`, kind, spool ?? CONTENTS.toBuy]);
}

function coilTable(rows: readonly Row[], widthMm: number, measure: Measure): Block {
  const columns = columnsOf(widthMm, [
    [CONTENTS.serial, WIDTHS[0], {}],
    [CONTENTS.page, WIDTHS[1], { ...RIGHT, bold: true }],
    [CONTENTS.kind, WIDTHS[2], CENTRE],
    [CONTENTS.reel, WIDTHS[3], {}],
  ]);
  return table(columns, rows, measure, { rowMm: ROW_MM, sizeMm: SMALL_MM });
}

/** Three columns where serials and reels go into them on one line, else two, else one. */
function columnsFor(rows: readonly Row[], widthMm: number, measure: Measure): number {
  const sum = WIDTHS.reduce((all, each) => all + each, 0);
  const fits = (count: number) => {
    const width = (widthMm - (count - 1) * COLUMN_GAP_MM) / count;
    return [0, 3].every((cell) =>
      rows.every((row) => measure.width(row[cell]!, SMALL_MM) + 2.5 <= (width * WIDTHS[cell]!) / sum),
    );
  };
  return [3, 2].find(fits) ?? 1;
}

/** As many rows as go on a page, down the columns; the columns of a page are equally long but the last. */
function coilBlock(
  rows: readonly Row[],
  from: number,
  count: number,
  freeMm: number,
  widthMm: number,
  measure: Measure,
): { readonly block: Block; readonly to: number } {
  const head = heading(from === 0 ? CONTENTS.coils : CONTENTS.coilsMore, widthMm, measure);
  const width = (widthMm - (count - 1) * COLUMN_GAP_MM) / count;
  const of = (each: number) => {
    const tables: Block[] = [];
    for (let i = 0; i < count && from + i * each < rows.length; i++)
      tables.push(coilTable(rows.slice(from + i * each, from + (i + 1) * each), width, measure));
    return stack([head, beside(tables, COLUMN_GAP_MM)], 0);
  };
  let each = Math.max(1, Math.min(Math.floor(freeMm / ROW_MM), Math.ceil((rows.length - from) / count)));
  while (each > 1 && of(each).heightMm > freeMm) each--;
  return { block: of(each), to: Math.min(rows.length, from + each * count) };
}

const LEAST_ROWS_MM = 40;

function kindsTable(lot: LotRecord, widthMm: number, measure: Measure) {
  const groups = lot.kinds.map(({ kind, job, quantity, turns, taps, wire, hash }) => [
    [kind, job, `${quantity}`, short(turns, 2), `${taps}`, wire, hash.slice(0, 12)],
  ]);
  const heads = [
    [CONTENTS.kind, 10, { ...CENTRE, bold: true }],
    [CONTENTS.job, 68, {}],
    [CONTENTS.count, 12, RIGHT],
    [CONTENTS.turns, 14, RIGHT],
    [CONTENTS.taps, 11, RIGHT],
    [CONTENTS.wire, 44, {}],
    [CONTENTS.record, 27, {}],
  ] as const;
  return parted({ heading: CONTENTS.kinds, more: CONTENTS.kindsMore }, heads, groups, widthMm, measure);
}

/** @param pageOf page of the coil with this index, counted from 1 over the whole document */
function laidOut(lot: LotRecord, pageOf: (index: number) => number, total: number, measure: Measure): Page[] {
  const record = { job: lot.lot, hash: lot.hash, program: lot.program, date: lot.date, paper: lot.paper };
  const words = { document: TRAVELLER.all, of: TRAVELLER.lot, sheet: (n: number) => CONTENTS.sheet(n, total) };
  return headedPages(record, words, CONTENTS.more, measure, (widthMm, heightMm) => {
    const pages = new Filling(heightMm);
    pages.page(CONTENTS.part);
    pages.putParted(kindsTable(lot, widthMm, measure), CONTENTS.more);
    pages.put(paragraph(CONTENTS.how, widthMm, measure, { sizeMm: SMALL_MM }), CONTENTS.more);
    const rows = rowsOf(lot, pageOf);
    const count = columnsFor(rows, widthMm, measure);
    for (let from = 0; from < rows.length; ) {
      if (pages.left < LEAST_ROWS_MM) pages.page(CONTENTS.more);
      const { block, to } = coilBlock(rows, from, count, pages.left, widthMm, measure);
      pages.put(block, CONTENTS.more);
      from = to;
    }
    return pages.bodies;
  });
}

/** A link over each page number and the serial before it; a serial on two lines leaves the number alone. */
function linked(page: Page, serials: ReadonlyMap<number, string>): Page {
  const texts = page.shapes.flatMap((shape) => (shape.shape === 'text' ? [shape] : []));
  const links = texts.flatMap(({ text, align, bold, x, y }): PageLink[] => {
    const serial = align === 'right' && bold && /^\d+$/.test(text) ? serials.get(Number(text)) : undefined;
    if (serial === undefined) return [];
    const before = texts.find((each) => each.text === serial && each.x < x && Math.abs(each.y - y) < 0.01);
    const left = (before?.x ?? x - 8) - 0.8;
    const widthMm = x + 0.8 - left;
    return [{ x: left, y: y - 1.2, widthMm, heightMm: ROW_MM - 0.4, to: anchorOf(Number(text)) }];
  });
  return { ...page, links };
}

/**
 * The contents as pages.
 * @param sheets how many pages each coil takes, by its index
 */
export function contentsPages(lot: LotRecord, sheets: readonly number[], measure: Measure): Page[] {
  const coilPages = sheets.reduce((sum, count) => sum + count, 0);
  // How many pages the contents take does not hang on the numbers in them: four figures take the same room as fewer.
  const count = laidOut(lot, () => 1000, 1000, measure).length;
  const starts: number[] = [];
  let next = count + 1;
  for (const each of sheets) {
    starts.push(next);
    next += each;
  }
  const known = new Map(starts.map((start, i) => [start, lot.coils[i]!.serial]));
  return laidOut(lot, (index) => starts[index]!, count + coilPages, measure).map((page) => linked(page, known));
}
