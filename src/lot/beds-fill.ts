/** The fullest bed that can be put together from what is left to print: one layout, to be printed as often as it can be. */
import {
  bestPlace,
  emptyBed,
  ORDERS,
  outline,
  type Piece,
  type Place,
  put,
  RULES,
  type Rule,
  type Sheet,
  snugPlace,
} from '../parts/bed-rectangles.ts';

/** A box and how many of it are left. */
export interface Stack {
  readonly piece: Piece;
  readonly left: number;
}

/** With as many equal boxes on a bed, rows are not bettered by more than a few. */
const MANY = 50;

/**
 * Most area covered, then closest together, of several orders and rules; of a single part also in rows of both ways to lie.
 * All pieces fit the sheet. Empty only when nothing is left.
 */
export function fillBed(stacks: readonly Stack[], sheet: Sheet): readonly Place[] {
  const there = stacks.filter(({ left }) => left > 0);
  const plain = there.length === 1 ? rows(there[0]!, sheet) : [];
  if (plain.some(({ length }) => length >= MANY))
    return plain.reduce((best, rowed) => (fuller(rowed, best) ? rowed : best));
  const layouts = (there.length > 1 ? ORDERS : ORDERS.slice(0, 1)).flatMap((order) => {
    const sorted = there.toSorted((a, b) => order(b.piece) - order(a.piece) || a.piece.index - b.piece.index);
    return RULES.map((rule) => greedy(sorted, rule, sheet));
  });
  return [...plain, ...layouts].reduce((best, layout) => (fuller(layout, best) ? layout : best), []);
}

function fuller(a: readonly Place[], b: readonly Place[]): boolean {
  const area = (places: readonly Place[]) => places.reduce((sum, { piece }) => sum + piece.width * piece.depth, 0);
  const spread = (places: readonly Place[]) => {
    const { x0, y0, x1, y1 } = outline(places);
    return x1 - x0 + y1 - y0;
  };
  const more = area(a) - area(b);
  return more > 0 || (more === 0 && a.length > 0 && spread(a) < spread(b));
}

/** As many of each as go on, one part after the other. */
function greedy(stacks: readonly Stack[], rule: Rule, sheet: Sheet): readonly Place[] {
  const bed = emptyBed(sheet);
  for (const { piece, left } of stacks)
    for (let n = 0; n < left; n++) {
      // What does not fit inside the margin lies on a bed of its own.
      const place = bestPlace(bed, piece, rule, sheet) ?? (bed.places.length === 0 ? snugPlace(piece, sheet) : null);
      if (!place) break;
      put(bed, place, sheet);
    }
  return bed.places;
}

/**
 * Rows of a part as drawn over, or beside, rows of it turned: for equal boxes often more than any greedy choice of places.
 */
function rows({ piece, left }: Stack, { x, y, gap, margin }: Sheet): readonly (readonly Place[])[] {
  const [w, h] = [x - 2 * margin + gap, y - 2 * margin + gap];
  const layouts: Place[][] = [];
  for (const turned of [false, true]) {
    const [a, b] = turned ? [piece.depth, piece.width] : [piece.width, piece.depth];
    const block = (x0: number, y0: number, across: number, up: number, way: boolean): Place[] => {
      const [dx, dy] = way ? [piece.depth + gap, piece.width + gap] : [piece.width + gap, piece.depth + gap];
      return Array.from({ length: Math.max(0, across * up) }, (_, i) => ({
        piece,
        x: x0 + (i % across) * dx,
        y: y0 + Math.floor(i / across) * dy,
        turned: way,
      }));
    };
    const [across, up] = [Math.floor(w / (a + gap)), Math.floor(h / (b + gap))];
    for (let n = 0; n <= up; n++) {
      const y0 = margin + n * (b + gap);
      const over = [Math.floor(w / (b + gap)), Math.floor((h - n * (b + gap)) / (a + gap))] as const;
      layouts.push([...block(margin, margin, across, n, turned), ...block(margin, y0, ...over, !turned)]);
    }
    for (let n = 0; n <= across; n++) {
      const x0 = margin + n * (a + gap);
      const beside = [Math.floor((w - n * (a + gap)) / (b + gap)), Math.floor(h / (a + gap))] as const;
      layouts.push([...block(margin, margin, n, up, turned), ...block(x0, margin, ...beside, !turned)]);
    }
  }
  return layouts.map((layout) => layout.slice(0, left));
}
