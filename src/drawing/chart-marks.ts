/** What stands for a value on a control chart, told apart by shape alone. Origin given, Y up, millimetres. */
import type { Circle, Polyline, Shape } from './drawing.ts';
import { circle, polygon, rectangle } from './shapes.ts';

export interface MarkSizes {
  /** Radius of a plain mark. */
  readonly r: number;
}

/** Inside the limits: a dot. */
export const valueMark = (x: number, y: number, { r }: MarkSizes, name?: string): Circle =>
  circle(x, y, r, 'hair', 0, name);

/** In a run: a dot that is empty. */
export const runMark = (x: number, y: number, { r }: MarkSizes, name?: string): Circle =>
  circle(x, y, Math.max(r, 0.7), 'thin', 1, name);

/** Beyond a limit: a square, never small. */
export function beyondMark(x: number, y: number, { r }: MarkSizes): Polyline {
  const half = Math.max(1.2 * r, 1);
  return rectangle(x - half, y - half, 2 * half, 2 * half, 'thin', 0);
}

/** Does not belong to the rest: a diamond round its mark. */
export function outlierMark(x: number, y: number, { r }: MarkSizes): Polyline {
  const reach = Math.max(2.6 * r, 2.4);
  return polygon(
    [
      [x, y + reach],
      [x + reach, y],
      [x, y - reach],
      [x - reach, y],
    ],
    'thin',
    1,
  );
}

/** Off the picture, up (1) or down (-1): a triangle at its edge. */
export function offMark(x: number, y: number, way: 1 | -1, { r }: MarkSizes): Shape {
  const half = Math.max(1.3 * r, 1.3);
  return polygon(
    [
      [x, y],
      [x - half, y - way * 2 * half],
      [x + half, y - way * 2 * half],
    ],
    'thin',
    0,
  );
}
