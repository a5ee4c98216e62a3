/**
 * All printed parts of a lot on few beds, and few different ones: formers as often as there are coils, jigs once. A bed is laid
 * out once and counted as often as it is printed.
 */
import type { LotBed } from './schema.ts';
import type { LotPrinter } from './types.ts';

/** One part of one kind. */
export interface LotPiece {
  readonly kind: string;
  /** As in the record of the kind. */
  readonly part: string;
  /** For people, with the letter of the kind. */
  readonly name: string;
  /** Pieces in the whole lot. */
  readonly quantity: number;
  /** Pieces that one coil takes: of a former 1, of ribs more; 0 for jigs, which no serial is tied to. */
  readonly perCoil: number;
  readonly material: string;
  readonly layerMm: number;
  readonly nozzleMm: number;
  /** What files are enlarged by along x, y and z. */
  readonly scale: readonly number[];
  /** As the part should come out, in print orientation; files, and beds, hold it enlarged. */
  readonly sizeMm: readonly number[];
  /** Of solid plastic, one piece. */
  readonly massG: number;
}

/**
 * @param printers at least one; a part goes to those that can take it
 * @throws Fault (exit 4) for parts that no printer takes: `part-larger-than-bed`, `part-taller-than-printer`
 */
export function layOutLot(pieces: readonly LotPiece[], printers: readonly LotPrinter[], gapMm = 5): readonly LotBed[] {
  throw new Error(`${pieces.length} ${printers.length} ${gapMm}`);
}
