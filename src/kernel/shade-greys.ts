/** How light a face is, from where it looks; smooth over gentle edges, so that a turned surface shows no flats. */
import type { TriangleMesh } from './mesh.ts';

/** Faces that meet at less than this are shaded as one surface: chords of a circle are, flanks of a groove are not. */
const SMOOTH = Math.cos((30 * Math.PI) / 180);
/** Greys between which faces lie: light, so that a laser printer needs little for them and lines stand out. */
const DARKEST = 138;
const LIGHTEST = 252;
/** Towards the light, in the viewer's frame: right, up, out. From upper left, over the shoulder. */
const LIGHT = [-0.46, 0.62, 0.636] as const;

/** Unit normals of the triangles in the viewer's frame: right, up, towards the viewer. */
export function triangleNormals(
  { vertices: v, triangles: t }: TriangleMesh,
  axes: readonly (readonly [number, number, number])[],
): Float32Array {
  const [right, up, out] = axes as readonly [
    readonly [number, number, number],
    readonly [number, number, number],
    readonly [number, number, number],
  ];
  const normals = new Float32Array(t.length);
  for (let i = 0; i < t.length; i += 3) {
    const a = 3 * t[i]!;
    const b = 3 * t[i + 1]!;
    const c = 3 * t[i + 2]!;
    const ux = v[b]! - v[a]!;
    const uy = v[b + 1]! - v[a + 1]!;
    const uz = v[b + 2]! - v[a + 2]!;
    const wx = v[c]! - v[a]!;
    const wy = v[c + 1]! - v[a + 1]!;
    const wz = v[c + 2]! - v[a + 2]!;
    const x = uy * wz - uz * wy;
    const y = uz * wx - ux * wz;
    const z = ux * wy - uy * wx;
    const length = Math.sqrt(x * x + y * y + z * z);
    const by = length > 0 ? 1 / length : 0;
    normals[i] = (x * right[0] + y * right[1] + z * right[2]) * by;
    normals[i + 1] = (x * up[0] + y * up[1] + z * up[2]) * by;
    normals[i + 2] = (x * out[0] + y * out[1] + z * out[2]) * by;
  }
  return normals;
}

function greyOf(x: number, y: number, z: number): number {
  // Half a turn from light to dark, so that nothing that is seen falls into one flat shadow.
  const lit = (1 + x * LIGHT[0] + y * LIGHT[1] + z * LIGHT[2]) / 2;
  return DARKEST + (LIGHTEST - DARKEST) * Math.min(1, Math.max(0, (lit - 0.2) / 0.8));
}

/** A grey for each corner of each triangle that is seen: by the mean normal of the faces that go on smoothly from it there. */
export function cornerGreys({ vertices, triangles }: TriangleMesh, normals: Float32Array): Float32Array {
  const count = vertices.length / 3;
  const starts = new Uint32Array(count + 1);
  for (const vertex of triangles) starts[vertex + 1]!++;
  for (let i = 0; i < count; i++) starts[i + 1]! += starts[i]!;
  const fill = starts.slice(0, count);
  const around = new Uint32Array(triangles.length);
  for (let i = 0; i < triangles.length; i++) around[fill[triangles[i]!]!++] = i - (i % 3);
  const greys = new Float32Array(triangles.length);
  for (let i = 0; i < triangles.length; i++) {
    const t = i - (i % 3);
    const nx = normals[t]!;
    const ny = normals[t + 1]!;
    const nz = normals[t + 2]!;
    if (nz <= 0) continue;
    const vertex = triangles[i]!;
    let x = 0;
    let y = 0;
    let z = 0;
    for (let k = starts[vertex]!; k < starts[vertex + 1]!; k++) {
      const s = around[k]!;
      const sx = normals[s]!;
      const sy = normals[s + 1]!;
      const sz = normals[s + 2]!;
      if (nx * sx + ny * sy + nz * sz < SMOOTH) continue;
      x += sx;
      y += sy;
      z += sz;
    }
    const length = Math.sqrt(x * x + y * y + z * z) || 1;
    greys[i] = greyOf(x / length, y / length, z / length);
  }
  return greys;
}
