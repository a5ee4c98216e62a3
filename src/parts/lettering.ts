/** Letters and figures as strokes, for engravings. The least that prints legibly is 2 mm high with strokes of 0.5 mm. */
import vectorText from '@jscad/modeling/src/text/vectorText.js';
import type { Point2 } from './solid.ts';

/** Points of a figure closer than this part of its height do not show in the print. */
const FINEST = 0.06;
/** Between two figures, as a share of their height, and from word to word. */
const SPACE = 0.3;
const WORD = 0.6;

export interface Glyph {
  readonly strokes: readonly Point2[][];
  readonly width: number;
}

const drawn = new Map<string, Glyph>();

/** The font's own comma hangs below the foot line, into the ticks, and its dash is wider than a figure. */
const OWN_GLYPHS: Readonly<Record<string, Point2[][]>> = {
  ',': [
    [
      [0.1, 0.15],
      [0, -0.02],
    ],
  ],
  '-': [
    [
      [0, 0.5],
      [0.4, 0.5],
    ],
  ],
};

/** A figure one unit high, its left edge and its foot line at 0. */
export function glyph(char: string): Glyph {
  const known = drawn.get(char);
  if (known) return known;
  // The font's nominal height is two thirds of its capitals'.
  const raw: readonly Point2[][] = OWN_GLYPHS[char] ?? vectorText({ height: 1 / 1.5 }, char);
  const xs = raw.flat().map((p) => p[0]);
  const left = Math.min(...xs);
  const made = {
    strokes: raw.map((line) => thin(line.map((p): Point2 => [p[0] - left, p[1]]))),
    width: Math.max(...xs) - left,
  };
  drawn.set(char, made);
  return made;
}

/** Leaves out points that stand closer to the last kept one than shows in the print. */
function thin(line: readonly Point2[]): Point2[] {
  const kept: Point2[] = [];
  for (const [i, p] of line.entries()) {
    const last = kept[kept.length - 1];
    if (last && i < line.length - 1 && Math.hypot(p[0] - last[0], p[1] - last[1]) < FINEST) continue;
    kept.push(p);
  }
  return kept;
}

/** Width of a text in capitals `heightMm` high, edge strokes not counted. */
export function textWidthMm(text: string, heightMm: number): number {
  const signs = [...text];
  const widths = signs.map((sign) => (sign === ' ' ? WORD : glyph(sign).width));
  return heightMm * (widths.reduce((sum, width) => sum + width, 0) + SPACE * Math.max(0, signs.length - 1));
}

/** The strokes of a text whose foot line starts at (x, y), or is centred there. */
export function textStrokes(
  text: string,
  heightMm: number,
  x: number,
  y: number,
  align: 'left' | 'centre' = 'left',
): Point2[][] {
  const strokes: Point2[][] = [];
  let along = align === 'centre' ? x - textWidthMm(text, heightMm) / 2 : x;
  for (const sign of text) {
    if (sign !== ' ')
      for (const stroke of glyph(sign).strokes)
        strokes.push(stroke.map(([px, py]): Point2 => [along + px * heightMm, y + py * heightMm]));
    along += heightMm * ((sign === ' ' ? WORD : glyph(sign).width) + SPACE);
  }
  return strokes;
}
