/**
 * The comparison sheet of a replacement: page 1 the old coil against the new, drawn and tap by tap; then what is known of the
 * old one and how surely. It reads the record and nothing else: same record, same bytes. Throws an Error for a record that
 * replaces nothing.
 */
import { COMPARISON } from '../../templates/wording/comparison-sheet.ts';
import type { Measure } from '../drawing/boxes.ts';
import type { MatchRecord } from '../drawing/comparison.ts';
import type { CoilRecord } from '../record/schema.ts';
import * as known from './comparison-sheet-known.ts';
import * as taps from './comparison-sheet-taps.ts';
import { headedPages } from './headed.ts';
import { type Page, Paper } from './page.ts';
import { type Body, Filling, GAP_MM } from './parted.ts';
import { frameOf } from './sheet-frame.ts';

/** The drawing takes what the table of taps leaves of its page, within these. */
const PAIR_MM = { least: 95, most: 165 } as const;

function fill(record: MatchRecord, widthMm: number, heightMm: number, measure: Measure): Body[] {
  const pages = new Filling(heightMm);
  const { against: first, known: second } = COMPARISON;
  pages.page(first);
  const table = taps.against(record, widthMm, measure);
  const how = taps.againstHow(record, widthMm, measure);
  const rest = table.block(table.groups, false).heightMm + how.heightMm + 2 * GAP_MM;
  const room = Math.min(PAIR_MM.most, Math.max(PAIR_MM.least, heightMm - rest));
  pages.put(taps.pair(record, widthMm, room, measure), first);
  pages.putParted(table, first);
  pages.put(how, first);
  pages.putList(taps.ways(record, widthMm, measure), first);
  const both = taps.waysTaps(record, widthMm, measure);
  if (both !== null) pages.putParted(both, first);
  pages.putParted(known.coils(record, widthMm, measure), second);
  for (const group of [known.doubts, known.proposals, known.contradictions, known.nextOnes])
    pages.putList(group(record, widthMm, measure), second);
  if (record.matched.residuals.length > 0) pages.putParted(known.measured(record, widthMm, measure), second);
  pages.put(known.fitText(record, widthMm, measure), second);
  pages.putList(known.assumed(record, widthMm, measure), second);
  return pages.bodies;
}

function matchedOf(record: CoilRecord): MatchRecord {
  const { matched } = record;
  if (matched === undefined) throw new Error('a comparison sheet of a record that replaces nothing');
  return { ...record, matched };
}

/** The pages as drawings. */
export function layOutComparisonSheet(record: CoilRecord, measure: Measure): Page[] {
  return headedPages(record, COMPARISON, COMPARISON.known, measure, (widthMm, heightMm) =>
    fill(matchedOf(record), widthMm, heightMm, measure),
  );
}

export { frameOf as comparisonFrame };

/** The comparison sheet of a record as the bytes of a PDF. */
export async function comparisonSheet(record: CoilRecord): Promise<Uint8Array> {
  const paper = new Paper({
    title: `${COMPARISON.document}: ${record.job}`,
    subject: COMPARISON.record(record.hash.slice(0, 12)),
  });
  return paper.write(layOutComparisonSheet(record, paper));
}
