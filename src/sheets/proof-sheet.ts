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

/** A table is not begun for fewer rows. */
const LEAST_ROWS = 3;
/** Items of a list that are laid out at once: looking for what fits takes time with the square of them. */
const ITEMS_AT_ONCE = 40;

/** As `putParted`, for tables of any length: every row is measured once, and no more of them are tried on a page than it may hold. */
function putRows(pages: Filling, table: Parted, part: string): void {
  const { groups } = table;
  const heads = table.block([], false).heightMm;
  const heights = groups.map((group) => table.block([group], false).heightMm - heads);
  let from = 0;
  while (from < groups.length) {
    let to = from;
    for (let left = pages.left - heads; to < groups.length && left >= heights[to]!; to++) left -= heights[to]!;
    if (to - from < Math.min(LEAST_ROWS, groups.length - from) && pages.bodies.at(-1)!.blocks.length > 0) {
      pages.page(part);
      continue;
    }
    const begun = from;
    to = Math.max(to, from + 1);
    const some = groups.slice(begun, to);
    pages.putParted({ groups: some, block: (rows, more) => table.block(rows, more || begun > 0) }, part);
    from = to;
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
  putRows(pages, blocks.failing(record, widthMm, measure), summary);
  pages.put(blocks.failingHow(record, widthMm, measure), summary);
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
