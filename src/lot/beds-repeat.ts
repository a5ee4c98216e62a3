/** Many pieces of few parts on beds of one printer: few beds, and of these few different ones, which are printed again. */
import { packed } from '../parts/bed-layout.ts';
import { centred, type Piece, type Place, type Sheet } from '../parts/bed-rectangles.ts';
import { fillBed, type Stack } from './beds-fill.ts';

export interface RepeatedBed {
  /** In the order of the pieces' indices. */
  readonly places: readonly Place[];
  readonly count: number;
}

/** With more pieces than this they are not laid out one by one: the time grows with pieces times beds. */
const SINGLY = 40;

/**
 * Three ways are tried: every piece on the first bed with room; the fullest bed of all parts as often as it can be had, and
 * so on with the rest; full beds of one part each, and the rest in the better of the two other ways. Fewest beds win, of
 * equal ones the fewest different ones.
 *
 * @param stacks with indices that differ; all pieces fit the sheet
 */
export function repeatedBeds(stacks: readonly Stack[], sheet: Sheet): readonly RepeatedBed[] {
  return [alike(stacks, sheet), ...ways(stacks, sheet)]
    .map((beds) => merged(beds, sheet))
    .reduce((best, beds) => (fewer(beds, best) ? beds : best));
}

/** Copies of one part on a bed of its own. */
export function capacityOf(piece: Piece, sheet: Sheet): number {
  const most = Math.ceil((sheet.x * sheet.y) / (piece.width * piece.depth));
  return fillBed([{ piece, left: most }], sheet).length;
}

const countOf = (beds: readonly RepeatedBed[]) => beds.reduce((sum, { count }) => sum + count, 0);
const fewer = (a: readonly RepeatedBed[], b: readonly RepeatedBed[]) =>
  (countOf(a) - countOf(b) || a.length - b.length) < 0;

function ways(stacks: readonly Stack[], sheet: Sheet): readonly (readonly RepeatedBed[])[] {
  const pieces = stacks.reduce((sum, { left }) => sum + left, 0);
  return pieces > SINGLY ? [fullest(stacks, sheet)] : [fullest(stacks, sheet), singly(stacks, sheet)];
}

function singly(stacks: readonly Stack[], sheet: Sheet): readonly RepeatedBed[] {
  const pieces = stacks.flatMap(({ piece, left }) => Array.from({ length: left }, () => piece));
  return packed(pieces, sheet).map(({ places }) => ({ places, count: 1 }));
}

function fullest(stacks: readonly Stack[], sheet: Sheet): readonly RepeatedBed[] {
  const beds: RepeatedBed[] = [];
  let left = stacks;
  while (left.some((stack) => stack.left > 0)) {
    const places = fillBed(left, sheet);
    const taken = tally(places);
    const count = Math.min(
      ...left.flatMap((stack) => {
        const n = taken.get(stack.piece.index) ?? 0;
        return n > 0 ? [Math.floor(stack.left / n)] : [];
      }),
    );
    beds.push({ places, count });
    left = left.map((stack) => ({ ...stack, left: stack.left - count * (taken.get(stack.piece.index) ?? 0) }));
  }
  return beds;
}

function alike(stacks: readonly Stack[], sheet: Sheet): readonly RepeatedBed[] {
  const full = stacks.flatMap((stack) => {
    const places = fillBed([stack], sheet);
    return places.length > 0 ? [{ places, count: Math.floor(stack.left / places.length) }] : [];
  });
  const rest = stacks
    .filter(({ left }) => left > 0)
    .map((stack, i) => ({ ...stack, left: stack.left % full[i]!.places.length }));
  return [
    ...full,
    ...ways(rest, sheet).reduce((best, beds) => (fewer(merged(beds, sheet), merged(best, sheet)) ? beds : best)),
  ];
}

function tally(places: readonly Place[]): ReadonlyMap<number, number> {
  const found = new Map<number, number>();
  for (const { piece } of places) found.set(piece.index, (found.get(piece.index) ?? 0) + 1);
  return found;
}

/** Beds with the same on them are one bed, printed more often. */
function merged(beds: readonly RepeatedBed[], sheet: Sheet): readonly RepeatedBed[] {
  const found = new Map<string, RepeatedBed>();
  for (const { places, count } of beds) {
    if (count === 0) continue;
    const content = JSON.stringify([...tally(places)].sort((a, b) => a[0] - b[0]));
    const before = found.get(content);
    found.set(content, before ? { ...before, count: before.count + count } : { places: centred(places, sheet), count });
  }
  return [...found.values()];
}
