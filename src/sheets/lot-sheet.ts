/**
 * The lot sheet: kinds and quantities, wire reel by reel and what to buy, beds and runs, plastic and what else to have ready. It
 * reads the record of the lot and those of its kinds and nothing else: same records, same bytes.
 */
import { CAUTIONS, LOT_SHEET, NOTES } from '../../templates/wording/lot-sheet.ts';
import type { Measure } from '../drawing/boxes.ts';
import { recordOfKind } from '../lot/kind-record.ts';
import type { LotRecord } from '../lot/schema.ts';
import type { CoilRecord } from '../record/schema.ts';
import { heading, list } from './block.ts';
import { headedPages } from './headed.ts';
import * as print from './lot-sheet-print.ts';
import * as wire from './lot-sheet-wire.ts';
import { type Page, Paper } from './page.ts';
import { type Body, Filling, type Parted } from './parted.ts';
import { frameOf } from './sheet-frame.ts';
import { type Units, unitsOf } from './units.ts';

type Kinds = ReadonlyMap<string, CoilRecord>;

/** Those of the kinds where they agree, else both. */
function unitsOfLot(lot: LotRecord, kinds: Kinds): Units {
  const found = [...new Set(lot.kinds.map(({ kind }) => unitsOf(recordOfKind(kinds, kind))))];
  return found.length === 1 ? found[0]! : 'both';
}

function bodiesOf(lot: LotRecord, kinds: Kinds, widthMm: number, heightMm: number, measure: Measure): readonly Body[] {
  const units = unitsOfLot(lot, kinds);
  const pages = new Filling(heightMm);
  const more = LOT_SHEET.more;
  pages.page(LOT_SHEET.summary);
  const put = (part: Parted | null) => part && pages.putParted(part, more);
  const bulleted = (head: string, texts: readonly string[]) => {
    if (texts.length === 0) return;
    const items = list(
      texts.map((text) => ({ mark: '•', text })),
      widthMm,
      measure,
    );
    pages.putList([heading(head, widthMm, measure), ...items], more);
  };

  put(wire.kindList(lot, units, widthMm, measure));
  pages.put(wire.totals(lot, units, widthMm, measure), more);
  bulleted(CAUTIONS.heading, [...new Set(lot.kinds.flatMap(({ kind }) => recordOfKind(kinds, kind).cautions))]);
  bulleted(
    NOTES.heading,
    lot.warnings.map(({ text }) => text),
  );
  put(wire.wireList(lot, units, widthMm, measure));
  pages.put(wire.wireWords(widthMm, measure), more);
  put(wire.buyList(lot, units, widthMm, measure));
  const bought = wire.buyTotals(lot, units, widthMm, measure);
  if (bought) pages.put(bought, more);
  put(wire.reelList(lot, units, widthMm, measure));
  const ready = print.boughtList(lot, kinds, widthMm, measure);
  if (ready) put(ready);
  else pages.put(print.nothingBought(widthMm, measure), more);
  const plastic = print.materials(lot, widthMm / 2, measure);
  if (plastic) pages.put(plastic, more);
  const rows = print.bedRows(lot, kinds, widthMm, measure);
  if (rows.length > 0) pages.page(LOT_SHEET.print);
  for (const row of rows) pages.put(row, LOT_SHEET.print);
  const runs = print.runList(lot, widthMm, measure);
  if (runs) pages.putParted(runs, LOT_SHEET.print);
  return pages.bodies;
}

/** The pages as drawings. */
export function layOutLotSheet(lot: LotRecord, kinds: Kinds, measure: Measure): Page[] {
  const record = { job: lot.lot, hash: lot.hash, program: lot.program, date: lot.date, paper: lot.paper };
  const { document, sheet, lot: of, summary } = LOT_SHEET;
  return headedPages(record, { document, sheet, of }, summary, measure, (widthMm, heightMm) =>
    bodiesOf(lot, kinds, widthMm, heightMm, measure),
  );
}

export { frameOf as lotSheetFrame };

/**
 * The lot sheet as the bytes of a PDF.
 * @param kinds the record of each kind by its letter
 */
export async function lotSheet(lot: LotRecord, kinds: Kinds): Promise<Uint8Array> {
  const paper = new Paper({
    title: `${LOT_SHEET.document}: ${lot.lot}`,
    subject: LOT_SHEET.record(lot.hash.slice(0, 12)),
  });
  return paper.write(layOutLotSheet(lot, kinds, paper));
}
