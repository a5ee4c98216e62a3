/** What views of jigs are drawn with: outlines, circles, sizes between points. */
import type { Circle, Polyline } from '../drawing.ts';
import { polygon, polyline, rectangle } from '../shapes.ts';
import type { Callout, Span } from '../views.ts';
import { type Length, type Wording, worded } from '../words.ts';

type Point = readonly [number, number];

export const outline = (points: readonly Point[]): Polyline => polygon(points, 'outline');

export const hidden = (points: readonly Point[]): Polyline => ({ ...polyline(points), dash: 'dashed' });

export const box = (x: number, y: number, width: number, height: number): Polyline =>
  rectangle(x, y, width, height, 'outline');

export const round = (x: number, y: number, r: number, name?: string): Circle => ({
  shape: 'circle',
  weight: 'outline',
  x,
  y,
  r,
  ...(name === undefined ? {} : { name }),
});

export const size = (mm: number): Length => ({ mm });

export function across(fromX: number, toX: number, y: number, side: 'above' | 'below', words?: Wording): Span {
  const [from, to] = [[fromX, y] as const, [toX, y] as const];
  return { kind: 'span', along: 'x', from, to, side, ...worded(words ?? size(toX - fromX)) };
}

export function upright(fromY: number, toY: number, x: number, side: 'left' | 'right', words?: Wording): Span {
  const [from, to] = [[x, fromY] as const, [x, toY] as const];
  return { kind: 'span', along: 'y', from, to, side, ...worded(words ?? size(toY - fromY)) };
}

export const callout = (x: number, y: number, side: Callout['side'], words: Wording): Callout => ({
  kind: 'callout',
  at: [x, y],
  side,
  ...worded(words),
});
