/**
 * A plate that lies under the knob of a rotary switch: a mark, a number and what it tunes at every position, seen from the front.
 * At true scale, origin in the middle of the shaft, Y up, millimetres.
 */
import { type Box, type Measure, overlap, textBox } from './boxes.ts';
import type { Drawing, Shape, Text } from './drawing.ts';
import { circle, label, line, SMALL_MM } from './shapes.ts';
import { positionDeg } from './switch-angles.ts';

export interface PlatePosition {
  readonly number: string;
  /** What it tunes; empty for none. */
  readonly text: string;
}

export interface Plate {
  /** In turning order. */
  readonly positions: readonly PlatePosition[];
  readonly stepDeg: number;
  /** Words at the foot with the texts, and with numbers alone; empty for none. */
  readonly foot: { readonly texts: string; readonly numbers: string };
}

export interface DrawnPlate extends Drawing {
  readonly radiusMm: number;
  /** False where there was no room for the texts: the plate then has numbers alone. */
  readonly hasTexts: boolean;
}

/** Hole for the switch's bush: 10 mm takes the usual ones. Common practice, from memory. */
export const HOLE_MM = 10;
/** Marks: clear of a knob of 30 mm, long enough to lay a pointer on, short of the words. */
const MARK_MM = { from: 16.5, to: 20, short: 1 } as const;
const NUMBER_MM = 4.4;
/** Between words beside one another: lines of text want more than numbers. */
const APART_MM = { texts: 1.5, numbers: 0.9 } as const;
/** Greatest radius at which the middles of the words may lie. */
const MOST_MM = 56;
const RIM_MM = 2.5;

const place = (radius: number, deg: number): [number, number] => {
  const a = (deg * Math.PI) / 180;
  return [radius * Math.sin(a), radius * Math.cos(a)];
};

/** Number and text of every position round their middles at this radius, number over text. */
function words({ positions, stepDeg }: Plate, radius: number, withTexts: boolean, sizeMm: number, every: number) {
  const last = positions.length - 1;
  return positions.flatMap(({ number, text }, i): Text[] => {
    if (i !== last && (i % every !== 0 || last - i < every)) return [];
    const [x, y] = place(radius, positionDeg(i, positions.length, stepDeg));
    const style = { align: 'centre', anchor: 'middle' } as const;
    if (!withTexts || text === '') return [label(x, y, number, { ...style, sizeMm, bold: true })];
    return [label(x, y + 2, number, { ...style, sizeMm, bold: true }), label(x, y - 2.2, text, style)];
  });
}

/** Distance from the middle to the nearest and to the farthest point of a box. */
function reach({ left, right, bottom, top }: Box): [number, number] {
  const near = Math.hypot(Math.max(left, -right, 0), Math.max(bottom, -top, 0));
  const far = Math.hypot(Math.max(-left, right), Math.max(-bottom, top));
  return [near, far];
}

function clear(texts: readonly Text[], apartMm: number, measure: Measure): boolean {
  const boxes = texts.map((text) => textBox(text, measure));
  return boxes.every((box, i) => {
    if (reach(box)[0] < MARK_MM.to + MARK_MM.short) return false;
    const wide = { ...box, left: box.left - apartMm, right: box.right + apartMm };
    return boxes.slice(i + 1).every((other) => !overlap(wide, other));
  });
}

/** Words at the smallest radius that keeps them clear of one another and of the marks. */
function laidWords(plate: Plate, measure: Measure): { texts: Text[]; hasTexts: boolean } {
  const ways = [
    { withTexts: true, sizeMm: NUMBER_MM },
    { withTexts: false, sizeMm: NUMBER_MM },
    { withTexts: false, sizeMm: SMALL_MM },
  ];
  for (let every = 1; every <= plate.positions.length; every++)
    for (const { withTexts, sizeMm } of every === 1 ? ways : ways.slice(2))
      for (let radius = MARK_MM.to + 2; radius <= MOST_MM; radius += 0.5) {
        const around = words(plate, radius, withTexts, sizeMm, every);
        const told = withTexts ? plate.foot.texts : plate.foot.numbers;
        const foot =
          told === ''
            ? [[]]
            : [radius, radius + 7].map((r) => [label(0, -r, told, { align: 'centre', anchor: 'middle' })]);
        const texts = foot
          .map((one) => [...around, ...one])
          .find((all) => clear(all, withTexts ? APART_MM.texts : APART_MM.numbers, measure));
        if (texts !== undefined) return { texts, hasTexts: withTexts };
      }
  throw new RangeError(`a plate of ${plate.positions.length} positions has no room for its numbers`);
}

/** How near the words of a position at this angle come to the middle; 0 where it has none. */
function nearest(texts: readonly Text[], deg: number, measure: Measure): number {
  const own = texts.filter(({ x, y }) => {
    // Number and text of a position lie a little above and below their middle on its ray.
    const [dx, dy] = place(1, deg);
    return x * dx + y * dy > 0 && Math.abs(x * dy - y * dx) < 2.3;
  });
  const boxes = own.map((text) => textBox(text, measure));
  if (boxes.length === 0) return 0;
  const around: Box = {
    left: Math.min(...boxes.map(({ left }) => left)),
    right: Math.max(...boxes.map(({ right }) => right)),
    bottom: Math.min(...boxes.map(({ bottom }) => bottom)),
    top: Math.max(...boxes.map(({ top }) => top)),
  };
  return reach(around)[0];
}

export function drawPlate(plate: Plate, measure: Measure): DrawnPlate {
  const { texts, hasTexts } = laidWords(plate, measure);
  const boxes = texts.map((text) => textBox(text, measure));
  const farthest = Math.max(...boxes.map((box) => reach(box)[1]));
  const radiusMm = Math.ceil(farthest + RIM_MM);
  const marks = plate.positions.flatMap((_, i): Shape[] => {
    const deg = positionDeg(i, plate.positions.length, plate.stepDeg);
    const to = Math.max(MARK_MM.to, nearest(texts, deg, measure) - MARK_MM.short);
    const mark = line(...place(MARK_MM.from, deg), ...place(MARK_MM.to, deg), 'outline');
    // A fine line leads on to a number that stands farther out.
    return to < MARK_MM.to + 2 ? [mark] : [mark, line(...place(MARK_MM.to, deg), ...place(to, deg), 'hair')];
  });
  const shapes: Shape[] = [
    circle(0, 0, radiusMm, 'thin', undefined, 'cut'),
    circle(0, 0, HOLE_MM / 2, 'thin', undefined, 'hole'),
    line(-2, 0, 2, 0, 'hair'),
    line(0, -2, 0, 2, 'hair'),
    ...marks,
    ...texts,
  ];
  return { shapes, radiusMm, hasTexts };
}
