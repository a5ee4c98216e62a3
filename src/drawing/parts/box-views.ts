/** Views of any part by its outer size alone: what is shown where no better views are written. */
import { rectangle } from '../shapes.ts';
import type { Span, View } from '../views.ts';

/** Two decimals at most: what can be measured. */
const length = (mm: number): string => `${Number(mm.toFixed(2))}`;

function block(title: View['title'], across: number, up: number): View {
  const wide: Span = { kind: 'span', along: 'x', from: [0, 0], to: [across, 0], side: 'below', text: length(across) };
  const high: Span = { kind: 'span', along: 'y', from: [across, 0], to: [across, up], side: 'right', text: length(up) };
  return { title, shapes: [rectangle(0, 0, across, up, 'outline')], dimensions: [wide, high] };
}

/** @param sizeMm width, depth and height as the part is printed */
export function boxViews(sizeMm: readonly number[]): View[] {
  const [width, depth, height] = sizeMm as readonly [number, number, number];
  return [block('elevation', width, height), block('plan', width, depth)];
}
