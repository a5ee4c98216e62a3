/** The legend of a picture: every sign drawn as it is there, with its words. Flows over lines. */
import type { Measure } from './boxes.ts';
import type { Drawing, Shape } from './drawing.ts';
import { label, moved, SMALL_MM } from './shapes.ts';

export interface Sign {
  /** Within 8 x 3 mm, its lower left corner at the origin. */
  readonly shapes: readonly Shape[];
  readonly words: string;
}

/** Room of a sign. */
export const SIGN_MM = { width: 8, height: 3 } as const;
const LINE_MM = 5;

/** Origin at the upper left corner, Y up, so all of it lies below 0. No sign's words are longer than a line. */
export function drawLegend(signs: readonly Sign[], widthMm: number, measure: Measure): Drawing & { heightMm: number } {
  const shapes: Shape[] = [];
  let [x, y] = [0, -LINE_MM + 0.8];
  for (const { shapes: sign, words } of signs) {
    const width = SIGN_MM.width + 1.5 + measure.width(words, SMALL_MM);
    if (x > 0 && x + width > widthMm) [x, y] = [0, y - LINE_MM];
    shapes.push(...sign.map((shape) => moved(shape, x, y)));
    shapes.push(label(x + SIGN_MM.width + 1.5, y + SIGN_MM.height / 2, words, { anchor: 'middle' }));
    x += width + 5;
  }
  return { shapes, heightMm: 0.8 - y };
}
