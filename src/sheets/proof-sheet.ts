/**
 * The proof sheet: how many coils passed, what they have in common, what to do with those that fail, then marks coil by coil and what is to
 * be said of the file. Marks are letters, so that a copy without colour says the same. It reads the record of the proof and nothing else:
 * same record, same bytes.
 */
import { PROOF } from '../../templates/wording/proof.ts';
import type { Measure } from '../drawing/boxes.ts';
import type { ProofRecord } from '../prove/schema.ts';
import type { Block } from './block.ts';
import { headedPages } from './headed.ts';
import { type Page, Paper } from './page.ts';
import { type Body, Filling, type Parted } from './parted.ts';
import * as blocks from './proof-blocks.ts';
import { frameOf } from './sheet-frame.ts';

/** Of a table that goes on: its rows, and its heading with the head of the columns, mm. */
const ROW_MM = 4.7;
const HEADS_MM = 14;
/** A table is not begun for fewer rows. */
const LEAST_ROWS = 3;
/** Items of a list that are laid out at once: looking for what fits takes time with the square of them. */
const ITEMS_AT_ONCE = 40;

/** As `putParted`, for tables of any length: no more rows than a page may hold are tried on it. */
function putRows(pages: Filling, table: Parted, part: string): void {
  let from = 0;
  while (from < table.groups.length) {
    const room = Math.floor((pages.left - HEADS_MM) / ROW_MM);
    if (room < Math.min(LEAST_ROWS, table.groups.length - from)) {
      pages.page(part);
      continue;
    }
    const begun = from;
    const groups = table.groups.slice(begun, begun + room);
    pages.putParted({ groups, block: (some, more) => table.block(some, more || begun > 0) }, part);
    from += groups.length;
  }
}

function putItems(pages: Filling, items: readonly Block[], part: string): void {
  for (let from = 0; from < items.length; from += ITEMS_AT_ONCE)
    pages.putList(items.slice(from, from + ITEMS_AT_ONCE), part);
}

function fill(record: ProofRecord, widthMm: number, heightMm: number, measure: Measure): Body[] {
  const pages = new Filling(heightMm);
  const { summary, marks, file } = PROOF.parts;
  pages.page(summary);
  putRows(pages, blocks.tallies(record, widthMm, measure), summary);
  pages.put(blocks.inputText(record, widthMm, measure), summary);
  for (const kind of record.kinds) putItems(pages, blocks.systematic(kind, widthMm, measure), summary);
  putItems(pages, blocks.failing(record, widthMm, measure), summary);
  putItems(pages, blocks.again(record, widthMm, measure), summary);
  for (const kind of record.kinds)
    for (const table of blocks.marks(kind, widthMm, measure)) putRows(pages, table, marks);
  putItems(pages, blocks.lines(record, widthMm, measure), marks);
  putItems(pages, blocks.remarks(record, widthMm, measure), file);
  putItems(pages, blocks.notes(record, widthMm, measure), file);
  return pages.bodies;
}

/** The pages as drawings. */
export function layOutProofSheet(record: ProofRecord, measure: Measure): Page[] {
  return headedPages(record, PROOF, PROOF.parts.summary, measure, (widthMm, heightMm) =>
    fill(record, widthMm, heightMm, measure),
  );
}

export { frameOf as proofFrame };

/** The proof sheet as the bytes of a PDF. */
export async function proofSheet(record: ProofRecord): Promise<Uint8Array> {
  const paper = new Paper({
    title: `${PROOF.document}: ${record.job}`,
    subject: PROOF.record(record.hash.slice(0, 12)),
  });
  return paper.write(layOutProofSheet(record, paper));
}
