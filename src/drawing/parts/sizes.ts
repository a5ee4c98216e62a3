/** Short ways to write the dimensions of a view. */
import type { Callout, Mark, Span } from '../views.ts';

export type Point = readonly [number, number];

/** Two decimals at most: what can be measured. */
export const mm = (x: number): string => `${Number(x.toFixed(2))}`;
export const round = (x: number): string => `⌀ ${mm(x)}`;
export const degrees = (x: number): string => `${Number(x.toFixed(1))}°`;

export const span = (along: Span['along'], from: Point, to: Point, side: Span['side'], text: string): Span => ({
  kind: 'span',
  along,
  from,
  to,
  side,
  text,
});
export const callout = (at: Point, side: Callout['side'], text: string): Callout => ({
  kind: 'callout',
  at,
  side,
  text,
});
export const mark = (at: Point, text: string): Mark => ({ kind: 'mark', at, text });
