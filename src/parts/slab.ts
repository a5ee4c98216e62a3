/** The plates that jigs are made of: lower edges taken off, so that the spread of the first layers spoils no size. */
import { rectangle } from './shapes.ts';
import type { Loft, Point3 } from './solid.ts';

/** A plate on the bed with its lower left corner at (x, y). */
export function slab(
  name: string,
  x: number,
  y: number,
  width: number,
  depth: number,
  height: number,
  chamfer: number,
): Loft {
  const ring = (inset: number, z: number): Point3[] =>
    rectangle(x + inset, y + inset, width - 2 * inset, depth - 2 * inset).map(([px, py]): Point3 => [px, py, z]);
  return { kind: 'loft', name, rings: [ring(chamfer, 0), ring(0, chamfer), ring(0, height)], hubs: null };
}

/** Volume of such a plate, mm3. */
export function slabMm3(width: number, depth: number, height: number, chamfer: number): number {
  return width * depth * height - (width + depth) * chamfer ** 2 + (4 / 3) * chamfer ** 3;
}

/** A ring of a loft: `sides` corners on a circle, half a chord off angle 0 as in {@link circle}. */
export function ringAt(r: number, z: number, sides: number, x = 0, y = 0): Point3[] {
  return Array.from({ length: sides }, (_, k): Point3 => {
    const a = (2 * Math.PI * (k + 0.5)) / sides;
    return [x + r * Math.cos(a), y + r * Math.sin(a), z];
  });
}
