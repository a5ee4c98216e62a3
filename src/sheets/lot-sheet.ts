/** Lot sheet of a lot. */
import { label } from '../drawing/shapes.ts';
import type { LotRecord } from '../lot/schema.ts';
import type { CoilRecord } from '../record/schema.ts';
import { PAPER_MM, Paper } from './page.ts';

/** The bytes of a PDF. */
export async function lotSheet(lot: LotRecord, _kinds: ReadonlyMap<string, CoilRecord>): Promise<Uint8Array> {
  const paper = new Paper({ title: `Lot sheet: ${lot.lot}`, subject: `lot ${lot.hash.slice(0, 12)}` });
  const [widthMm, heightMm] = PAPER_MM[lot.paper];
  return paper.write([{ widthMm, heightMm, shapes: [label(12, heightMm - 16, lot.lot)] }]);
}
