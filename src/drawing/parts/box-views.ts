/** Views of any part by its outer size alone: what is shown where no better views are written. */
import { rectangle } from '../shapes.ts';
import type { View } from '../views.ts';
import { across, upright } from './strokes.ts';

function block(title: View['title'], wide: number, high: number): View {
  return {
    title,
    shapes: [rectangle(0, 0, wide, high, 'outline')],
    dimensions: [across(0, wide, 0, 'below'), upright(0, high, wide, 'right')],
  };
}

/** @param sizeMm width, depth and height as the part is printed */
export function boxViews(sizeMm: readonly number[]): View[] {
  const [width, depth, height] = sizeMm as readonly [number, number, number];
  return [block('elevation', width, height), block('plan', width, depth)];
}
