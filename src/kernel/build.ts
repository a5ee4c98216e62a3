/** Solid description to mesh: own meshes for every shape, one batch of booleans. */
import type { Manifold, ManifoldToplevel } from 'manifold-3d';
import type { Engraving, Point2, Solid } from '../parts/solid.ts';
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
  try {
    const body = keep('turned body', () => fromMesh(kernel, skinMesh(solid.body)));
    const adders = solid.adders.map((adder) => keep(adder.name, () => fromMesh(kernel, loftMesh(adder))));
    const cutters = solid.cutters.map((cutter) =>
      keep(cutter.name, () => (cutter.kind === 'loft' ? fromMesh(kernel, loftMesh(cutter)) : engrave(kernel, cutter))),
    );
    const whole = adders.length > 0 ? keep('joining', () => kernel.Manifold.union([body, ...adders])) : body;
    const cut = cutters.length > 0 ? keep('cutting', () => kernel.Manifold.difference([whole, ...cutters])) : whole;
    const mesh = cut.getMesh();
    if (mesh.numProp !== 3) throw new MeshError(solid.part, 'reading back', `${mesh.numProp} numbers a vertex, not 3`);
    return { vertices: mesh.vertProperties, triangles: mesh.triVerts };
  } finally {
    for (const manifold of made) manifold.delete();
  }
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

/** Strokes widened and joined flat, then extruded to stand proud of the face. */
function engrave(kernel: ManifoldToplevel, engraving: Engraving): Manifold {
  const outlines = engraving.strokes.flatMap((line) => capsules(line, engraving.widthMm / 2));
  const flat = new kernel.CrossSection(outlines, 'NonZero');
  const neat = flat.simplify(0.01);
  const tall = neat.extrude(engraving.depthMm + 1);
  const placed = tall.translate(0, 0, engraving.zMm - engraving.depthMm);
  for (const done of [flat, neat, tall]) done.delete();
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
