/**
 * The reference sheet: the chart of what every position tunes with the figures behind it, tuning curves, the wiring of the switch and its
 * kinds side by side, why this coil and which others, what all was taken with, and how the figures come about. It reads the record
 * of any verb and nothing else: same record, same bytes.
 */
import { AROUND } from '../../templates/wording/around-sheet.ts';
import { wireAerialCautions } from '../../templates/wording/cautions.ts';
import { INSTRUMENTS } from '../../templates/wording/instruments.ts';
import { REFERENCE } from '../../templates/wording/reference-sheet.ts';
import type { Measure } from '../drawing/boxes.ts';
import type { ExplainedRecord } from '../explain/explain.ts';
import type { CoilRecord } from '../record/schema.ts';
import { closer, stack } from './block.ts';
import { headedPages } from './headed.ts';
import { type Page, Paper } from './page.ts';
import { type Body, Filling, GAP_MM } from './parted.ts';
import * as set from './reference-around.ts';
import { noOthers, others, why } from './reference-chosen.ts';
import { explained } from './reference-explained.ts';
import { type BenchRecord, instruments, instrumentWords } from './reference-instruments.ts';
import * as ranges from './reference-ranges.ts';
import { wiring } from './reference-wiring.ts';
import { frameOf } from './sheet-frame.ts';

/** The chart leaves the rest of its page to the table of positions. */
const CHART_SHARE = 0.62;
/** Height of the tuning curves with heading and words, where their numbers do not want more. */
const CURVES_MM = { least: 110, wanted: 150 } as const;

/** A record of any verb; one of a plan also tells why it chose. */
export type ReferenceRecord = ExplainedRecord & BenchRecord & { readonly chosen?: CoilRecord['chosen'] | null };

/** A page of its own for what hangs on the coil, and more where it takes more. */
function around(record: ReferenceRecord, pages: Filling, widthMm: number, measure: Measure): void {
  const found = set.connectedOf(record);
  if (found === null) return;
  const { part } = AROUND;
  pages.page(part);
  pages.put(set.connected(found, wireAerialCautions(found.aerial?.kind ?? null), widthMm, measure), part);
  const uses = set.uses(found, widthMm, measure);
  for (const block of [...(uses === null ? [] : [uses]), ...set.maps(found, widthMm, measure)]) pages.put(block, part);
  const ranges = set.setRanges(record, found, widthMm, measure);
  if (ranges !== null) pages.putParted(ranges, part);
  const notes = set.aroundNotes(found, widthMm, measure);
  if (notes !== null) pages.put(notes, part);
}

function fill(record: ReferenceRecord, widthMm: number, heightMm: number, measure: Measure): Body[] {
  const pages = new Filling(heightMm);
  pages.page(REFERENCE.chart);
  pages.put(ranges.chart(record, widthMm, heightMm * CHART_SHARE, measure), REFERENCE.chart);
  pages.putParted(ranges.positions(record, widthMm, measure), REFERENCE.figures);
  // What the first page leaves is enough for them, or they get a page with more.
  const room = pages.left >= CURVES_MM.least ? Math.min(pages.left, CURVES_MM.wanted) : CURVES_MM.wanted;
  pages.put(ranges.curves(record, widthMm, room, measure), REFERENCE.curves);
  pages.putParted(ranges.ends(record, widthMm, measure), REFERENCE.figures);
  pages.put(ranges.endsHow(widthMm, measure), REFERENCE.figures);
  for (const block of wiring(record, widthMm, measure)) pages.put(block, REFERENCE.wiring);
  const kinds = ranges.kinds(record, widthMm, measure);
  if (kinds !== null) {
    pages.putParted(kinds, REFERENCE.kinds);
    pages.put(stack(ranges.kindNotes(record, widthMm, measure), 0.8), REFERENCE.kinds);
  }
  around(record, pages, widthMm, measure);
  const bench = instruments(record, widthMm, measure);
  const words = instrumentWords(record, widthMm, measure);
  if (bench !== null && words !== null) {
    pages.putParted(bench, INSTRUMENTS.part);
    pages.put(words, INSTRUMENTS.part);
  }
  const { chosen = null } = record;
  if (chosen !== null) {
    pages.put(why(chosen, widthMm, measure), REFERENCE.chosen);
    const table = others(record, widthMm, measure);
    if (table === null) pages.put(noOthers(widthMm, measure), REFERENCE.chosen);
    else pages.putParted(table, REFERENCE.chosen);
  }
  for (const group of [ranges.taken(record, widthMm, measure), ranges.notes(record, widthMm, measure)])
    if (group.length > 0) pages.putList(group, REFERENCE.kinds);
  pages.putList(explained(record, widthMm, measure), REFERENCE.explained);
  return pages.bodies;
}

/** A last page that holds less than this of its height is done without where nearer lines save it. */
const SCANT_SHARE = 0.35;

/** The pages, their lines nearer where that saves a page with little on it. */
function filled(record: ReferenceRecord, widthMm: number, heightMm: number, measure: Measure): Body[] {
  const pages = fill(record, widthMm, heightMm, measure);
  if (stack(pages.at(-1)!.blocks, GAP_MM).heightMm > SCANT_SHARE * heightMm) return pages;
  const near = fill(record, widthMm, heightMm, closer(measure));
  return near.length < pages.length ? near : pages;
}

/** The pages as drawings. */
export function layOutReferenceSheet(record: ReferenceRecord, measure: Measure): Page[] {
  return headedPages(record, REFERENCE, REFERENCE.figures, measure, (widthMm, heightMm) =>
    filled(record, widthMm, heightMm, measure),
  );
}

export { frameOf as referenceFrame };

/** The reference sheet of a record as the bytes of a PDF. */
export async function referenceSheet(record: ReferenceRecord): Promise<Uint8Array> {
  const paper = new Paper({
    title: `${REFERENCE.document}: ${record.job}`,
    subject: REFERENCE.record(record.hash.slice(0, 12)),
  });
  return paper.write(layOutReferenceSheet(record, paper));
}
