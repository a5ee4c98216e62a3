/**
 * Places parts on print beds: boxes as seen from above, turned by a quarter or not, with a gap between them, on few beds.
 *
 * Each bed keeps the list of the maximal free rectangles in it; several orders of the parts are tried with several rules for
 * the choice of a place, and the best outcome counts (maximal rectangles: J. Jylänki, "A Thousand Ways to Pack the Bin",
 * 2010, from memory). All arithmetic is in whole micrometres, so that sums are exact and the outcome is the same everywhere.
 */
import { type BedPart, type BedSize, requireFit, umDown, umUp } from './bed-fit.ts';

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

/**
 * Kept free along the edges of the bed, where plates bend and clips sit (common practice, from memory). A part that fits the
 * bed only without it lies in the middle of the bed all the same.
 */
export const EDGE_MARGIN_MM = 2;

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
  let best: Outcome | null = null;
  for (const order of pieces.length > MANY ? ORDERS.slice(0, 1) : ORDERS) {
    const sorted = pieces.toSorted((a, b) => order(b) - order(a) || a.index - b.index);
    for (const rule of RULES) {
      const outcome = pack(sorted, rule, sheet);
      if (!best || outcome.cost < best.cost) best = outcome;
    }
  }
  return finished(best?.beds ?? [], wanted, sheet);
}

const UM = 1000;

function requireSizes(of: string, sizesMm: readonly number[]): void {
  for (const mm of sizesMm) if (!(mm > 0 && Number.isFinite(mm))) throw new RangeError(`${of}: a size of ${mm} mm`);
}

/** Micrometres, as all that follows. */
interface Piece {
  readonly index: number;
  readonly width: number;
  readonly depth: number;
}

interface Sheet {
  readonly x: number;
  readonly y: number;
  readonly gap: number;
  readonly margin: number;
}

interface Rectangle {
  readonly x0: number;
  readonly y0: number;
  readonly x1: number;
  readonly y1: number;
}

interface Place {
  readonly piece: Piece;
  readonly x: number;
  readonly y: number;
  readonly turned: boolean;
}

interface OpenBed {
  /** Maximal free rectangles, for boxes enlarged by the gap to the right and upwards. */
  free: Rectangle[];
  readonly places: Place[];
}

interface Outcome {
  readonly beds: readonly OpenBed[];
  readonly cost: number;
}

function sheetOf(printer: BedSize, gapMm: number): Sheet {
  return { x: umDown(printer.bedXMm), y: umDown(printer.bedYMm), gap: umUp(gapMm), margin: EDGE_MARGIN_MM * UM };
}

/** Largest first, by different measures of large; ties keep the order given. */
const ORDERS: readonly ((piece: Piece) => number)[] = [
  (p) => p.width * p.depth,
  (p) => Math.max(p.width, p.depth),
  (p) => Math.min(p.width, p.depth),
  (p) => p.width + p.depth,
  (p) => Math.max(p.width, p.depth) / Math.min(p.width, p.depth),
  () => 0,
];

/** Smaller is better: how a box of w x d suits the lower left corner of a free rectangle. */
type Rule = (free: Rectangle, w: number, d: number, sheet: Sheet) => number;
const RULES: readonly Rule[] = [
  // Leaves the narrowest strip.
  (f, w, d) => Math.min(f.x1 - f.x0 - w, f.y1 - f.y0 - d),
  // Leaves the smallest strip on the longer side.
  (f, w, d) => Math.max(f.x1 - f.x0 - w, f.y1 - f.y0 - d),
  // Leaves the least area.
  (f, w, d) => (f.x1 - f.x0) * (f.y1 - f.y0) - w * d,
  // Grows in rows.
  (f, _, d) => f.y0 + d,
  // Grows evenly from the corner.
  (f, w, d, sheet) => Math.max((f.x0 + w) / sheet.x, (f.y0 + d) / sheet.y),
];

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

function emptyBed({ x, y, gap, margin }: Sheet): OpenBed {
  const whole = { x0: margin, y0: margin, x1: x - margin + gap, y1: y - margin + gap };
  return { free: [whole], places: [] };
}

function bestPlace(bed: OpenBed, piece: Piece, rule: Rule, sheet: Sheet): Place | null {
  let best: Place | null = null;
  let least = Number.POSITIVE_INFINITY;
  for (const free of bed.free)
    for (const turned of piece.width === piece.depth ? [false] : [false, true]) {
      const w = (turned ? piece.depth : piece.width) + sheet.gap;
      const d = (turned ? piece.width : piece.depth) + sheet.gap;
      if (w > free.x1 - free.x0 || d > free.y1 - free.y0) continue;
      const score = rule(free, w, d, sheet);
      if (best && score > least) continue;
      // Equal scores go to the lower, then to the left one, whatever the order of the list.
      if (best && score === least && (best.y - free.y0 || best.x - free.x0) <= 0) continue;
      best = { piece, x: free.x0, y: free.y0, turned };
      least = score;
    }
  return best;
}

/** For what fits the bed, but not inside the margin: in the middle of the axis in which it does not. */
function snugPlace(piece: Piece, { x, y, margin }: Sheet): Place {
  const turned = piece.width > x || piece.depth > y;
  const w = turned ? piece.depth : piece.width;
  const d = turned ? piece.width : piece.depth;
  const from = (size: number, bed: number) => (size <= bed - 2 * margin ? margin : Math.floor((bed - size) / 2));
  return { piece, x: from(w, x), y: from(d, y), turned };
}

const sizeOf = ({ piece, turned }: Place): readonly [w: number, d: number] =>
  turned ? [piece.depth, piece.width] : [piece.width, piece.depth];

function put(bed: OpenBed, place: Place, { gap }: Sheet): void {
  bed.places.push(place);
  const [w, d] = sizeOf(place);
  // The gap to the right and upwards; later boxes on the other two sides bring their own.
  const taken = { x0: place.x, y0: place.y, x1: place.x + w + gap, y1: place.y + d + gap };
  const rest: Rectangle[] = [];
  const cut: Rectangle[] = [];
  for (const f of bed.free) {
    if (taken.x0 >= f.x1 || taken.x1 <= f.x0 || taken.y0 >= f.y1 || taken.y1 <= f.y0) {
      rest.push(f);
      continue;
    }
    if (taken.x0 > f.x0) cut.push({ ...f, x1: taken.x0 });
    if (taken.x1 < f.x1) cut.push({ ...f, x0: taken.x1 });
    if (taken.y0 > f.y0) cut.push({ ...f, y1: taken.y0 });
    if (taken.y1 < f.y1) cut.push({ ...f, y0: taken.y1 });
  }
  // Only new rectangles can lie inside others: an old one was maximal, and every new one is part of one that is gone.
  const maximal = cut.filter(
    (c, i) =>
      !rest.some((r) => inside(c, r)) &&
      !cut.some((other, k) => k !== i && inside(c, other) && (k < i || !inside(other, c))),
  );
  bed.free = [...rest, ...maximal];
}

const inside = (a: Rectangle, b: Rectangle) => a.x0 >= b.x0 && a.y0 >= b.y0 && a.x1 <= b.x1 && a.y1 <= b.y1;

function outline(places: readonly Place[]): Rectangle {
  const box = { x0: Number.POSITIVE_INFINITY, y0: Number.POSITIVE_INFINITY, x1: 0, y1: 0 };
  for (const place of places) {
    const [w, d] = sizeOf(place);
    box.x0 = Math.min(box.x0, place.x);
    box.y0 = Math.min(box.y0, place.y);
    box.x1 = Math.max(box.x1, place.x + w);
    box.y1 = Math.max(box.y1, place.y + d);
  }
  return box;
}

/** Moved to the middle of each bed, counted and put in the order of the parts. */
function finished(beds: readonly OpenBed[], parts: readonly BedPart[], sheet: Sheet): readonly Bed[] {
  const copies = parts.map(() => 0);
  return beds.map(({ places }) => {
    const { x0, y0, x1, y1 } = outline(places);
    const dx = Math.floor((sheet.x - x0 - x1) / 2);
    const dy = Math.floor((sheet.y - y0 - y1) / 2);
    const items = places
      .toSorted((a, b) => a.piece.index - b.piece.index || a.y - b.y || a.x - b.x)
      .map(({ piece, x, y, turned }) => {
        copies[piece.index]! += 1;
        return {
          part: parts[piece.index]!.id,
          copy: copies[piece.index]!,
          xMm: (x + dx) / UM,
          yMm: (y + dy) / UM,
          turned,
        };
      });
    return { items };
  });
}
