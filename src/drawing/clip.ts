/** The part of a drawing that lies in a window. Lines are cut at its edge; circles and text are kept whole or not at all. */
import { type Box, inside, type Measure, shapeBox } from './boxes.ts';
import type { Line, Shape } from './drawing.ts';
import { line } from './shapes.ts';

/** The part of a line in a box (Liang and Barsky 1984), or nothing. */
function cut(shape: Line, box: Box): Line[] {
  const dx = shape.x2 - shape.x1;
  const dy = shape.y2 - shape.y1;
  let from = 0;
  let to = 1;
  for (const [slope, reach] of [
    [-dx, shape.x1 - box.left],
    [dx, box.right - shape.x1],
    [-dy, shape.y1 - box.bottom],
    [dy, box.top - shape.y1],
  ] as const) {
    if (slope === 0) {
      if (reach < 0) return [];
      continue;
    }
    const at = reach / slope;
    if (slope < 0) from = Math.max(from, at);
    else to = Math.min(to, at);
  }
  if (from >= to) return [];
  return [
    {
      ...shape,
      x1: shape.x1 + from * dx,
      y1: shape.y1 + from * dy,
      x2: shape.x1 + to * dx,
      y2: shape.y1 + to * dy,
    },
  ];
}

export function clipped(shapes: readonly Shape[], window: Box, measure: Measure): Shape[] {
  return shapes.flatMap((shape): Shape[] => {
    const box = shapeBox(shape, measure);
    if (inside(box, window, 1e-9)) return [shape];
    if (shape.shape === 'line') return cut(shape, window);
    // Outlines that are not filled are cut as the lines they are made of; heads of arrows stay whole or go.
    if (shape.shape === 'polyline' && shape.fill === undefined) {
      const points = shape.closed ? [...shape.points, shape.points[0]!] : shape.points;
      return points.slice(1).flatMap(([x, y], i) => {
        const [x0, y0] = points[i]!;
        return cut(line(x0, y0, x, y, shape.weight, shape.dash ?? 'solid'), window);
      });
    }
    return [];
  });
}
