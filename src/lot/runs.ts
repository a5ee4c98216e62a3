/** Which machine prints which bed when, and whose formers come off it. */
import type { LotPiece } from './beds.ts';
import type { LotBed, LotCoil, LotRun } from './schema.ts';
import type { LotPrinter } from './types.ts';

/** @param pieces as laid out: what of each part one coil takes */
export function listRuns(
  beds: readonly LotBed[],
  printers: readonly LotPrinter[],
  pieces: readonly Pick<LotPiece, 'kind' | 'part' | 'perCoil'>[],
  coils: readonly Pick<LotCoil, 'serial' | 'kind'>[],
): readonly LotRun[] {
  throw new Error(`${beds.length} ${printers.length} ${pieces.length} ${coils.length}`);
}
