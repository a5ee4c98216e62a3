/** Short ways to write the dimensions of a view. */
import type { Callout, Mark, Span } from '../views.ts';
import { type Length, type Piece, said, type Wording, worded } from '../words.ts';

export type Point = readonly [number, number];

export const mm = (x: number): Length => ({ mm: x });
export const round = (x: number): readonly Piece[] => said`⌀ ${mm(x)}`;
export const degrees = (x: number): string => `${Number(x.toFixed(1))}°`;

export const span = (along: Span['along'], from: Point, to: Point, side: Span['side'], words: Wording): Span => ({
  kind: 'span',
  along,
  from,
  to,
  side,
  ...worded(words),
});
export const callout = (at: Point, side: Callout['side'], words: Wording): Callout => ({
  kind: 'callout',
  at,
  side,
  ...worded(words),
});
export const mark = (at: Point, text: string): Mark => ({ kind: 'mark', at, text });
