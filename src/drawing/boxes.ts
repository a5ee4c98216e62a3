/** Where the shapes of a drawing reach, in millimetres, Y up. */
import type { Shape, Text } from './drawing.ts';
import { CAP_SHARE } from './shapes.ts';

export interface Box {
  readonly left: number;
  readonly bottom: number;
  readonly right: number;
  readonly top: number;
}

/** Measures a line of text; given by whoever knows the type face. */
export interface Measure {
  /** Width in millimetres of one line. */
  width(text: string, sizeMm: number, bold?: boolean): number;
  /** Baseline to baseline as a share of the size, for text that is set more closely than usual. */
  readonly leading?: number;
}

/** Depth of descenders below the baseline as a share of the size. */
const DESCENT = 0.22;

/** The box round a text, from its descenders to its capitals, turned with it. */
export function textBox(text: Text, measure: Measure): Box {
  const width = measure.width(text.text, text.sizeMm, text.bold);
  const left = text.align === 'right' ? -width : text.align === 'centre' ? -width / 2 : 0;
  const base = text.anchor === 'middle' ? (-CAP_SHARE * text.sizeMm) / 2 : 0;
  const bottom = base - DESCENT * text.sizeMm;
  const top = base + CAP_SHARE * text.sizeMm;
  const a = ((text.turnDeg ?? 0) * Math.PI) / 180;
  const corners = [
    [left, bottom],
    [left + width, bottom],
    [left + width, top],
    [left, top],
  ] as const;
  const xs = corners.map(([x, y]) => text.x + x * Math.cos(a) - y * Math.sin(a));
  const ys = corners.map(([x, y]) => text.y + x * Math.sin(a) + y * Math.cos(a));
  return { left: Math.min(...xs), right: Math.max(...xs), bottom: Math.min(...ys), top: Math.max(...ys) };
}

export function shapeBox(shape: Shape, measure: Measure): Box {
  switch (shape.shape) {
    case 'text':
      return textBox(shape, measure);
    case 'circle':
      return {
        left: shape.x - shape.r,
        right: shape.x + shape.r,
        bottom: shape.y - shape.r,
        top: shape.y + shape.r,
      };
    case 'line':
      return {
        left: Math.min(shape.x1, shape.x2),
        right: Math.max(shape.x1, shape.x2),
        bottom: Math.min(shape.y1, shape.y2),
        top: Math.max(shape.y1, shape.y2),
      };
    default: {
      const box = { left: Infinity, right: -Infinity, bottom: Infinity, top: -Infinity };
      for (const [x, y] of shape.points) {
        box.left = Math.min(box.left, x);
        box.right = Math.max(box.right, x);
        box.bottom = Math.min(box.bottom, y);
        box.top = Math.max(box.top, y);
      }
      return box;
    }
  }
}

/** True when two boxes share more than a touch of `allowMm`. */
export function overlap(a: Box, b: Box, allowMm = 0): boolean {
  return (
    a.left < b.right - allowMm && b.left < a.right - allowMm && a.bottom < b.top - allowMm && b.bottom < a.top - allowMm
  );
}

/** True when `inner` lies in `outer`, give or take `allowMm`. */
export function inside(inner: Box, outer: Box, allowMm = 0): boolean {
  return (
    inner.left >= outer.left - allowMm &&
    inner.right <= outer.right + allowMm &&
    inner.bottom >= outer.bottom - allowMm &&
    inner.top <= outer.top + allowMm
  );
}
