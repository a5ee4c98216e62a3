/** What the shapes of a drawing are for, as machines sort them. */
import type { Shape } from './drawing.ts';

/** In the order in which files name them: what is bored, what is cut out, what is only marked, what is only read. */
export const LAYERS = ['HOLES', 'CUT', 'MARKS', 'TEXT'] as const;
export type Layer = (typeof LAYERS)[number];

/** Circles are holes; a closed line of the outline's weight is cut along; every other line is a mark. */
export function layerOf(shape: Shape): Layer {
  switch (shape.shape) {
    case 'circle':
      return 'HOLES';
    case 'text':
      return 'TEXT';
    case 'polyline':
      return shape.closed && shape.weight === 'outline' ? 'CUT' : 'MARKS';
    default:
      return 'MARKS';
  }
}

/** A length with at most four decimals, never `-0`: a tenth of a micrometre. */
export function decimal(mm: number): string {
  return `${Number(mm.toFixed(4)) + 0}`;
}
