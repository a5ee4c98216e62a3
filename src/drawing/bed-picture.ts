/** A bed as it is printed, from above: its edge, the box of each piece, and in it what it is. */
import { type Box, inside, type Measure, overlap, textBox } from './boxes.ts';
import type { Shape, Text } from './drawing.ts';
import { label, line, rectangle, SMALL_MM } from './shapes.ts';
import { wrap } from './wrap.ts';

export interface BedPiece {
  /** Stands in the box where the name does not go in. */
  readonly number: number;
  readonly name: string;
  /** Lower left corner of its box on the bed, and its size as it lies. */
  readonly xMm: number;
  readonly yMm: number;
  readonly widthMm: number;
  readonly depthMm: number;
}

const LEADING = 1.25;
const PAD_MM = 0.7;

/** Number and name on several lines where all of it goes into the box, else the number, else nothing. */
function words(piece: BedPiece, box: Box, measure: Measure): Text[] {
  const x = (box.left + box.right) / 2;
  const middle = (box.bottom + box.top) / 2;
  const room = box.right - box.left - 2 * PAD_MM;
  const number = `${piece.number}`;
  const widest = Math.max(0, ...piece.name.split(' ').map((word) => measure.width(word, SMALL_MM)));
  const whole = widest <= room ? wrap(`${number} ${piece.name}`, room, SMALL_MM, false, measure) : [number];
  for (const lines of [whole, [number]]) {
    const shapes = lines.map((text, i) =>
      label(x, middle + ((lines.length - 1) / 2 - i) * SMALL_MM * LEADING, text, { align: 'centre', anchor: 'middle' }),
    );
    if (shapes.every((shape) => inside(textBox(shape, measure), box, 0))) return shapes;
  }
  return [];
}

/** The number beside a box that is too small for it, where nothing else lies; nothing where there is no such place. */
function besideBox(piece: BedPiece, box: Box, bed: Box, others: readonly Box[], measure: Measure): Text[] {
  const x = (box.left + box.right) / 2;
  const y = (box.bottom + box.top) / 2;
  const text = `${piece.number}`;
  const half = measure.width(text, SMALL_MM) / 2 + PAD_MM;
  const up = SMALL_MM / 2 + PAD_MM;
  const places = [
    [box.right + half, y],
    [box.left - half, y],
    [x, box.top + up],
    [x, box.bottom - up],
  ] as const;
  const shapes = places.map(([atX, atY]) => label(atX, atY, text, { align: 'centre', anchor: 'middle' }));
  const free = shapes.find((shape) => {
    const own = textBox(shape, measure);
    return inside(own, bed, 0) && others.every((other) => !overlap(own, other));
  });
  return free ? [free] : [];
}

/**
 * @param scale millimetres on paper for one on the bed
 * @returns lower left corner of the bed at the origin; the front edge is thick
 */
export function bedPicture(
  bed: { readonly xMm: number; readonly yMm: number },
  pieces: readonly BedPiece[],
  scale: number,
  measure: Measure,
): Shape[] {
  const shapes: Shape[] = [
    rectangle(0, 0, bed.xMm * scale, bed.yMm * scale, 'hair'),
    line(0, 0, bed.xMm * scale, 0, 'outline'),
  ];
  const bedBox = { left: 0, bottom: 0, right: bed.xMm * scale, top: bed.yMm * scale };
  const boxes = pieces.map(
    ({ xMm, yMm, widthMm, depthMm }): Box => ({
      left: xMm * scale,
      bottom: yMm * scale,
      right: (xMm + widthMm) * scale,
      top: (yMm + depthMm) * scale,
    }),
  );
  for (const { left, bottom, right, top } of boxes)
    shapes.push(rectangle(left, bottom, right - left, top - bottom, 'thin', 0.94));
  // What is written so far is kept clear of as boxes are.
  const taken = [...boxes];
  pieces.forEach((piece, i) => {
    const own = words(piece, boxes[i]!, measure);
    const texts = own.length > 0 ? own : besideBox(piece, boxes[i]!, bedBox, taken, measure);
    for (const text of texts) taken.push(textBox(text, measure));
    shapes.push(...texts);
  });
  return shapes;
}
