/**
 * The mesh of a loft: quads between its rings, a fan over each end unless they are joined, turned outwards whichever way
 * the rings ran.
 */
import type { Loft } from '../parts/solid.ts';
import { MeshBuilder, signedVolume, type TriangleMesh } from './mesh.ts';

export function loftMesh(loft: Loft): TriangleMesh {
  const build = new MeshBuilder();
  const rings = loft.rings.map((ring) => ring.map(([x, y, z]) => build.vertex(x, y, z)));
  const count = rings[0]!.length;
  for (let i = loft.joined ? 0 : 1; i < rings.length; i++) {
    const a = rings[(i + rings.length - 1) % rings.length]!;
    const b = rings[i]!;
    for (let j = 0; j < count; j++) {
      const k = (j + 1) % count;
      build.quad(a[j]!, a[k]!, b[k]!, b[j]!);
    }
  }
  if (!loft.joined) {
    const hubs = loft.hubs?.map(([x, y, z]) => build.vertex(x, y, z));
    fan(build, [...rings[0]!].reverse(), hubs?.[0]);
    fan(build, rings[rings.length - 1]!, hubs?.[1]);
  }
  const mesh = build.build();
  return signedVolume(mesh) < 0 ? build.build(true) : mesh;
}

function fan(build: MeshBuilder, ring: readonly number[], hub: number | undefined): void {
  if (hub === undefined) for (let i = 2; i < ring.length; i++) build.triangle(ring[0]!, ring[i - 1]!, ring[i]!);
  else for (let i = 0; i < ring.length; i++) build.triangle(hub, ring[i]!, ring[(i + 1) % ring.length]!);
}
