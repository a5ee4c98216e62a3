/** Labels of a lot. */
import { label } from '../drawing/shapes.ts';
import type { LotRecord } from '../lot/schema.ts';
import { PAPER_MM, Paper } from './page.ts';

/** The bytes of a PDF. */
export async function labels(lot: LotRecord): Promise<Uint8Array> {
  const paper = new Paper({ title: `Labels: ${lot.lot}`, subject: `lot ${lot.hash.slice(0, 12)}` });
  const [widthMm, heightMm] = PAPER_MM[lot.paper];
  return paper.write([{ widthMm, heightMm, shapes: [label(12, heightMm - 16, lot.lot)] }]);
}
