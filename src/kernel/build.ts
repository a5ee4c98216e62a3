/** Solid description to mesh: own meshes for every shape, one batch of booleans. */
import type { Manifold, ManifoldToplevel, Mat4 } from 'manifold-3d';
import type { Cutter, Engraving, Frame, Point2, Shape, Solid } from '../parts/solid.ts';
import { loftMesh } from './loft.ts';
import type { TriangleMesh } from './mesh.ts';
import { MeshError } from './mesh-error.ts';
import { skinMesh } from './skin.ts';

/** @throws MeshError naming the shape or operation that failed */
export function buildSolid(kernel: ManifoldToplevel, solid: Solid): TriangleMesh {
  const made: Manifold[] = [];
  const keep = (operation: string, make: () => Manifold): Manifold => {
    const manifold = good(solid.part, operation, make);
    made.push(manifold);
    return manifold;
  };
  const shape = (one: Shape | Cutter) =>
    keep(one.kind === 'skin' ? 'turned body' : one.name, () => shapeOf(kernel, one));
  try {
    const shapes = solid.shapes.map(shape);
    const cutters = solid.cutters.map(shape);
    const whole = shapes.length > 1 ? keep('joining', () => kernel.Manifold.union(shapes)) : shapes[0]!;
    const cut = cutters.length > 0 ? keep('cutting', () => kernel.Manifold.difference([whole, ...cutters])) : whole;
    const { lowerMm = 0 } = solid;
    const placed = lowerMm === 0 ? cut : keep('lowering', () => cut.translate(0, 0, -lowerMm));
    const mesh = placed.getMesh();
    if (mesh.numProp !== 3) throw new MeshError(solid.part, 'reading back', `${mesh.numProp} numbers a vertex, not 3`);
    return { vertices: mesh.vertProperties, triangles: mesh.triVerts };
  } finally {
    for (const manifold of made) manifold.delete();
  }
}

function shapeOf(kernel: ManifoldToplevel, shape: Shape | Cutter): Manifold {
  switch (shape.kind) {
    case 'skin':
      return fromMesh(kernel, skinMesh(shape));
    case 'loft':
      return fromMesh(kernel, loftMesh(shape));
    case 'engraving':
      return engrave(kernel, shape);
    case 'prism': {
      const { outlines, fromMm, toMm, frame } = shape;
      const flat = new kernel.CrossSection(mutable(outlines), 'NonZero');
      const placed = drawnOut(flat, fromMm, toMm, frame);
      flat.delete();
      return placed;
    }
  }
}

type CrossSection = InstanceType<ManifoldToplevel['CrossSection']>;

const mutable = (outlines: readonly (readonly Point2[])[]): [number, number][][] =>
  outlines.map((line) => line.map(([x, y]): [number, number] => [x, y]));

function drawnOut(flat: CrossSection, fromMm: number, toMm: number, frame: Frame): Manifold {
  const tall = flat.extrude(toMm - fromMm);
  const placed = tall.transform(placing(frame, fromMm));
  tall.delete();
  return placed;
}

/** Columns of the frame's axes and origin, the origin moved up its z. */
function placing({ origin, x, y }: Frame, upMm: number): Mat4 {
  const z = [x[1] * y[2] - x[2] * y[1], x[2] * y[0] - x[0] * y[2], x[0] * y[1] - x[1] * y[0]] as const;
  const at = origin.map((o, i) => o + z[i]! * upMm) as [number, number, number];
  return [...x, 0, ...y, 0, ...z, 0, ...at, 1];
}

export function fromMesh(kernel: ManifoldToplevel, mesh: TriangleMesh): Manifold {
  return new kernel.Manifold(new kernel.Mesh({ numProp: 3, vertProperties: mesh.vertices, triVerts: mesh.triangles }));
}

/** Some errors of the kernel are thrown at once, the others are lazy and show only when asked for. */
export function good(part: string, operation: string, make: () => Manifold): Manifold {
  let manifold: Manifold;
  try {
    manifold = make();
  } catch (error) {
    throw new MeshError(part, operation, `${error instanceof Error ? error.message : error}, expected a closed solid`);
  }
  const status = manifold.status();
  const triangles = manifold.numTri();
  if (status === 'NoError' && triangles > 0) return manifold;
  manifold.delete();
  throw new MeshError(part, operation, `status ${status}, ${triangles} triangles, expected a closed solid`);
}

/** Strokes widened and joined flat, then drawn out to stand proud of the face. */
function engrave(kernel: ManifoldToplevel, { strokes, widthMm, zMm, depthMm, frame }: Engraving): Manifold {
  const outlines = strokes.flatMap((line) => capsules(line, widthMm / 2));
  const flat = new kernel.CrossSection(outlines, 'NonZero');
  const neat = flat.simplify(0.01);
  const placed = drawnOut(neat, zMm - depthMm, zMm + 1, frame);
  for (const done of [flat, neat]) done.delete();
  return placed;
}

/** One outline a segment, its ends half octagons; counterclockwise. */
function capsules(line: readonly Point2[], r: number): [number, number][][] {
  const out: [number, number][][] = [];
  for (let i = 1; i < line.length; i++) {
    const [ax, ay] = line[i - 1]!;
    const [bx, by] = line[i]!;
    const along = Math.atan2(by - ay, bx - ax);
    const end = (x: number, y: number, from: number) =>
      [0, 1, 2, 3].map((k): [number, number] => {
        const a = along + from + (Math.PI * k) / 3;
        return [x + r * Math.cos(a), y + r * Math.sin(a)];
      });
    out.push([...end(bx, by, -Math.PI / 2), ...end(ax, ay, Math.PI / 2)]);
  }
  return out;
}
