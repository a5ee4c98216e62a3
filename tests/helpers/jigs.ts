/** What every printed jig must keep, read from the bytes of its file. */
import { expect } from 'vitest';
import type { View } from '../../src/drawing/views.ts';
import { makePart } from '../../src/kernel/make.ts';
import type { Solid } from '../../src/parts/solid.ts';
import { boxOf, type Facet, facetsOf, surfaceOf, type Vec, volumeOf } from './stl.ts';

export interface Jig {
  readonly solid: Solid;
  readonly facets: Facet[];
  readonly triangles: number;
}

export async function jigsOf(solids: readonly Solid[]): Promise<Jig[]> {
  const jigs: Jig[] = [];
  for (const solid of solids) {
    const { bytes, report } = await makePart(solid);
    jigs.push({ solid, facets: facetsOf(bytes), triangles: report.triangles });
  }
  return jigs;
}

/**
 * One closed body of the genus, box and volume that are expected, centred and on Z = 0, without overhangs past 45 degrees.
 * `shallow` tells the ceilings of letters cut into upright faces, half a millimetre deep, which need no support.
 */
export function keepsJigRules({ solid, facets }: Jig, shallow: (corner: Vec) => boolean = () => false): void {
  const { faultySides, bodies, genus } = surfaceOf(facets);
  expect({ part: solid.part, faultySides, bodies, genus }).toEqual({
    part: solid.part,
    faultySides: 0,
    bodies: 1,
    genus: solid.expected.genus,
  });
  const { min, max } = boxOf(facets);
  expect(min[2]).toBe(0);
  for (const axis of [0, 1]) expect(Math.abs(min[axis]! + max[axis]!), `${solid.part} is centred`).toBeLessThan(0.01);
  for (const axis of [0, 1, 2]) expect(Math.abs(max[axis]! - solid.expected.maxMm[axis]!)).toBeLessThan(0.01);
  // The formula leaves out where strokes cross.
  expect(Math.abs(volumeOf(facets) / solid.expected.volumeMm3 - 1)).toBeLessThan(0.005);
  // 45 degrees look down by 0.7071.
  const steep = facets.filter(
    ({ normal, corners, area }) =>
      area > 1e-4 && normal[2] < -0.72 && corners.some((corner) => corner[2] > 0.01) && !corners.every(shallow),
  );
  expect(steep.length, `${solid.part}: overhangs`).toBe(0);
}

/** Width and height of what a view draws. */
export function extentOf(view: View): [number, number] {
  const points = view.shapes.flatMap((shape): [number, number][] => {
    if (shape.shape === 'line')
      return [
        [shape.x1, shape.y1],
        [shape.x2, shape.y2],
      ];
    if (shape.shape === 'circle') return [-1, 1].map((s) => [shape.x + s * shape.r, shape.y + s * shape.r]);
    return shape.points.map(([x, y]): [number, number] => [x, y]);
  });
  const size = (axis: 0 | 1) => Math.max(...points.map((p) => p[axis])) - Math.min(...points.map((p) => p[axis]));
  return [size(0), size(1)];
}

/** Least and greatest distance of the planes of some facets from a line along `along` through `from`. */
export function planeDistances(facets: readonly Facet[], from: Vec, which: (facet: Facet) => boolean): number[] {
  return facets
    .filter(which)
    .map(({ normal: n, corners: [c] }) =>
      Math.abs(n[0] * (c[0] - from[0]) + n[1] * (c[1] - from[1]) + n[2] * (c[2] - from[2])),
    );
}
