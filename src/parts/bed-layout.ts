/**
 * Places parts on print beds: boxes as seen from above, turned by a quarter or not, with a gap between them, on few beds.
 *
 * Several orders of the parts are tried with several rules for the choice of a place, and the best outcome counts.
 */
import { type BedPart, type BedSize, requireFit, umUp } from './bed-fit.ts';
import {
  bestPlace,
  centred,
  emptyBed,
  type OpenBed,
  ORDERS,
  outline,
  type Piece,
  put,
  RULES,
  type Rule,
  type Sheet,
  sheetOf,
  snugPlace,
  UM,
} from './bed-rectangles.ts';

export interface PlacedCopy {
  readonly part: string;
  /** From 1, on over the beds. */
  readonly copy: number;
  /** Lower left corner of its box as it lies, from the bed's. */
  readonly xMm: number;
  readonly yMm: number;
  /** By a quarter turn: width and depth change places. */
  readonly turned: boolean;
}

export interface Bed {
  /** In the order of the parts given, then by copy. */
  readonly items: readonly PlacedCopy[];
}

/** With more pieces than this only the first order is tried, to stay far below a second. */
const MANY = 400;

/**
 * All copies of all parts, on as few beds as are found, each bed's parts round its middle.
 *
 * @param gapMm between any two boxes, along x or along y
 * @throws Fault with exit 4 that lists every part which the printer cannot take: `part-larger-than-bed`,
 *   `part-taller-than-printer`
 * @throws RangeError for sizes that are none
 */
export function layOutBeds(parts: readonly BedPart[], printer: BedSize, gapMm = 5): readonly Bed[] {
  requireSizes('printer', [printer.bedXMm, printer.bedYMm, printer.heightMm]);
  if (!(gapMm >= 0 && Number.isFinite(gapMm))) throw new RangeError(`a gap of ${gapMm} mm`);
  for (const { id, quantity, widthMm, depthMm, heightMm } of parts) {
    requireSizes(id, [widthMm, depthMm, heightMm]);
    if (!Number.isInteger(quantity) || quantity < 0) throw new RangeError(`${id}: ${quantity} copies`);
  }
  const wanted = parts.filter((part) => part.quantity > 0);
  requireFit(wanted, printer);

  const sheet = sheetOf(printer, gapMm);
  const pieces = wanted.flatMap((part, index) => {
    const piece = { index, width: umUp(part.widthMm), depth: umUp(part.depthMm) };
    return Array.from({ length: part.quantity }, () => piece);
  });
  return finished(packed(pieces, sheet), wanted, sheet);
}

/** All pieces, in whole micrometres and such as fit the sheet, on few beds. */
export function packed(pieces: readonly Piece[], sheet: Sheet): readonly OpenBed[] {
  let best: Outcome | null = null;
  for (const order of pieces.length > MANY ? ORDERS.slice(0, 1) : ORDERS) {
    const sorted = pieces.toSorted((a, b) => order(b) - order(a) || a.index - b.index);
    for (const rule of RULES) {
      const outcome = pack(sorted, rule, sheet);
      if (!best || outcome.cost < best.cost) best = outcome;
    }
  }
  return best?.beds ?? [];
}

function requireSizes(of: string, sizesMm: readonly number[]): void {
  for (const mm of sizesMm) if (!(mm > 0 && Number.isFinite(mm))) throw new RangeError(`${of}: a size of ${mm} mm`);
}

interface Outcome {
  readonly beds: readonly OpenBed[];
  readonly cost: number;
}

/** Each piece goes on the first bed that has room for it. */
function pack(pieces: readonly Piece[], rule: Rule, sheet: Sheet): Outcome {
  const beds: OpenBed[] = [];
  for (const piece of pieces) {
    let placed = false;
    for (const bed of beds) {
      const place = bestPlace(bed, piece, rule, sheet);
      if (!place) continue;
      put(bed, place, sheet);
      placed = true;
      break;
    }
    if (placed) continue;
    const bed = emptyBed(sheet);
    put(bed, bestPlace(bed, piece, rule, sheet) ?? snugPlace(piece, sheet), sheet);
    beds.push(bed);
  }
  // Fewer beds first, then parts close together: the spread of a bed is 1 at most.
  const spread = beds.reduce((sum, bed) => {
    const { x0, y0, x1, y1 } = outline(bed.places);
    return sum + (x1 - x0 + y1 - y0) / (sheet.x + sheet.y);
  }, 0);
  return { beds, cost: beds.length + spread / (beds.length + 1) };
}

/** Counted and put in the order of the parts, in the middle of each bed. */
function finished(beds: readonly OpenBed[], parts: readonly BedPart[], sheet: Sheet): readonly Bed[] {
  const copies = parts.map(() => 0);
  return beds.map(({ places }) => ({
    items: centred(places, sheet).map(({ piece, x, y, turned }) => {
      copies[piece.index]! += 1;
      return { part: parts[piece.index]!.id, copy: copies[piece.index]!, xMm: x / UM, yMm: y / UM, turned };
    }),
  }));
}
