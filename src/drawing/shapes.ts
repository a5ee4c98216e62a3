/** Short ways to make the shapes of a drawing, and to move them. Millimetres, Y up. */
import type { Circle, Dash, Drawing, Line, Polyline, Shape, Text, Weight } from './drawing.ts';

/** Smallest type that may be printed, 8 pt, as a size in millimetres. */
export const SMALL_MM = (8 * 25.4) / 72;
/** Type of running text and tables, 9 pt. */
export const BODY_MM = (9 * 25.4) / 72;
/** Capitals of the sheet's type face are this share of its size. */
export const CAP_SHARE = 0.729;

export function line(
  x1: number,
  y1: number,
  x2: number,
  y2: number,
  weight: Weight = 'thin',
  dash: Dash = 'solid',
): Line {
  return { shape: 'line', x1, y1, x2, y2, weight, dash };
}

export function polyline(points: readonly (readonly [number, number])[], weight: Weight = 'thin'): Polyline {
  return { shape: 'polyline', points, weight };
}

export function polygon(
  points: readonly (readonly [number, number])[],
  weight: Weight = 'thin',
  fill?: number,
  dash: Dash = 'solid',
): Polyline {
  const shape: Polyline = { shape: 'polyline', points, weight, dash, closed: true };
  return fill === undefined ? shape : { ...shape, fill };
}

/** A rectangle from its lower left corner. */
export function rectangle(
  x: number,
  y: number,
  width: number,
  height: number,
  weight: Weight = 'thin',
  fill?: number,
  dash: Dash = 'solid',
): Polyline {
  const corners = [
    [x, y],
    [x + width, y],
    [x + width, y + height],
    [x, y + height],
  ] as const;
  return polygon(corners, weight, fill, dash);
}

export function circle(x: number, y: number, r: number, weight: Weight = 'thin', fill?: number, name?: string): Circle {
  return {
    shape: 'circle',
    x,
    y,
    r,
    weight,
    ...(fill === undefined ? {} : { fill }),
    ...(name === undefined ? {} : { name }),
  };
}

export function label(
  x: number,
  y: number,
  text: string,
  rest: Partial<Omit<Text, 'shape' | 'x' | 'y' | 'text'>> = {},
): Text {
  return { shape: 'text', x, y, text, sizeMm: SMALL_MM, ...rest };
}

/** A filled arrow head with its tip at (x, y), pointing along `angleDeg` (counterclockwise from the X axis). */
export function arrowHead(x: number, y: number, angleDeg: number, lengthMm = 2.4): Polyline {
  const a = (angleDeg * Math.PI) / 180;
  const half = lengthMm * 0.3;
  const back = [x - lengthMm * Math.cos(a), y - lengthMm * Math.sin(a)] as const;
  return polygon(
    [
      [x, y],
      [back[0] - half * Math.sin(a), back[1] + half * Math.cos(a)],
      [back[0] + half * Math.sin(a), back[1] - half * Math.cos(a)],
    ],
    'hair',
    0,
  );
}

/** A line with a filled head at its end. */
export function arrow(x1: number, y1: number, x2: number, y2: number, weight: Weight = 'thin'): Shape[] {
  const angle = (Math.atan2(y2 - y1, x2 - x1) * 180) / Math.PI;
  const back = 1.2 / Math.hypot(x2 - x1, y2 - y1);
  return [line(x1, y1, x2 + (x1 - x2) * back, y2 + (y1 - y2) * back, weight), arrowHead(x2, y2, angle)];
}

/** The earth symbol hanging from (x, y): a stem and three bars that shorten. */
export function earthSymbol(x: number, y: number): Shape[] {
  return [
    line(x, y, x, y - 1.6, 'thin'),
    line(x - 2, y - 1.6, x + 2, y - 1.6, 'outline'),
    line(x - 1.25, y - 2.5, x + 1.25, y - 2.5, 'outline'),
    line(x - 0.5, y - 3.4, x + 0.5, y - 3.4, 'outline'),
  ];
}

/** The same shape, moved. */
export function moved<T extends Shape>(shape: T, dx: number, dy: number): T {
  switch (shape.shape) {
    case 'line':
      return { ...shape, x1: shape.x1 + dx, y1: shape.y1 + dy, x2: shape.x2 + dx, y2: shape.y2 + dy };
    case 'polyline':
      return { ...shape, points: shape.points.map(([x, y]) => [x + dx, y + dy] as const) };
    default:
      return { ...shape, x: shape.x + dx, y: shape.y + dy };
  }
}

export function movedAll(drawing: Drawing, dx: number, dy: number): Shape[] {
  return drawing.shapes.map((shape) => moved(shape, dx, dy));
}
