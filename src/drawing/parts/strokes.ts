/** What views of jigs are drawn with: outlines, circles, sizes between points. */
import type { Circle, Polyline } from '../drawing.ts';
import { polygon, polyline, rectangle } from '../shapes.ts';
import type { Callout, Span } from '../views.ts';

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

/** To a hundredth, without noughts at the end. */
export const size = (mm: number): string => `${Number(mm.toFixed(2))}`;

export function across(fromX: number, toX: number, y: number, side: 'above' | 'below', text?: string): Span {
  return { kind: 'span', along: 'x', from: [fromX, y], to: [toX, y], side, text: text ?? size(toX - fromX) };
}

export function upright(fromY: number, toY: number, x: number, side: 'left' | 'right', text?: string): Span {
  return { kind: 'span', along: 'y', from: [x, fromY], to: [x, toY], side, text: text ?? size(toY - fromY) };
}

export const callout = (x: number, y: number, side: Callout['side'], text: string): Callout => ({
  kind: 'callout',
  at: [x, y],
  side,
  text,
});
