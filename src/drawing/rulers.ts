/** What a print is measured by: a ruler of 100 mm along either axis, a check square, a cross on a shared edge. */
import type { Measure } from './boxes.ts';
import type { Drawing, Shape } from './drawing.ts';
import { arrow, label, line, rectangle, SMALL_MM } from './shapes.ts';

const RULER_MM = 100;
/** How far a ruler reaches beside its line, figures included. */
export const RULER_BREADTH_MM = 8.5;

const INCH_MM = 25.4;
const INCHES = 4;
const SIXTEENTHS = 16;
/** How far the ruler in inches reaches, its last figure included. */
export const INCH_RULER_MM = INCHES * INCH_MM + 4;

/** How long the stroke of a sixteenth is: the longer the fewer it halves. */
function inchStroke(sixteenth: number): number {
  if (sixteenth % SIXTEENTHS === 0) return 4.2;
  return sixteenth % 8 === 0 ? 3.2 : sixteenth % 4 === 0 ? 2.4 : sixteenth % 2 === 0 ? 1.8 : 1.2;
}

/** Four inches in sixteenths to the right of the origin, strokes and figures below its line. */
export function inchRuler(unit: string): Drawing {
  const shapes: Shape[] = [line(0, 0, INCHES * INCH_MM, 0, 'thin')];
  for (let n = 0; n <= INCHES * SIXTEENTHS; n++) {
    const x = (n * INCH_MM) / SIXTEENTHS;
    const whole = n % SIXTEENTHS === 0;
    shapes.push(line(x, 0, x, -inchStroke(n), whole ? 'thin' : 'hair'));
    if (!whole) continue;
    const text = n === INCHES * SIXTEENTHS ? `${INCHES} ${unit}` : `${n / SIXTEENTHS}`;
    shapes.push(label(x, -7.2, text, { align: 'centre' }));
  }
  return { shapes };
}

/** 100 mm to the right of the origin, ticks and figures below its line. */
export function rulerAcross(unit: string): Drawing {
  const shapes: Shape[] = [line(0, 0, RULER_MM, 0, 'thin')];
  for (let mm = 0; mm <= RULER_MM; mm++) {
    const long = mm % 10 === 0 ? 4.2 : mm % 5 === 0 ? 3 : 1.8;
    shapes.push(line(mm, 0, mm, -long, mm % 10 === 0 ? 'thin' : 'hair'));
    if (mm % 10 === 0) shapes.push(label(mm, -7.2, mm === RULER_MM ? `${mm} ${unit}` : `${mm}`, { align: 'centre' }));
  }
  return { shapes };
}

/** 100 mm up from the origin, ticks and figures left of its line. */
export function rulerUp(unit: string): Drawing {
  const shapes: Shape[] = [line(0, 0, 0, RULER_MM, 'thin')];
  for (let mm = 0; mm <= RULER_MM; mm++) {
    const long = mm % 10 === 0 ? 4.2 : mm % 5 === 0 ? 3 : 1.8;
    shapes.push(line(0, mm, -long, mm, mm % 10 === 0 ? 'thin' : 'hair'));
    if (mm % 10 === 0) {
      const text = mm === RULER_MM ? `${mm} ${unit}` : `${mm}`;
      shapes.push(label(-5, mm, text, { align: 'centre', turnDeg: 90 }));
    }
  }
  return { shapes };
}

const SQUARE_MM = 50;
/** Room for the square. */
export const SQUARE_ROOM_MM = SQUARE_MM + 2;

/** A square of 50 mm from the middle of one line to the middle of the opposite one, its lower left corner at the origin. */
export function checkSquare(words: readonly string[], measure: Measure): Drawing {
  const shapes: Shape[] = [rectangle(0, 0, SQUARE_MM, SQUARE_MM, 'thin')];
  const step = SMALL_MM * 1.35;
  const top = SQUARE_MM / 2 + ((words.length - 1) * step) / 2;
  words.forEach((text, i) => {
    shapes.push(label(SQUARE_MM / 2 + 4.5, top - i * step, text, { align: 'centre', anchor: 'middle' }));
  });
  const size = `${SQUARE_MM}`;
  const half = measure.width(size, SMALL_MM, true) / 2 + 1;
  const middle = SQUARE_MM / 2;
  const low = 4.5;
  shapes.push(...arrow(middle - half, low, 0, low), ...arrow(middle + half, low, SQUARE_MM, low));
  shapes.push(label(middle, low, size, { align: 'centre', anchor: 'middle', bold: true }));
  shapes.push(...arrow(low, middle - half, low, 0), ...arrow(low, middle + half, low, SQUARE_MM));
  shapes.push(label(low + 1, middle, size, { align: 'centre', turnDeg: 90, bold: true }));
  return { shapes };
}

/** Two lines that cross at a point; the same point is on the tile beside. */
export function cross(x: number, y: number, reachMm: number): Shape[] {
  return [line(x - reachMm, y, x + reachMm, y, 'hair'), line(x, y - reachMm, x, y + reachMm, 'hair')];
}
