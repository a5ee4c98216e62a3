/**
 * One bed as the list of its maximal free rectangles: boxes as seen from above go into the lower left corner of one of them.
 * (Maximal rectangles: J. Jylänki, "A Thousand Ways to Pack the Bin", 2010, from memory.) Whole micrometres throughout, so
 * that sums are exact and the outcome is the same everywhere.
 */
import { type BedSize, umDown, umUp } from './bed-fit.ts';

/**
 * Kept free along the edges of the bed, where plates bend and clips sit (common practice, from memory). A part that fits the
 * bed only without it lies in the middle of the bed all the same.
 */
export const EDGE_MARGIN_MM = 2;
/** Micrometres in a millimetre. */
export const UM = 1000;

/** A box; `index` tells whose. */
export interface Piece {
  readonly index: number;
  readonly width: number;
  readonly depth: number;
}

export interface Sheet {
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

export interface Place {
  readonly piece: Piece;
  readonly x: number;
  readonly y: number;
  readonly turned: boolean;
}

export interface OpenBed {
  /** Maximal free rectangles, for boxes enlarged by the gap to the right and upwards. */
  free: Rectangle[];
  readonly places: Place[];
}

/** The bed and what is kept free on it. */
export function sheetOf(printer: BedSize, gapMm: number): Sheet {
  return { x: umDown(printer.bedXMm), y: umDown(printer.bedYMm), gap: umUp(gapMm), margin: EDGE_MARGIN_MM * UM };
}

/** Largest first, by different measures of large; ties keep the order given. */
export const ORDERS: readonly ((piece: Piece) => number)[] = [
  (p) => p.width * p.depth,
  (p) => Math.max(p.width, p.depth),
  (p) => Math.min(p.width, p.depth),
  (p) => p.width + p.depth,
  (p) => Math.max(p.width, p.depth) / Math.min(p.width, p.depth),
  () => 0,
];

/** Smaller is better: how a box of w x d suits the lower left corner of a free rectangle. */
export type Rule = (free: Rectangle, w: number, d: number, sheet: Sheet) => number;
export const RULES: readonly Rule[] = [
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

export function emptyBed({ x, y, gap, margin }: Sheet): OpenBed {
  const whole = { x0: margin, y0: margin, x1: x - margin + gap, y1: y - margin + gap };
  return { free: [whole], places: [] };
}

/** By the rule, the lowest and leftmost of equal ones; null where there is no room. */
export function bestPlace(bed: OpenBed, piece: Piece, rule: Rule, sheet: Sheet): Place | null {
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
export function snugPlace(piece: Piece, { x, y, margin }: Sheet): Place {
  const turned = piece.width > x || piece.depth > y;
  const w = turned ? piece.depth : piece.width;
  const d = turned ? piece.width : piece.depth;
  const from = (size: number, bed: number) => (size <= bed - 2 * margin ? margin : Math.floor((bed - size) / 2));
  return { piece, x: from(w, x), y: from(d, y), turned };
}

/** As it lies. */
export const sizeOf = ({ piece, turned }: Place): readonly [w: number, d: number] =>
  turned ? [piece.depth, piece.width] : [piece.width, piece.depth];

/** Takes the place, with the gap about it, out of what is free. */
export function put(bed: OpenBed, place: Place, { gap }: Sheet): void {
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

/** The box round all. */
export function outline(places: readonly Place[]): Rectangle {
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

/** Moved to the middle of the bed, and put in the order of the pieces, then upwards and to the right. */
export function centred(places: readonly Place[], sheet: Sheet): readonly Place[] {
  const { x0, y0, x1, y1 } = outline(places);
  const dx = Math.floor((sheet.x - x0 - x1) / 2);
  const dy = Math.floor((sheet.y - y0 - y1) / 2);
  return places
    .toSorted((a, b) => a.piece.index - b.piece.index || a.y - b.y || a.x - b.x)
    .map((place) => ({ ...place, x: place.x + dx, y: place.y + dy }));
}
