/** What flat parts are drawn with: circles as polygons that keep their size, outlines, prisms and their areas. */
import { BED, type Frame, type Point2, type Prism } from './solid.ts';

/** Greatest distance between a chord and its circle, mm. */
export const SAG_MM = 0.01;

/** Chords for an arc, so that none lies farther than 0.01 mm from it. */
export function chordsFor(radiusMm: number, sweepRad = 2 * Math.PI, least = 12): number {
  return Math.max(least, Math.ceil(sweepRad / (2 * Math.acos(1 - SAG_MM / Math.max(radiusMm, 2 * SAG_MM)))));
}

/**
 * A circle as a polygon, counterclockwise. A solid one has its corners on the circle; a `hole` has its sides on it, so that
 * what goes through it fits. Corners stand half a chord off angle 0, so that they do not fall on cutters at round angles.
 */
export function circle(radiusMm: number, use: 'solid' | 'hole', x = 0, y = 0): Point2[] {
  const n = chordsFor(radiusMm);
  const r = use === 'hole' ? radiusMm / Math.cos(Math.PI / n) : radiusMm;
  return Array.from({ length: n }, (_, k): Point2 => {
    const a = (2 * Math.PI * (k + 0.5)) / n;
    return [x + r * Math.cos(a), y + r * Math.sin(a)];
  });
}

/** A rectangle, counterclockwise from its lower left corner. */
export function rectangle(x: number, y: number, width: number, height: number): Point2[] {
  return [
    [x, y],
    [x + width, y],
    [x + width, y + height],
    [x, y + height],
  ];
}

/** The outline of an opening: run through the other way. */
export const opening = (outline: readonly Point2[]): Point2[] => [...outline].reverse();

export function prism(
  name: string,
  outlines: readonly (readonly Point2[])[],
  fromMm: number,
  toMm: number,
  frame: Frame = BED,
): Prism {
  return { kind: 'prism', name, outlines, fromMm, toMm, frame };
}

/** Enclosed area; negative for a clockwise outline, so that the sum over outlines and openings is what is filled. */
export function areaOf(outline: readonly Point2[]): number {
  let twice = 0;
  for (const [i, [x, y]] of outline.entries()) {
    const [u, v] = outline[(i + 1) % outline.length]!;
    twice += x * v - u * y;
  }
  return twice / 2;
}

/** Extremes of points. */
export function boundsOf(points: readonly Point2[]): { min: Point2; max: Point2 } {
  const xs = points.map((p) => p[0]);
  const ys = points.map((p) => p[1]);
  return { min: [Math.min(...xs), Math.min(...ys)], max: [Math.max(...xs), Math.max(...ys)] };
}
